import { frameOf } from '../contours/frame.ts'
import type { Bounds } from '../geometry/types.ts'
import type { Jet, Passes } from '../passes/types.ts'
import type { Body } from '../walls/types.ts'
import { fillOffsets, makeEdgeEnds } from '../walls/wall-table.ts'
import { kerfOffsets, putContour } from './contour-spots.ts'
import { putJet } from './jet-spots.ts'
import { furthestOutside, outerHull, type Hull } from './outer-hull.ts'
import { makeSpots, putSpot, type Spots } from './spots.ts'

/** How far something stands outside a box on each of its sides, mm; negative where it keeps inside. */
export interface SideReach {
  readonly left: number
  readonly right: number
  /** Toward the person (−Y) and away (+Y). */
  readonly near: number
  readonly far: number
}

export interface LoopSpacing {
  readonly loop: number
  /** Of all that cuts the loop, at any depth; and how far that is outside the box of the loop's own top outline. */
  readonly box: Bounds
  readonly reach: SideReach
}

/** What must be kept free round a part, seen from above, at whatever depth: part, kerf, leads and turns. */
export interface SpacingEnvelope {
  /** Convex; nothing stands outside it. */
  readonly hull: Hull
  /** Nowhere does the hull stand further out than jet, nozzle and outline ask for by more than this, mm (with passes). */
  readonly slack: number
  readonly box: Bounds
  /** Of the part's outline at the top face. */
  readonly outline: Bounds
  readonly reach: SideReach
  /** The furthest that the hull stands outside the hull of the part's top outline, mm. */
  readonly furthest: number
  /** Empty without passes. */
  readonly loops: readonly LoopSpacing[]
}

/** How far chords may be padded out past a round move, mm: a tenth of the gap that a nest leaves at the least (1 mm, our own choice). */
export const CHORD_TOLERANCE = 0.02
/** Polygon excess aimed at, mm, and the most sides that it may cost. */
const HULL_TOLERANCE = 0.02
const FEWEST_SIDES = 16
const MOST_SIDES = 64

/**
 * The space that a part takes: jet axis and half-width along the passes from the top face to `below` mm under the
 * plate, with the nozzle's tip where the jet tells its stand-off (and diameter). Without passes, or for an outer loop
 * that has none, a first figure stands in: every wall's kerf, prolonged both ways and mitred, without leads or run-outs.
 * Near-linear in stations.
 */
export function spacingEnvelope(body: Body, passes: Passes | null, jet: Jet, below: number): SpacingEnvelope {
  const frame = frameOf(body)
  const deepest = body.thickness + below
  const spots = makeSpots(4 * (passes?.path.count ?? frame.count) + 64)
  const outline = makeSpots(frame.count + 16)
  const offsets = makeEdgeEnds(frame.table)
  fillOffsets(frame.table, 0, offsets)
  putContour(outline, frame, offsets, CHORD_TOLERANCE)
  const outer = makeSpots(16)
  putContour(outer, frame, offsets, CHORD_TOLERANCE, true)
  let wider = 0
  if (passes) {
    for (const pass of passes.passes)
      wider = Math.max(wider, putJet(spots, passes.path, pass, jet, deepest, CHORD_TOLERANCE))
  }
  const jets = spots.count
  for (let i = 0; i < outer.count; i++) putSpot(spots, 0, outer.x[i]!, outer.y[i]!, 0, 0, 0, outer.pad[i]!)
  if (!passes?.passes.some(({ loop }) => loop === 0)) {
    for (const depth of [0, deepest])
      putContour(spots, frame, kerfOffsets(frame, jet, depth, deepest), CHORD_TOLERANCE, true)
  }
  const sides = sidesFor(spots)
  const hull = outerHull(spots, sides)
  const box = boxOf(spots, 0, spots.count)
  const outlineBox = boxOf(outer, 0, outer.count)
  return {
    hull,
    slack: flattest(spots) * excess(sides) + greatest(spots.pad, spots.count) + wider,
    box,
    outline: outlineBox,
    reach: reachBeyond(box, outlineBox),
    furthest: furthestOutside(hull, outerHull(outer, FEWEST_SIDES)),
    loops: passes ? loopsOf(spots, jets, outline) : [],
  }
}

function loopsOf(spots: Spots, jets: number, outline: Spots): LoopSpacing[] {
  const loops: LoopSpacing[] = []
  // Spots of a loop stand together; a loop of several passes comes more than once.
  const boxes = new Map<number, Bounds>()
  for (let from = 0, to = 0; from < jets; from = to) {
    const loop = spots.loop[from]!
    while (to < jets && spots.loop[to] === loop) to++
    const box = boxOf(spots, from, to)
    const other = boxes.get(loop)
    boxes.set(loop, other ? joined(box, other) : box)
  }
  const starts = new Map<number, number>()
  for (let i = outline.count - 1; i >= 0; i--) starts.set(outline.loop[i]!, i)
  for (const [loop, box] of boxes) {
    const from = starts.get(loop)
    if (from === undefined) continue
    let to = from
    while (to < outline.count && outline.loop[to] === loop) to++
    loops.push({ loop, box, reach: reachBeyond(box, boxOf(outline, from, to)) })
  }
  return loops
}

/** Radius of curvature of a spot's flattest side: width × (1 + slope²). */
function flattest({ count, width, p, q }: Spots): number {
  let most = 0
  for (let i = 0; i < count; i++) most = Math.max(most, width[i]! * (1 + p[i]! ** 2 + q[i]! ** 2))
  return most
}

function sidesFor(spots: Spots): number {
  const radius = flattest(spots)
  let sides = FEWEST_SIDES
  while (sides < MOST_SIDES && radius * excess(sides) > HULL_TOLERANCE) sides *= 2
  return sides
}

/** How far a polygon's corner stands outside its circle, as a share of the radius. */
function excess(sides: number): number {
  return 1 / Math.cos(Math.PI / sides) - 1
}

function greatest(values: Float64Array, count: number): number {
  let most = 0
  for (let i = 0; i < count; i++) most = Math.max(most, values[i]!)
  return most
}

function boxOf(spots: Spots, from: number, to: number): Bounds {
  const { x, y, width, p, q, pad } = spots
  const box = { minX: Infinity, minY: Infinity, maxX: -Infinity, maxY: -Infinity }
  for (let i = from; i < to; i++) {
    const along = width[i]! * Math.sqrt(1 + p[i]! ** 2) + pad[i]!
    const away = width[i]! * Math.sqrt(1 + q[i]! ** 2) + pad[i]!
    box.minX = Math.min(box.minX, x[i]! - along)
    box.maxX = Math.max(box.maxX, x[i]! + along)
    box.minY = Math.min(box.minY, y[i]! - away)
    box.maxY = Math.max(box.maxY, y[i]! + away)
  }
  return box
}

function joined(a: Bounds, b: Bounds): Bounds {
  return {
    minX: Math.min(a.minX, b.minX),
    minY: Math.min(a.minY, b.minY),
    maxX: Math.max(a.maxX, b.maxX),
    maxY: Math.max(a.maxY, b.maxY),
  }
}

function reachBeyond(box: Bounds, of: Bounds): SideReach {
  return {
    left: of.minX - box.minX,
    right: box.maxX - of.maxX,
    near: of.minY - box.minY,
    far: box.maxY - of.maxY,
  }
}
