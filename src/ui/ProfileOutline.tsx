import type { Bounds, VertexLoop } from '../../shared/geometry/types.ts'
import { outlinePath, viewBoxOf } from './outline-path.ts'

interface ProfileOutlineProps {
  readonly loops: readonly VertexLoop[]
  readonly bounds: Bounds
  /** What the picture shows, for those who do not see it; left out, the picture is decoration. */
  readonly label?: string
  readonly className?: string
}

/** The flat part as a drawing: face tone, ink outline, holes left open, fitted into its box. */
export function ProfileOutline({ loops, bounds, label, className = '' }: ProfileOutlineProps) {
  return (
    <svg
      viewBox={viewBoxOf(bounds)}
      className={className}
      role={label === undefined ? undefined : 'img'}
      aria-label={label}
      aria-hidden={label === undefined}
      preserveAspectRatio="xMidYMid meet"
    >
      <path
        d={outlinePath(loops)}
        fill="var(--face)"
        fillRule="evenodd"
        stroke="var(--ink)"
        strokeWidth={1.25}
        vectorEffect="non-scaling-stroke"
      />
    </svg>
  )
}
