import { radians } from '../../shared/units/angle.ts'
import { isRootFace } from './dimensions.ts'
import { outlineOf } from './outline.ts'
import {
  GAP,
  LEADER,
  OFFSET,
  PLATE_STUB,
  across,
  boxAt,
  breakLine,
  chooseScale,
  labelled,
  ladder,
  lowest,
  widest,
} from './layout-parts.ts'
import type { Arc, Hairline, LayoutOptions, PlacedLabel, Px, SectionLayout } from './layout-types.ts'
import type { SectionPoint } from '../../shared/joint/section.ts'
import type { SectionDimension, SectionSpec } from './types.ts'

/** How far above (or below) the face the extended lines of an angle go; steep ones stop at `ARM_MAX`. */
const ARM_RISE = 26
const ARM_MAX = 64
const ARC_RADIUS = 20

/** One plate, its wall on the right, with the dimensions of a prep. */
export function layoutPlate(
  spec: SectionSpec,
  dimensions: readonly SectionDimension[],
  options: LayoutOptions,
): SectionLayout {
  const { thickness, facets } = spec
  const size = options.labelSize
  const wall = outlineOf(spec).left
  const left = Math.min(...wall.map((point) => point.x))
  const right = Math.max(...wall.map((point) => point.x))

  const angles = labelled(dimensions, 'angle')
  const top = angles.find((dimension) => dimension.facet === 0)
  const bottom = angles.find((dimension) => dimension.facet === facets.length - 1 && dimension.facet !== 0)
  const between = angles.filter((dimension) => dimension !== top && dimension !== bottom)
  const depths = labelled(dimensions, 'facet-depth')
  const whole = labelled(dimensions, 'thickness')
  const offset = labelled(dimensions, 'bottom-offset')
  // With one facet its depth is the thickness, so that stands in the column; else inside the plate.
  const column = inReadingOrder(depths.length > 0 ? [...depths, ...between] : whole)
  const inside = depths.length > 0 ? whole : []

  const columnWidth = OFFSET + LEADER + widest(column.map(size)) + 2
  const insideWidth = inside.length > 0 ? widest(inside.map(size)) + LEADER + 2 * GAP : 0
  const stub = Math.max(PLATE_STUB, insideWidth)
  const room = Math.max(24, options.width - columnWidth - stub)
  const { scale, scaleText } = chooseScale(
    Math.min(options.plateHeight / thickness, right > left ? room / (right - left) : Infinity),
    options,
  )
  const topBand = ARM_RISE + GAP + (top ? size(top).height : 0)
  // What the drawing does not need is left free on both sides.
  const needed = (inside.length > 0 ? stub : stub * 2) + (right - left) * scale + columnWidth
  const edge = Math.max(0, options.width - needed) / 2
  const columnX = options.width - columnWidth - edge
  const px = (point: SectionPoint): Px => ({
    x: columnX - (right - point.x) * scale,
    y: topBand + point.depth * scale,
  })
  const placed = wall.map(px)
  const faceTop = topBand
  const faceBottom = topBand + thickness * scale

  const hairlines: Hairline[] = []
  const arcs: Arc[] = []
  const labels: PlacedLabel[] = []

  // The vertical through the top edge, dash-dot, from above the plate to below it.
  hairlines.push({
    kind: 'axis',
    points: [
      { x: placed[0]!.x, y: faceTop - ARM_RISE },
      { x: placed[0]!.x, y: faceBottom + GAP },
    ],
  })

  if (top) {
    const drawn = angleAt(placed[0]!, top.value, -1)
    if (drawn) {
      hairlines.push(...drawn.lines)
      arcs.push(drawn.arc)
    }
    const centre = { x: drawn?.end.x ?? placed[0]!.x, y: size(top).height / 2 }
    labels.push(boxAt(top, size(top), centre, 0, columnX))
  }

  let below = Math.max(faceBottom, faceTop + tallest(inside.map(size)))
  if (bottom) {
    const from = placed.at(-1)!
    const drawn = angleAt(from, bottom.value, 1)
    if (drawn) {
      hairlines.push(...drawn.lines, {
        kind: 'axis',
        points: [from, { x: from.x, y: from.y + ARM_RISE }],
      })
      arcs.push(drawn.arc)
    }
    below += ARM_RISE + GAP
    const centre = { x: drawn?.end.x ?? from.x, y: below + size(bottom).height / 2 }
    labels.push(boxAt(bottom, size(bottom), centre, 0, columnX))
    below += size(bottom).height
  }

  for (const dimension of offset) {
    const from = px(dimension.from)
    const to = px(dimension.to)
    const lineY = below + 14
    if (Math.abs(to.x - from.x) > 0) hairlines.push(...across(from, to, lineY, labels))
    const box = size(dimension)
    below = lineY + GAP
    labels.push(boxAt(dimension, box, { x: (from.x + to.x) / 2, y: below + box.height / 2 }, 0, columnX))
    below += box.height
  }

  const rungs = ladder(column, column.map(size), {
    lineX: columnX + OFFSET,
    side: 'right',
    y: (depth) => topBand + depth * scale,
    from: 0,
    to: below,
    witnessX: (depth) => wallX(placed, topBand + depth * scale),
  })
  const insideRungs = ladder(inside, inside.map(size), {
    lineX: edge + GAP + widest(inside.map(size)) + LEADER,
    side: 'left',
    y: (depth) => topBand + depth * scale,
    from: faceTop,
    to: Math.max(faceBottom, faceTop + tallest(inside.map(size))),
    witnessX: () => edge + GAP + widest(inside.map(size)) + LEADER,
  })
  labels.push(...rungs.labels, ...insideRungs.labels)
  hairlines.push(...rungs.hairlines, ...insideRungs.hairlines)

  const start = { x: edge, y: faceTop }
  const end = { x: edge, y: faceBottom }
  return {
    width: options.width,
    height: Math.max(below, lowest(labels), faceBottom + GAP) + 2,
    scale,
    scaleText,
    plates: [[start, ...placed, end]],
    faces: [
      [start, placed[0]!],
      [end, placed.at(-1)!],
    ],
    breaks: [breakLine(edge === 0 ? 1 : edge, faceTop, faceBottom)],
    facets: facets.map(({ tilt }, facet) => ({
      plate: 'left',
      facet,
      tilt,
      rootFace: isRootFace(facets, facet),
      from: placed[facet]!,
      to: placed[facet + 1]!,
    })),
    hairlines,
    arcs,
    labels,
  }
}

