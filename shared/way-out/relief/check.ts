import { pointAt } from '../../geometry/segment.ts'
import type { Point, Segment } from '../../geometry/types.ts'
import type { Body } from '../../walls/types.ts'
import { boundOf, mostOutward } from '../check.ts'
import { TOUCH } from '../nearest.ts'
import type { ReliefPlan, ReliefSizes } from './types.ts'

/** Checker of relief cuts, from the drawing, the walls and the lines alone; nothing of the search is used. */

export type ReliefProblemCode =
  /** A block leans into a facet that it touches. */
  | 'enters-wall'
  /** A block leans into a neighbour that is still there when it leaves. */
  | 'enters-neighbour'
  /** A block goes further sideways than the moat is wide. */
  | 'too-far'
  /** Blocks and lines do not match, or the order is not 0, 1, 2… */
  | 'told-wrongly'

export interface ReliefProblem {
  readonly code: ReliefProblemCode
  readonly block: number | null
}

/** What is wrong with a plan; empty when it is sound. `room`: how far blocks may go sideways, mm. */
export function reliefProblems(
  body: Body,
  plan: ReliefPlan,
  sizes: ReliefSizes,
  room: number,
): ReliefProblem[] {
  const { lines, blocks, loop } = plan
  const orders = blocks.map((block) => block.order).sort((a, b) => a - b)
  if (blocks.length !== Math.max(1, lines.length) || orders.some((order, i) => order !== i)) {
    return [{ code: 'told-wrongly', block: null }]
  }
  const problems: ReliefProblem[] = []
  for (const [b, { direction, order }] of blocks.entries()) {
    const rise = direction.z > 0 ? 1 : -1
    const slope = { x: direction.x / Math.abs(direction.z), y: direction.y / Math.abs(direction.z) }
    const back = { x: -slope.x, y: -slope.y }
    // Seen from a block a wall's normal and tilt are turned round, for the outer loop as for a hole (1).
    const enters = touched(body, plan, b).some(({ edge, segment }) =>
      body.walls[loop]![edge]!.facets.some(
        (facet) => mostOutward(segment, back) > boundOf(body, sizes.kerf, facet, 1, rise) + TOUCH,
      ),
    )
    if (enters) problems.push({ code: 'enters-wall', block: b })
    if (Math.hypot(slope.x, slope.y) * body.thickness > room * (1 + TOUCH))
      problems.push({ code: 'too-far', block: b })
    const n = blocks.length
    const still = (other: number) => n > 1 && blocks[other]!.order > order
    const faces = [
      still((b + n - 1) % n) ? faceOf(plan, b, 1) : null,
      still((b + 1) % n) ? faceOf(plan, (b + 1) % n, -1) : null,
    ]
    const faceRoom = sizes.kerf / body.thickness + TOUCH
    if (faces.some((face) => face && face.x * slope.x + face.y * slope.y > faceRoom)) {
      problems.push({ code: 'enters-neighbour', block: b })
    }
  }
  return problems
}

/** Normal of a line's face: to the right of the line (1) for the block after it, to the left (−1) for the one before. */
function faceOf({ lines }: ReliefPlan, line: number, side: 1 | -1): Point {
  const { from, to } = lines[line]!
  const length = Math.hypot(to.x - from.x, to.y - from.y)
  return { x: (side * (to.y - from.y)) / length, y: (side * (from.x - to.x)) / length }
}

/** The pieces of edges between a block's two lines, in the loop's direction. */
function touched({ loops }: Body, { loop, lines }: ReliefPlan, block: number) {
  const edges = loops[loop]!
  const out: { edge: number; segment: Segment }[] = []
  const first = lines[block]
  if (!first) return edges.map((segment, edge) => ({ edge, segment }))
  const last = lines[(block + 1) % lines.length]!
  let { edge, fraction } = first
  for (let k = 0; k <= edges.length; k++) {
    const ends = edge === last.edge && (last.fraction > fraction || (k > 0 && last.fraction >= 0))
    const to = ends ? last.fraction : 1
    if (to > fraction) out.push({ edge, segment: partOf(edges[edge]!, fraction, to) })
    if (ends) break
    edge = (edge + 1) % edges.length
    fraction = 0
  }
  return out
}

function partOf(segment: Segment, from: number, to: number): Segment {
  const ends = { from: pointAt(segment, from), to: pointAt(segment, to) }
  return segment.kind === 'line'
    ? { kind: 'line', ...ends }
    : { ...segment, ...ends, sweep: segment.sweep * (to - from) }
}
