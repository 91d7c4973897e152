import { tiltAt } from '../model/strip.ts'
import { useActs } from '../model/store.ts'
import { useScene } from '../scene.ts'
import { CHART, type StripScale } from './measures.ts'
import type { Strip } from './use-strip.ts'

const RADIUS = 9
const GAP = 2 * RADIUS + 2

/** A note's number where its places stand; numbers that would meet go one above the other, then are left out. */
export function StripBalloons({ strip, scale }: { strip: Strip; scale: StripScale }) {
  const { notes, chosenNote, chooseNote } = useScene()
  const acts = useActs()
  const marks = notes.flatMap(({ number, severity, places }) =>
    places.flatMap((place) => {
      if (place.loop !== strip.loop || place.edges.length > 2) return []
      const s = placeOf(strip, place.vertex, place.edge)
      return s === null ? [] : [{ number, severity, edges: place.edges, s }]
    }),
  )
  const placed: { x: number; y: number }[] = []
  return (
    <g>
      {marks.map(({ number, severity, edges, s }, i) => {
        const x = Math.max(RADIUS + 1, Math.min(scale.width - RADIUS - 1, scale.x(s)))
        const y = freeHeight(placed, x, scale.y(tiltAt(strip.line, s) ?? 0) - RADIUS - 3)
        if (y === null) return null
        placed.push({ x, y })
        const tone =
          chosenNote === number
            ? 'stroke-select fill-select'
            : severity === 'stop'
              ? 'stroke-breach fill-breach'
              : 'stroke-ink fill-ink'
        return (
          <g
            key={`${number} ${i}`}
            className="cursor-pointer"
            aria-hidden="true"
            onClick={() => {
              chooseNote(number)
              acts.selectMany(edges)
            }}
          >
            <circle cx={x} cy={y} r={RADIUS} className={`fill-panel! ${tone}`} strokeWidth={1.5} />
            <text
              x={x}
              y={y + 3.5}
              textAnchor="middle"
              className={`text-[10px] font-bold stroke-none ${tone}`}
            >
              {number}
            </text>
          </g>
        )
      })}
    </g>
  )
}

function placeOf(strip: Strip, vertex: number | null, edge: number | null): number | null {
  const cell = strip.cells[vertex ?? edge ?? -1]
  if (cell === undefined) return null
  return vertex === null ? (cell.from + cell.to) / 2 : cell.from
}

/** The nearest height, from the wanted one, at which a balloon meets none that stands; null when there is none. */
function freeHeight(placed: readonly { x: number; y: number }[], x: number, wanted: number): number | null {
  const top = CHART.top + RADIUS - 6
  const bottom = CHART.bottom - RADIUS
  const start = Math.max(top, Math.min(bottom, wanted))
  const beside = placed.filter((other) => Math.abs(other.x - x) < GAP)
  for (let away = 0; away <= bottom - top; away += GAP / 2) {
    for (const y of [start - away, start + away]) {
      if (y < top || y > bottom) continue
      if (beside.every((other) => Math.hypot(other.x - x, other.y - y) >= GAP)) return y
    }
  }
  return null
}
