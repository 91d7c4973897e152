import { useMemo } from 'react'
import { edgeName } from '../../../shared/walls/names.ts'
import type { Evaluation } from '../../../shared/evaluate/schema.ts'
import { boundsOf } from '../../../shared/geometry/loop.ts'
import { loopFromVertices } from '../../../shared/geometry/bulge.ts'
import type { Point, VertexLoop } from '../../../shared/geometry/types.ts'
import type { SetupContent } from '../../../shared/setup/schema.ts'
import { formatLength } from '../../../shared/units/format.ts'
import type { DisplayUnit } from '../../../shared/units/length.ts'
import { PX_PER_MM, standardScaleWithin } from '../../section/scales.ts'
import { outlinePath } from '../../ui/outline-path.ts'
import { Heading } from './Heading.tsx'
import { placeNames } from './name-places.ts'
import { isPlain, type SheetRow } from './sheet-model.ts'

/** Room for the picture and, round it, for names. mm on paper; anything wider than the page would shrink it all. */
const WIDTH = 182
const HEIGHT = 124
const RIM = 8
const FONT = 2.6

interface OutlineProps {
  readonly content: SetupContent
  readonly evaluation: Evaluation
  readonly rows: readonly SheetRow[]
  readonly unit: DisplayUnit
}

/** The part from above at a standard scale: top contour full, bottom contour dashed, edges named. */
export function Outline({ content, evaluation, rows, unit }: OutlineProps) {
  const top = evaluation.contours.find(({ depth }) => depth === 0)?.loops ?? content.loops
  // Names go by the drawing's edges; where an edge is gone at the top, the drawing's own outline carries them.
  const numbered = top.every((loop, i) => loop.length === content.loops[i]?.length) ? top : content.loops
  const last = evaluation.contours.at(-1)
  const bottom = last && last.depth > 0 ? last : undefined
  const picture = useMemo(() => fit([...top, ...(bottom?.loops ?? [])]), [top, bottom])
  const names = useMemo(() => {
    const prepared = new Set(rows.filter((row) => !isPlain(row)).map(({ name }) => name))
    return placeNames(numbered, {
      toPaper: picture.toPaper,
      width: WIDTH,
      height: picture.height,
      font: FONT,
      avoid: bottom?.loops ?? [],
      first: (edge) => prepared.has(edgeName(edge)),
    })
  }, [numbered, bottom, picture, rows])
  const { scale, scaleText, height, origin } = picture
  const place = `translate(${origin.x} ${origin.y}) scale(${scale})`
  const unnamed = rows.length - names.length
  const depth = bottom ? formatLength(bottom.depth, unit) : ''
  return (
    <figure className="sheet-keep m-0 print:mt-[4mm]">
      <Heading aside={`${scaleText} on paper`}>Part from above</Heading>
      <svg
        role="img"
        aria-label={`Part from above with ${rows.length} edges`}
        width={WIDTH * PX_PER_MM}
        height={height * PX_PER_MM}
        fill="none"
        stroke="#000"
      >
        {/* No view box: browsers snap one to whole pixels, and the scale would be off. */}
        <g transform={`scale(${PX_PER_MM})`}>
          {bottom && (
            <g transform={place}>
              <path
                d={outlinePath(bottom.loops)}
                strokeWidth={0.18 / scale}
                strokeDasharray={`${1.6 / scale} ${0.9 / scale}`}
              />
            </g>
          )}
          <g transform={place}>
            <path d={outlinePath(top)} strokeWidth={0.4 / scale} />
          </g>
          {names.map(({ name, at }) => (
            <text
              key={name}
              x={at.x}
              y={at.y + FONT * 0.35}
              fontSize={FONT}
              textAnchor="middle"
              fill="#000"
              stroke="none"
            >
              {name}
            </text>
          ))}
        </g>
      </svg>
      <figcaption className="text-[7.5pt]">
        Full line: top edge.{' '}
        {bottom
          ? bottom.depth < content.plate.thickness
            ? `Dashed: contour at ${depth} depth, above the first event; there is no sound bottom edge.`
            : 'Dashed: bottom edge.'
          : 'No contour below the top is sound.'}
        {unnamed > 0 &&
          ` ${unnamed} of ${rows.length} edges have no room for their name here; numbers run on round each loop.`}
      </figcaption>
    </figure>
  )
}

interface Picture {
  /** Paper mm for a part mm. */
  readonly scale: number
  readonly scaleText: string
  readonly height: number
  readonly origin: Point
  readonly toPaper: (point: Point) => Point
}

/** The largest standard scale at which the loops fit between the margins. */
function fit(loops: readonly VertexLoop[]): Picture {
  const bounds = boundsOf(loops.flatMap((loop) => [...loopFromVertices(loop)]))
  const across = Math.max(bounds.maxX - bounds.minX, Number.MIN_VALUE)
  const away = Math.max(bounds.maxY - bounds.minY, Number.MIN_VALUE)
  const largest = Math.min((WIDTH - 2 * RIM) / across, (HEIGHT - 2 * RIM) / away)
  const standard = standardScaleWithin(largest)
  const scale = standard?.ratio ?? largest
  const height = away * scale + 2 * RIM
  const origin = {
    x: (WIDTH - across * scale) / 2 - bounds.minX * scale,
    y: RIM + bounds.maxY * scale,
  }
  return {
    scale,
    scaleText: standard?.text ?? 'not to a standard scale',
    height,
    origin,
    toPaper: ({ x, y }) => ({ x: origin.x + x * scale, y: origin.y - y * scale }),
  }
}
