import type { Notice } from '../../../../shared/drawing/schema.ts'
import type { Point } from '../../../../shared/geometry/types.ts'
import { placeBalloons } from '../../../ui/place-balloons.ts'
import type { Frame } from './frame.ts'

interface NoticeBalloonsProps {
  readonly notices: readonly Notice[]
  readonly frame: Frame
  readonly at: number | null
  readonly onAt: (index: number | null) => void
}

const RADIUS = 11

/** The notes' numbers where they apply: a balloon at the first place of each, a ring at every place of the picked one. */
export function NoticeBalloons({ notices, frame, at, onAt }: NoticeBalloonsProps) {
  const onScreen = ({ x, y }: Point): Point => ({
    x: frame.originX + frame.scale * x,
    y: frame.originY - frame.scale * y,
  })
  const placed = notices.flatMap((notice, index) => {
    const first = notice.places[0]
    return first === undefined ? [] : [{ notice, index, anchor: onScreen(first) }]
  })
  const spots = placeBalloons(
    placed.map(({ anchor }) => anchor),
    frame,
    RADIUS,
  )
  return placed.map(({ notice, index, anchor }, i) => {
    const spot = spots[i]!
    const colour =
      at === index ? 'var(--select)' : notice.severity === 'error' ? 'var(--breach)' : 'var(--ink)'
    return (
      <g key={index} stroke={colour} fill="none" strokeWidth={1.5}>
        {(at === index ? notice.places : [notice.places[0]!]).map((place, n) => {
          const { x, y } = onScreen(place)
          return <circle key={n} cx={x} cy={y} r={4} />
        })}
        <path d={`M${anchor.x} ${anchor.y}L${spot.x} ${spot.y}`} strokeWidth={1} />
        <g className="cursor-pointer" onClick={() => onAt(at === index ? null : index)}>
          <circle cx={spot.x} cy={spot.y} r={RADIUS} fill="var(--sheet)" />
          <text
            x={spot.x}
            y={spot.y}
            textAnchor="middle"
            dominantBaseline="central"
            fontSize={12}
            fontWeight={700}
            fill={colour}
            stroke="none"
          >
            {index + 1}
          </text>
        </g>
      </g>
    )
  })
}