/** The vertical, the wall's line prolonged out of the plate, and the arc between; null when they coincide. */
function angleAt(
  at: Px,
  tilt: number,
  sense: -1 | 1,
): { readonly lines: Hairline[]; readonly arc: Arc; readonly end: Px } | null {
  if (tilt === 0) return null
  const beta = radians(tilt)
  const arm = Math.min(ARM_RISE / Math.cos(beta), ARM_MAX)
  // Down the wall runs (sin β, cos β); out of the top face that is reversed.
  const end = { x: at.x + sense * Math.sin(beta) * arm, y: at.y + sense * Math.cos(beta) * arm }
  const vertical = (sense * Math.PI) / 2
  return {
    lines: [{ kind: 'extension', points: [at, end] }],
    arc: { centre: at, radius: ARC_RADIUS, from: vertical, to: vertical - beta },
    end,
  }
}

function wallX(wall: readonly Px[], y: number): number {
  const at = wall.findIndex((point) => point.y >= y)
  if (at <= 0) return wall[Math.max(at, 0)]!.x
  const [a, b] = [wall[at - 1]!, wall[at]!]
  return a.x + ((y - a.y) / (b.y - a.y)) * (b.x - a.x)
}

function tallest(sizes: readonly { readonly height: number }[]): number {
  return Math.max(0, ...sizes.map((size) => size.height))
}

function inReadingOrder(dimensions: readonly SectionDimension[]): SectionDimension[] {
  const middle = ({ from, to }: SectionDimension) => from.depth + to.depth
  return [...dimensions].sort((a, b) => middle(a) - middle(b))
}
