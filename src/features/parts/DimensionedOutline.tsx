import { useMemo } from 'react'
import type { Part } from '../../../shared/api/parts.ts'
import { formatLength } from '../../../shared/units/format.ts'
import { useUnit } from '../../app/preferences.ts'
import { formatSize } from '../../ui/measures.ts'
import { outlinePath } from '../../ui/outline-path.ts'
import { useWidth } from '../../ui/use-width.ts'

/** Room for the dimension lines, the tallest picture and a dimension's tick, CSS pixels. */
const MARGIN = 52
const TALLEST = 520
const SHORTEST = 200
const TICK = 6

/** The flat part with its overall width and height as a drawing gives them. */
export function DimensionedOutline({ part }: { part: Pick<Part, 'loops' | 'bounds'> }) {
  const unit = useUnit()
  const [box, width] = useWidth<HTMLDivElement>()
  const path = useMemo(() => outlinePath(part.loops), [part.loops])
  const { minX, maxX, minY, maxY } = part.bounds
  const room = Math.max(width - 2 * MARGIN, 1)
  const height = Math.min(TALLEST, Math.max(SHORTEST, (room * (maxY - minY)) / (maxX - minX) + 2 * MARGIN))
  const scale = Math.min(room / (maxX - minX), (height - 2 * MARGIN) / (maxY - minY))
  const left = (width - scale * (maxX - minX)) / 2
  const right = width - left
  const top = (height - scale * (maxY - minY)) / 2
  const bottom = height - top
  const below = bottom + MARGIN / 2
  const beside = right + MARGIN / 2
  return (
    <div ref={box} className="bg-panel border border-rule min-w-0">
      {width > 0 && (
        <svg
          width={width}
          height={height}
          className="block"
          role="img"
          aria-label={`Outline of the part, ${formatSize(part.bounds, unit)}`}
        >
          <g transform={`translate(${left - scale * minX} ${bottom + scale * minY}) scale(${scale})`}>
            <path
              d={path}
              fill="var(--face)"
              fillRule="evenodd"
              stroke="var(--ink)"
              strokeWidth={1.5}
              vectorEffect="non-scaling-stroke"
            />
          </g>
          <g stroke="var(--muted)" fill="none">
            <path d={`M${left} ${bottom + TICK}V${below + TICK}M${right} ${bottom + TICK}V${below + TICK}`} />
            <path d={`M${left} ${below}H${right}`} />
            <path d={`M${right + TICK} ${top}H${beside + TICK}M${right + TICK} ${bottom}H${beside + TICK}`} />
            <path d={`M${beside} ${top}V${bottom}`} />
          </g>
          <g fill="var(--ink)" fontSize={13} fontWeight={500} textAnchor="middle">
            <text x={width / 2} y={below + 18}>
              {formatLength(maxX - minX, unit)}
            </text>
            <text transform={`translate(${beside + 18} ${height / 2}) rotate(-90)`}>
              {formatLength(maxY - minY, unit)}
            </text>
          </g>
        </svg>
      )}
    </div>
  )
}
