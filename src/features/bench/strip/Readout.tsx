import { useEffect, useState, type RefObject } from 'react'
import { edgeName } from '../../../../shared/walls/names.ts'
import { formatAngle, formatLength } from '../../../../shared/units/format.ts'
import { cellAt, tiltAt } from '../model/strip.ts'
import { useScene } from '../scene.ts'
import { CHART, NAMES, type StripScale } from './measures.ts'
import type { Strip } from './use-strip.ts'

/** Room that the words need beside the line, px. */
const ROOM = 190

interface ReadoutProps {
  readonly drawing: RefObject<SVGSVGElement | null>
  readonly strip: Strip
  readonly scale: StripScale
}

/** What stands under the pointer. It follows by itself, so that a moving pointer draws nothing else anew. */
export function Readout({ drawing, strip, scale }: ReadoutProps) {
  const { unit } = useScene()
  const [at, setAt] = useState<number | null>(null)
  useEffect(() => {
    const svg = drawing.current
    if (svg === null) return
    const moved = (event: PointerEvent) => {
      const px = event.clientX - svg.getBoundingClientRect().left
      setAt(Math.max(0, Math.min(scale.mm(scale.width), scale.mm(px))))
    }
    const left = () => setAt(null)
    svg.addEventListener('pointermove', moved)
    svg.addEventListener('pointerleave', left)
    return () => {
      svg.removeEventListener('pointermove', moved)
      svg.removeEventListener('pointerleave', left)
    }
  }, [drawing, scale])
  if (at === null) return null

  const x = scale.x(at)
  const tilt = tiltAt(strip.line, at)
  const cell = cellAt(strip.cells, at)
  const toLeft = x > scale.width - ROOM
  const name = cell === null ? '' : edgeName({ loop: strip.loop, edge: cell.edge })
  return (
    <g pointerEvents="none">
      <line x1={x} x2={x} y1={CHART.top} y2={NAMES - 10} className="stroke-select" />
      {tilt !== null && <circle cx={x} cy={scale.y(tilt)} r={3.5} className="fill-select" />}
      <text
        x={toLeft ? x - 7 : x + 7}
        y={CHART.bottom - 6}
        textAnchor={toLeft ? 'end' : 'start'}
        className="fill-select text-[11px] [paint-order:stroke] stroke-panel stroke-[3px]"
      >
        {name} at {formatLength(at, unit, { decimals: unit === 'mm' ? 0 : 2 })}
        {tilt === null ? '' : ` needs ${formatAngle(tilt, { decimals: 1 })}`}
      </text>
    </g>
  )
}
