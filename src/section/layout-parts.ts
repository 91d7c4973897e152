import { PX_PER_MM, standardScaleWithin } from './scales.ts'
import { stackLabels } from './stack.ts'
import type { Box, Hairline, LayoutOptions, PlacedLabel, Px, Size } from './layout-types.ts'
import type { SectionDimension } from './types.ts'

/** Pieces that both layouts are put together from. Pixels. */

/** Clear room between labels, and between a label and a line. */
export const GAP = 6
/** From the wall to the line of a depth dimension. */
export const OFFSET = 16
/** From the line of a depth dimension to its label. */
export const LEADER = 12
/** Least that is drawn of a plate beyond its wall. */
export const PLATE_STUB = 36

export function labelled(
  dimensions: readonly SectionDimension[],
  kind: SectionDimension['kind'],
): SectionDimension[] {
  return dimensions.filter((dimension) => dimension.kind === kind)
}

export function widest(sizes: readonly Size[]): number {
  return Math.max(0, ...sizes.map((size) => size.width))
}

/** Pixels per millimetre: what fits, or the largest standard scale within it. */
export function chooseScale(
  fitting: number,
  { standardScale }: LayoutOptions,
): { readonly scale: number; readonly scaleText: string | null } {
  const standard = standardScale ? standardScaleWithin(fitting / PX_PER_MM) : undefined
  return { scale: standard ? standard.ratio * PX_PER_MM : fitting, scaleText: standard?.text ?? null }
}

/** A label's box round a centre, moved as little as needed to stay between two x. */
export function boxAt(
  dimension: SectionDimension,
  size: Size,
  centre: Px,
  from: number,
  to: number,
): PlacedLabel {
  const x = Math.max(from, Math.min(centre.x - size.width / 2, to - size.width))
  return { dimension, align: 'centre', acrossFace: false, x, y: centre.y - size.height / 2, ...size }
}

export interface Ladder {
  readonly labels: readonly PlacedLabel[]
  readonly hairlines: readonly Hairline[]
  /** Lowest y that is used. */
  readonly bottom: number
}

/**
 * Depth dimensions one under another: a line with a tick per level, and a label for each interval beside it.
 * `side` is where the labels stand as seen from the line.
 */
export function ladder(
  dimensions: readonly SectionDimension[],
  sizes: readonly Size[],
  place: {
    readonly lineX: number
    readonly side: 'left' | 'right'
    readonly y: (depth: number) => number
    readonly from: number
    readonly to: number
    /** x that the witness line of a level starts at. */
    readonly witnessX: (depth: number) => number
  },
): Ladder {
  const { lineX, side, y, witnessX } = place
  const direction = side === 'right' ? 1 : -1
  const intervals = dimensions.map(({ from, to }) => ({ top: y(from.depth), bottom: y(to.depth) }))
  const centres = stackLabels(
    intervals.map(({ top, bottom }, i) => ({ centre: (top + bottom) / 2, size: sizes[i]!.height })),
    GAP,
    place.from,
    place.to,
  )
  const levels = [...new Set(dimensions.flatMap(({ from, to }) => [from.depth, to.depth]))]
  const witnesses = levels.map((depth): Hairline => ({
    kind: 'witness',
    points: [
      { x: witnessX(depth) + direction * 3, y: y(depth) },
      { x: lineX + direction * 4, y: y(depth) },
    ],
  }))
  const lines = intervals.flatMap(({ top, bottom }, i): Hairline[] => [
    {
      kind: 'dimension',
      points: [
        { x: lineX, y: top },
        { x: lineX, y: bottom },
      ],
      arrows: 'out',
    },
    {
      kind: 'leader',
      points: [
        { x: lineX, y: (top + bottom) / 2 },
        { x: lineX + direction * (LEADER - 2), y: centres[i]! },
      ],
    },
  ])
  const labels = dimensions.map((dimension, i): PlacedLabel => {
    const size = sizes[i]!
    const near = lineX + direction * LEADER
    return {
      dimension,
      align: side === 'right' ? 'start' : 'end',
      acrossFace: false,
      x: side === 'right' ? near : near - size.width,
      y: centres[i]! - size.height / 2,
      ...size,
    }
  })
  return { labels, hairlines: [...witnesses, ...lines], bottom: lowest(labels) }
}

export function lowest(boxes: readonly Box[]): number {
  return Math.max(0, ...boxes.map((box) => box.y + box.height))
}

/** ISO 128 break line: straight with one zigzag in the middle. */
export function breakLine(x: number, top: number, bottom: number): Px[] {
  const middle = (top + bottom) / 2
  const size = Math.min(6, (bottom - top) / 6)
  return [
    { x, y: top - size },
    { x, y: middle - size },
    { x: x - size, y: middle - size / 3 },
    { x: x + size, y: middle + size / 3 },
    { x, y: middle + size },
    { x, y: bottom + size },
  ]
}

/**
 * A dimension across: witness lines down from two points, the line between, arrows in or out. A witness line
 * stops short of a label in its way and goes on behind it.
 */
export function across(a: Px, b: Px, lineY: number, inTheWay: readonly Box[]): Hairline[] {
  const [left, right] = a.x <= b.x ? [a, b] : [b, a]
  // Arrow heads of 5 px need four of themselves between the lines; else they come from outside.
  const room = right.x - left.x >= 20
  const reach = room ? 0 : 12
  return [
    ...witnessDown(left, lineY + 4, inTheWay),
    ...witnessDown(right, lineY + 4, inTheWay),
    {
      kind: 'dimension',
      points: room
        ? [
            { x: left.x, y: lineY },
            { x: right.x, y: lineY },
          ]
        : [
            { x: left.x - reach, y: lineY },
            { x: left.x, y: lineY },
            { x: right.x, y: lineY },
            { x: right.x + reach, y: lineY },
          ],
      arrows: room ? 'out' : 'in',
    },
  ]
}

function witnessDown({ x, y }: Px, end: number, inTheWay: readonly Box[]): Hairline[] {
  const hidden = inTheWay
    .filter((box) => box.x <= x && x <= box.x + box.width && box.y < end && box.y + box.height > y)
    .sort((a, b) => a.y - b.y)
  const runs: (readonly [number, number])[] = []
  let from = y + 3
  for (const box of hidden) {
    if (box.y > from) runs.push([from, box.y])
    from = Math.max(from, box.y + box.height)
  }
  runs.push([from, end])
  return runs.map(([top, bottom]) => ({
    kind: 'witness',
    points: [
      { x, y: top },
      { x, y: bottom },
    ],
  }))
}
