import { lazy } from 'react'

/** The 3D part; its chunk, three and all, is loaded when it is first shown. Wrap it in Suspense. */
export const PartViewer = lazy(() => import('./PartViewer.tsx'))

export { ACTS as VIEW_ACTS, type ActContext as ViewContext } from './controls/acts.ts'
export type { Balloon, EdgeLabel, EventMark, Insets, PartViewerProps, ScaleBar } from './types.ts'
