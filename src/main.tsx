import { StrictMode } from 'react'
import { createRoot } from 'react-dom/client'
import './theme/index.css'

createRoot(document.getElementById('root')!).render(<StrictMode>Undercant</StrictMode>)
