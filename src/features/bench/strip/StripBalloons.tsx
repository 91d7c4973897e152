import { useMemo } from 'react'
import type { EdgeRef } from '../../../../shared/walls/types.ts'
import type { MarginNote } from '../model/notes.ts'
import { tiltAt } from '../model/strip.ts'
import { useActs } from '../model/store.ts'
import { useScene } from '../scene.ts'
import { CHART, type StripScale } from './measures.ts'
import type { Strip } from './use-strip.ts'

const RADIUS = 9
const GAP = 2 * RADIUS + 2
/** One number is not repeated nearer than this unless its note is chosen, px. */
const REPEAT = 90

/** A note's number where its places stand; numbers that would meet go one above the other, then are left out. */
export function StripBalloons({ strip, scale }: { strip: Strip; scale: StripScale }) {
  const { notes, chosenNote, chooseNote } = useScene()
  const acts = useActs()
  const marks = useMemo(() => placeMarks(notes, chosenNote, strip, scale), [notes, chosenNote, strip, scale])
  return (
    <g>
      {marks.map(({ number, severity, edges, x, y }, i) => {
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

interface Mark {
  readonly number: number
  readonly severity: MarginNote['severity']
  readonly edges: readonly EdgeRef[]
  readonly x: number
  readonly y: number
}

function placeMarks(
  notes: readonly MarginNote[],
  chosen: number | null,
  strip: Strip,
  scale: StripScale,
): Mark[] {
  const marks: Mark[] = []
  for (const { number, severity, places } of notes) {
    let last = -Infinity
    for (const { loop, vertex, edge, edges } of places) {
      const s = loop === strip.loop && edges.length <= 2 ? placeOf(strip, vertex, edge) : null
      if (s === null) continue
      const x = Math.max(RADIUS + 1, Math.min(scale.width - RADIUS - 1, scale.x(s)))
      if (number !== chosen && Math.abs(x - last) < REPEAT) continue
      const y = freeHeight(marks, x, scale.y(tiltAt(strip.line, s) ?? 0) - RADIUS - 3)
      if (y === null) continue
      marks.push({ number, severity, edges, x, y })
      last = x
    }
  }
  return marks
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
