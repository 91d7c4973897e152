import { useId } from 'react'
import { formatAngle } from '../../../../shared/units/format.ts'
import { HatchDef } from '../../../ui/Hatch.tsx'
import type { StripPoint } from '../model/strip.ts'
import { CHART, type StripScale } from './measures.ts'
import type { Strip } from './use-strip.ts'

interface StripChartProps {
  readonly strip: Strip
  readonly scale: StripScale
}

/** The tilt that the jet needs along the way, the limits as lines, what passes them hatched. */
export function StripChart({ strip, scale }: StripChartProps) {
  const { line, breaches, mechanical, working } = strip
  const hatch = useId()
  const { width, top, x, y } = scale
  const grid = Array.from({ length: top / 15 - 1 }, (_, i) => (i + 1) * 15)
  const path = (points: readonly StripPoint[]) =>
    points.map(({ s, tilt }, i) => `${i === 0 ? 'M' : 'L'}${x(s).toFixed(1)} ${y(tilt).toFixed(1)}`).join('')
  return (
    <g aria-hidden="true">
      <defs>
        <HatchDef id={hatch} />
      </defs>
      {grid.map((tilt) => (
        <line
          key={tilt}
          x1={0}
          x2={width}
          y1={y(tilt)}
          y2={y(tilt)}
          className="stroke-rule"
          strokeWidth={0.7}
        />
      ))}
      {line.length > 0 && (
        <>
          <path
            d={`${path(line)}L${width} ${CHART.bottom}L0 ${CHART.bottom}Z`}
            className="fill-rule"
            opacity={0.55}
          />
          {breaches.map(({ outline }, i) => (
            <path key={i} d={`${path(outline)}Z`} fill={`url(#${hatch})`} className="stroke-breach" />
          ))}
          <path d={path(line)} fill="none" className="stroke-ink" strokeWidth={1.4} />
        </>
      )}
      <line
        x1={0}
        x2={width}
        y1={CHART.bottom}
        y2={CHART.bottom}
        className="stroke-muted"
        strokeWidth={0.7}
      />
      <Limit scale={scale} tilt={mechanical} name="head" above />
      {working !== null && working !== mechanical && (
        <Limit scale={scale} tilt={working} name="working" dashed />
      )}
      {grid
        .filter((tilt) =>
          [mechanical, working].every((limit) => limit === null || Math.abs(limit - tilt) > 6),
        )
        .map((tilt) => (
          <text
            key={tilt}
            x={3}
            y={y(tilt) - 2}
            className="fill-muted text-[10px] [paint-order:stroke] stroke-panel stroke-[3px]"
          >
            {tilt}°
          </text>
        ))}
    </g>
  )
}

interface LimitProps {
  readonly scale: StripScale
  readonly tilt: number
  readonly name: string
  readonly above?: boolean
  readonly dashed?: boolean
}

/** The head's label stands above its line and the working limit's below, so that close limits stay apart. */
function Limit({ scale: { width, view, y }, tilt, name, above = false, dashed = false }: LimitProps) {
  const words = `${name} ${formatAngle(tilt)}`
  // A strip wider than the page repeats its labels, so that one is always in sight.
  const places = Array.from({ length: Math.max(1, Math.round(width / view)) }, (_, i) => view * (i + 1) - 4)
  return (
    <>
      <line
        x1={0}
        x2={width}
        y1={y(tilt)}
        y2={y(tilt)}
        className="stroke-breach"
        strokeWidth={1.2}
        strokeDasharray={dashed ? '6 4' : undefined}
      />
      {places.map((x) => (
        <text
          key={x}
          x={x}
          y={y(tilt) + (above ? -3 : 10)}
          textAnchor="end"
          className="fill-breach text-[10px] [paint-order:stroke] stroke-panel stroke-[3px]"
        >
          {words}
        </text>
      ))}
    </>
  )
}
