import { useId } from 'react'
import { tiltColour, type Theme } from '../theme/tilt-colour.ts'
import type { Arc, Hairline, PlacedFacet, Px, SectionLayout } from './layout-types.ts'

interface SectionLinesProps {
  readonly layout: SectionLayout
  readonly theme: Theme
  readonly label: string
  /** Facets of the left plate that break a limit: hatched. */
  readonly breached: readonly number[]
  /** Black on white whatever the theme. */
  readonly print: boolean
}

const DASHES: Record<Hairline['kind'], string | undefined> = {
  witness: undefined,
  dimension: undefined,
  leader: undefined,
  axis: '9 3 2 3',
  extension: '2 2',
  groove: '4 3',
}

const ARROW = 5

/** The strokes of a section. Colours sit in custom properties so that print can put black in their place. */
export function SectionLines({ layout, theme, label, breached, print }: SectionLinesProps) {
  const hatch = useId()
  const ink = print ? 'stroke-black' : 'stroke-ink print:stroke-black'
  const thin = print ? 'stroke-black' : 'stroke-muted print:stroke-black'
  return (
    <svg
      role="img"
      aria-label={label}
      width={layout.width}
      height={layout.height}
      className="block overflow-visible"
      fill="none"
    >
      <defs>
        <pattern id={hatch} width="5" height="5" patternUnits="userSpaceOnUse" patternTransform="rotate(45)">
          <line
            y2="5"
            className={print ? 'stroke-black' : 'stroke-breach print:stroke-black'}
            strokeWidth="2"
          />
        </pattern>
      </defs>
      {layout.plates.map((plate, i) => (
        <path key={i} d={`${path(plate)}Z`} className={print ? 'fill-none' : 'fill-face print:fill-none'} />
      ))}
      {layout.facets
        .filter(({ plate, facet }) => plate === 'left' && breached.includes(facet))
        .map((facet) => (
          <path key={facet.facet} d={`${path(hatchBand(facet))}Z`} fill={`url(#${hatch})`} />
        ))}
      <g className={thin} strokeWidth="0.8">
        {layout.hairlines.map(({ kind, points }, i) => (
          <path key={i} d={path(points)} strokeDasharray={DASHES[kind]} />
        ))}
        {layout.arcs.map((arc, i) => (
          <path key={i} d={arcPath(arc)} />
        ))}
        {layout.breaks.map((line, i) => (
          <path key={i} d={path(line)} />
        ))}
      </g>
      <g className={print ? 'fill-black' : 'fill-muted print:fill-black'}>
        {layout.hairlines.flatMap(arrowHeads).map((head, i) => (
          <path key={i} d={`${path(head)}Z`} />
        ))}
      </g>
      <g className={ink} strokeWidth="1.5">
        {layout.faces.map((face, i) => (
          <path key={i} d={path(face)} />
        ))}
      </g>
      {layout.facets.map((facet) => (
        <g key={`${facet.plate}-${facet.facet}`} strokeLinecap="round">
          <path d={path([facet.from, facet.to])} className={ink} strokeWidth={facet.tilt === 0 ? 3.5 : 5} />
          {facet.tilt !== 0 && !print && (
            <path
              d={path([facet.from, facet.to])}
              className="stroke-(--tilt) print:stroke-black"
              style={{ '--tilt': tiltColour(facet.tilt, theme) } as React.CSSProperties}
              strokeWidth="3.5"
            />
          )}
        </g>
      ))}
    </svg>
  )
}

function path(points: readonly Px[]): string {
  return points.map(({ x, y }, i) => `${i === 0 ? 'M' : 'L'}${round(x)} ${round(y)}`).join('')
}

function round(px: number): number {
  return Math.round(px * 1000) / 1000
}

function arcPath({ centre, radius, from, to }: Arc): string {
  const at = (angle: number) =>
    `${round(centre.x + radius * Math.cos(angle))} ${round(centre.y + radius * Math.sin(angle))}`
  return `M${at(from)}A${round(radius)} ${round(radius)} 0 0 ${to > from ? 1 : 0} ${at(to)}`
}

function arrowHeads({ points, arrows }: Hairline): Px[][] {
  if (!arrows) return []
  const inner = arrows === 'in' ? points.slice(1, -1) : points
  const [a, b] = [inner[0]!, inner.at(-1)!]
  const length = Math.hypot(b.x - a.x, b.y - a.y)
  if (arrows === 'out' && length < 2 * ARROW) return []
  // A head at `tip` whose body lies on the side of (ux, uy).
  const along = length === 0 ? { x: 1, y: 0 } : { x: (b.x - a.x) / length, y: (b.y - a.y) / length }
  const sense = arrows === 'out' ? 1 : -1
  return [head(a, along.x * sense, along.y * sense), head(b, -along.x * sense, -along.y * sense)]
}

function head(tip: Px, ux: number, uy: number): Px[] {
  const wide = ARROW / 3
  return [
    tip,
    { x: tip.x + ux * ARROW - uy * wide, y: tip.y + uy * ARROW + ux * wide },
    { x: tip.x + ux * ARROW + uy * wide, y: tip.y + uy * ARROW - ux * wide },
  ]
}

/** A band of 8 px on the waste side of the left plate's facet. */
function hatchBand({ from, to }: PlacedFacet): Px[] {
  const length = Math.hypot(to.x - from.x, to.y - from.y)
  const nx = ((to.y - from.y) / length) * 8
  const ny = (-(to.x - from.x) / length) * 8
  return [from, to, { x: to.x + nx, y: to.y + ny }, { x: from.x + nx, y: from.y + ny }]
}
