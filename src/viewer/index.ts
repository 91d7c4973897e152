import { lazy } from 'react'

/** The 3D part; its chunk, three and all, is loaded when it is first shown. Wrap it in Suspense. */
export const PartViewer = lazy(() => import('./PartViewer.tsx'))

export type { Balloon, EdgeLabel, EventMark, Insets, PartViewerProps, ScaleBar } from './types.ts'
