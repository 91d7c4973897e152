import { useState, type PointerEvent } from 'react'
import { edgeName } from '../../../../shared/body/names.ts'
import { formatAngle, formatLength } from '../../../../shared/units/format.ts'
import { axisTop, cellAt, drawnCells, perimeterOf, tiltAt } from '../model/strip.ts'
import { useScene } from '../scene.ts'
import { StripBalloons } from './StripBalloons.tsx'
import { StripChart } from './StripChart.tsx'
import { StripWalls } from './StripWalls.tsx'
import { CHART, HEIGHT, LEAST_CELL, type StripScale } from './measures.ts'
import type { Strip } from './use-strip.ts'

interface StripDrawingProps {
  readonly strip: Strip
  /** Whole width of the drawing and width in sight, px. */
  readonly width: number
  readonly view: number
}

export function StripDrawing({ strip, width, view }: StripDrawingProps) {
  const { unit } = useScene()
  const [at, setAt] = useState<number | null>(null)
  const perimeter = perimeterOf(strip.edges)
  const top = axisTop(strip.line, [strip.mechanical, strip.working ?? 0])
  const scale: StripScale = {
    width,
    view,
    top,
    x: (s) => (perimeter === 0 ? 0 : (s / perimeter) * width),
    y: (tilt) => CHART.bottom - (tilt / top) * (CHART.bottom - CHART.top),
    mm: (px) => (px * perimeter) / width,
  }
  const cells = drawnCells(strip.cells, scale.mm(LEAST_CELL))

  function moved(event: PointerEvent<SVGSVGElement>) {
    const box = event.currentTarget.getBoundingClientRect()
    setAt(Math.max(0, Math.min(perimeter, scale.mm(event.clientX - box.left))))
  }

  return (
    <svg
      width={width}
      height={HEIGHT}
      className="block font-mono"
      onPointerMove={moved}
      onPointerLeave={() => setAt(null)}
    >
      <StripChart strip={strip} scale={scale} />
      <StripWalls strip={strip} cells={cells} scale={scale} />
      <StripBalloons strip={strip} scale={scale} />
      {at !== null && <Readout at={at} />}
    </svg>
  )

  function Readout({ at: s }: { at: number }) {
    const x = scale.x(s)
    const tilt = tiltAt(strip.line, s)
    const cell = cellAt(strip.cells, s)
    const left = x > width - 190
    const name = cell === null ? '' : edgeName({ loop: strip.loop, edge: cell.edge })
    return (
      <g pointerEvents="none">
        <line x1={x} x2={x} y1={CHART.top} y2={HEIGHT - 16} className="stroke-select" />
        {tilt !== null && <circle cx={x} cy={scale.y(tilt)} r={3.5} className="fill-select" />}
        <text
          x={left ? x - 7 : x + 7}
          y={CHART.bottom - 6}
          textAnchor={left ? 'end' : 'start'}
          className="fill-select text-[11px] [paint-order:stroke] stroke-panel stroke-[3px]"
        >
          {name} at {formatLength(s, unit, { decimals: unit === 'mm' ? 0 : 2 })}
          {tilt === null ? '' : ` needs ${formatAngle(tilt, { decimals: 1 })}`}
        </text>
      </g>
    )
  }
}
