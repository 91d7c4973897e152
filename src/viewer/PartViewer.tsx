import type { PartViewerProps } from './types.ts'

/** The bevelled part in 3D. */
export default function PartViewer({ theme, label = 'Part in 3D', description }: PartViewerProps) {
  return (
    <div data-theme={theme} role="img" aria-label={label} className="relative h-full w-full">
      <span className="sr-only">{description}</span>
    </div>
  )
}
