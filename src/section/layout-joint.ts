import { radians } from '../../shared/units/angle.ts'
import { includedAngles, isRootFace } from './dimensions.ts'
import { mateFacets, outlineOf } from './outline.ts'
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

/** Below this width, px, the thickness is not dimensioned: a phone held upright. */
const NARROW = 430
/** Share of a groove's height that lies between its mouth and the arc of its angle. */
const ARC_BELOW_MOUTH = 0.15

/** Both plates with the gap between; depths stand inside the left plate, the thickness inside the right. */
export function layoutJoint(
  spec: SectionSpec,
  dimensions: readonly SectionDimension[],
  options: LayoutOptions,
): SectionLayout {
  const size = options.labelSize
  const other = mateFacets(spec)
  const { left, right } = outlineOf(spec) as { left: SectionPoint[]; right: SectionPoint[] }
  const depths = labelled(dimensions, 'facet-depth')
  // A narrow drawing keeps its room for the groove; the thickness is in the text alternative and the title block.
  const whole = options.width < NARROW ? [] : labelled(dimensions, 'thickness')
  const grooves = labelled(dimensions, 'included-angle')
  const above = grooves.filter((dimension) => dimension.from.depth === 0)
  const beneath = grooves.filter((dimension) => dimension.from.depth !== 0)
  const opening = labelled(dimensions, 'root-opening')

  const leftPad = Math.max(PLATE_STUB, depths.length > 0 ? sideWidth(depths.map(size)) : 0)
  const rightPad = Math.max(PLATE_STUB, whole.length > 0 ? sideWidth(whole.map(size)) : 0)
  const minX = Math.min(...left.map((point) => point.x))
  const maxX = Math.max(...right.map((point) => point.x))
  const room = Math.max(24, options.width - leftPad - rightPad)
  const { scale, scaleText } = chooseScale(
    Math.min(options.plateHeight / spec.thickness, maxX > minX ? room / (maxX - minX) : Infinity),
    options,
  )
  const spare = Math.max(0, room - (maxX - minX) * scale)
  const topBand = heightOf(above, size) + GAP
  const x0 = leftPad + spare / 2 - minX * scale
  const px = (point: SectionPoint): Px => ({ x: x0 + point.x * scale, y: topBand + point.depth * scale })
  const leftPx = left.map(px)
  const rightPx = right.map(px)
  const faceTop = topBand
  const faceBottom = topBand + spec.thickness * scale

  const labels: PlacedLabel[] = []
  const hairlines: Hairline[] = [
    { kind: 'groove', points: [leftPx[0]!, rightPx[0]!] },
    { kind: 'groove', points: [leftPx.at(-1)!, rightPx.at(-1)!] },
  ]
  const middle = (dimension: SectionDimension) => (px(dimension.from).x + px(dimension.to).x) / 2
  for (const dimension of above) {
    const box = size(dimension)
    labels.push(boxAt(dimension, box, { x: middle(dimension), y: box.height / 2 }, 0, options.width))
  }
  const y = (depth: number) => topBand + depth * scale
  const wallLeft = Math.min(...leftPx.map((point) => point.x))
  const wallRight = Math.max(...rightPx.map((point) => point.x))
  const leftLadder = ladder(depths, depths.map(size), {
    lineX: wallLeft - OFFSET,
    side: 'left',
    y,
    from: faceTop,
    to: faceBottom,
    witnessX: (depth) => nearestX(leftPx, y(depth)),
  })
  const rightLadder = ladder(whole, whole.map(size), {
    lineX: wallRight + OFFSET,
    side: 'right',
    y,
    from: faceTop,
    to: faceBottom,
    witnessX: (depth) => nearestX(rightPx, y(depth)),
  })
  labels.push(
    ...[...leftLadder.labels, ...rightLadder.labels].map((label) => ({
      ...label,
      acrossFace: label.y < faceBottom && label.y + label.height > faceBottom,
    })),
  )
  hairlines.push(...leftLadder.hairlines, ...rightLadder.hairlines)

  // Depths that need more room than the plate is thick push what stands below it further down.
  let below = Math.max(faceBottom, leftLadder.bottom, rightLadder.bottom)
  for (const dimension of beneath) {
    const box = size(dimension)
    below += GAP
    labels.push(boxAt(dimension, box, { x: middle(dimension), y: below + box.height / 2 }, 0, options.width))
    below += box.height
  }
  for (const dimension of opening) {
    const box = size(dimension)
    const lineY = below + 14
    hairlines.push(...across(px(dimension.from), px(dimension.to), lineY, labels))
    below = lineY + GAP
    labels.push(boxAt(dimension, box, { x: middle(dimension), y: below + box.height / 2 }, 0, options.width))
    below += box.height
  }

  const edges = [0, options.width] as const
  return {
    width: options.width,
    height: Math.max(below, lowest(labels)) + 2,
    scale,
    scaleText,
    plates: [
      [{ x: edges[0], y: faceTop }, ...leftPx, { x: edges[0], y: faceBottom }],
      [{ x: edges[1], y: faceTop }, ...rightPx, { x: edges[1], y: faceBottom }],
    ],
    faces: [
      [{ x: edges[0], y: faceTop }, leftPx[0]!],
      [{ x: edges[0], y: faceBottom }, leftPx.at(-1)!],
      [rightPx[0]!, { x: edges[1], y: faceTop }],
      [rightPx.at(-1)!, { x: edges[1], y: faceBottom }],
    ],
    breaks: [breakLine(1, faceTop, faceBottom), breakLine(options.width - 1, faceTop, faceBottom)],
    facets: [
      ...spec.facets.map(({ tilt }, facet) => ({
        plate: 'left' as const,
        facet,
        tilt,
        rootFace: isRootFace(spec.facets, facet),
        from: leftPx[facet]!,
        to: leftPx[facet + 1]!,
      })),
      ...other.map(({ tilt }, facet) => ({
        plate: 'right' as const,
        facet,
        tilt,
        rootFace: isRootFace(other, facet),
        from: rightPx[facet]!,
        to: rightPx[facet + 1]!,
      })),
    ],
    hairlines,
    arcs: includedAngles(spec).map(({ side }) => grooveArc(spec, { left, right }, side, px, scale)),
    labels,
  }
}

