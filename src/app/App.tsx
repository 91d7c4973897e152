import { QueryClientProvider } from '@tanstack/react-query'
import { useState } from 'react'
import { RouterProvider } from 'react-router-dom'
import { makeQueryClient } from '../api/query-client.ts'
import { sessionQuery } from '../api/session.ts'
import { makeRouter } from './router.tsx'

export function App() {
  const [client] = useState(() => {
    const made = makeQueryClient()
    // Asked for at once: it need not wait for the first page's own files.
    void made.prefetchQuery(sessionQuery)
    return made
  })
  const [router] = useState(makeRouter)
  return (
    <QueryClientProvider client={client}>
      <RouterProvider router={router} />
    </QueryClientProvider>
  )
}
