import { useMemo, useRef } from 'react'
import { axisTop, drawnCells, perimeterOf } from '../model/strip.ts'
import { CHART, HEIGHT, LEAST_CELL, type StripScale } from './measures.ts'
import { Readout } from './Readout.tsx'
import { StripBalloons } from './StripBalloons.tsx'
import { StripChart } from './StripChart.tsx'
import { StripWalls } from './StripWalls.tsx'
import type { Strip } from './use-strip.ts'

interface StripDrawingProps {
  readonly strip: Strip
  /** Whole width of the drawing and width in sight, px. */
  readonly width: number
  readonly view: number
}

export function StripDrawing({ strip, width, view }: StripDrawingProps) {
  const drawing = useRef<SVGSVGElement>(null)
  const scale = useMemo(() => scaleOf(strip, width, view), [strip, width, view])
  const cells = useMemo(() => drawnCells(strip.cells, scale.mm(LEAST_CELL)), [strip, scale])
  return (
    <svg ref={drawing} width={width} height={HEIGHT} className="block font-mono">
      <StripChart strip={strip} scale={scale} />
      <StripWalls strip={strip} cells={cells} scale={scale} />
      <StripBalloons strip={strip} scale={scale} />
      <Readout drawing={drawing} strip={strip} scale={scale} />
    </svg>
  )
}

function scaleOf(strip: Strip, width: number, view: number): StripScale {
  const perimeter = perimeterOf(strip.edges)
  const top = axisTop(strip.line, [strip.mechanical, strip.working ?? 0])
  return {
    width,
    view,
    top,
    x: (s) => (perimeter === 0 ? 0 : (s / perimeter) * width),
    y: (tilt) => CHART.bottom - (tilt / top) * (CHART.bottom - CHART.top),
    mm: (px) => (px * perimeter) / width,
  }
}