/** The arc between the two walls of a groove, about the point where their lines meet. */
function grooveArc(
  spec: SectionSpec,
  { left, right }: { readonly left: readonly SectionPoint[]; readonly right: readonly SectionPoint[] },
  side: 'top' | 'bottom',
  px: (point: SectionPoint) => Px,
  scale: number,
): Arc {
  const top = side === 'top'
  const facing = mateFacets(spec)
  const own = radians((top ? spec.facets[0] : spec.facets.at(-1))!.tilt)
  const other = radians((top ? facing[0] : facing.at(-1))!.tilt)
  const a = (top ? left[0] : left.at(-1))!
  const b = (top ? right[0] : right.at(-1))!
  // Left wall x = a.x + (d − a.depth)·tan β, right wall x = b.x − (d − b.depth)·tan β′: equal at the apex.
  const depth = a.depth + (b.x - a.x) / (Math.tan(own) + Math.tan(other))
  const apex = { x: a.x + (depth - a.depth) * Math.tan(own), depth }
  const radius = Math.abs(depth - a.depth) * (1 - ARC_BELOW_MOUTH) * scale
  const away = top ? -Math.PI / 2 : Math.PI / 2
  return { centre: px(apex), radius, from: away - own, to: away + other }
}

function nearestX(wall: readonly Px[], y: number): number {
  return wall.reduce((best, point) => (Math.abs(point.y - y) < Math.abs(best.y - y) ? point : best)).x
}

function sideWidth(sizes: readonly { readonly width: number; readonly height: number }[]): number {
  return widest(sizes) + OFFSET + LEADER + GAP
}

function heightOf(dimensions: readonly SectionDimension[], size: LayoutOptions['labelSize']): number {
  return Math.max(0, ...dimensions.map((dimension) => size(dimension).height))
}
