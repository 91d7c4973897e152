import type { EdgeRef } from '../../../../shared/walls/types.ts'
import { endTangent, segmentLength, startTangent } from '../../../../shared/geometry/segment.ts'
import type { Loop, Point, Segment } from '../../../../shared/geometry/types.ts'

/** Ways to pick many edges from one. All answers are in the order of the profile. */

/** Two edges count as equally long within this, mm: a tenth of what a drawing prints. */
export const SAME_LENGTH_MM = 0.005

/** Two edges count as parallel, or as running smoothly on, within this: a tenth of the least angle shown. */
export const SAME_DIRECTION_RAD = (0.01 * Math.PI) / 180

export function allEdges(loops: readonly Loop[]): EdgeRef[] {
  return loops.flatMap((segments, loop) => segments.map((_, edge) => ({ loop, edge })))
}

export function sameEdge(a: EdgeRef, b: EdgeRef): boolean {
  return a.loop === b.loop && a.edge === b.edge
}

export function sameLoop(loops: readonly Loop[], seeds: readonly EdgeRef[]): EdgeRef[] {
  const wanted = new Set(seeds.map(({ loop }) => loop))
  return allEdges(loops).filter(({ loop }) => wanted.has(loop))
}

export function sameLength(loops: readonly Loop[], seeds: readonly EdgeRef[]): EdgeRef[] {
  const lengths = segmentsOf(loops, seeds).map(segmentLength)
  return allEdges(loops).filter((edge) => {
    const length = segmentLength(loops[edge.loop]![edge.edge]!)
    return lengths.some((wanted) => Math.abs(wanted - length) <= SAME_LENGTH_MM)
  })
}

/** Straight edges that run the same way or the opposite way as a seed. */
export function parallelTo(loops: readonly Loop[], seeds: readonly EdgeRef[]): EdgeRef[] {
  const directions = segmentsOf(loops, seeds)
    .filter(({ kind }) => kind === 'line')
    .map(startTangent)
  return allEdges(loops).filter((edge) => {
    const segment = loops[edge.loop]![edge.edge]!
    if (segment.kind !== 'line') return false
    return directions.some(
      (wanted) => Math.abs(turn(wanted, startTangent(segment), 'either way')) <= SAME_DIRECTION_RAD,
    )
  })
}

/** The run of edges that join a seed without a corner, both ways round. */
export function smoothChain(loops: readonly Loop[], seeds: readonly EdgeRef[]): EdgeRef[] {
  const chosen = new Set<string>()
  for (const { loop, edge } of seeds) {
    const segments = loops[loop]
    if (segments?.[edge] === undefined) continue
    const count = segments.length
    chosen.add(`${loop}-${edge}`)
    for (const step of [1, -1]) {
      for (let walked = 0, at = edge; walked < count - 1; walked += 1) {
        const next = (at + step + count) % count
        const [before, after] = step === 1 ? [at, next] : [next, at]
        if (!meetSmoothly(segments[before]!, segments[after]!)) break
        chosen.add(`${loop}-${next}`)
        at = next
      }
    }
  }
  return allEdges(loops).filter(({ loop, edge }) => chosen.has(`${loop}-${edge}`))
}

function meetSmoothly(before: Segment, after: Segment): boolean {
  return Math.abs(turn(endTangent(before), startTangent(after))) <= SAME_DIRECTION_RAD
}

/** Everything from one edge to another in profile order, both included. */
export function rangeBetween(loops: readonly Loop[], a: EdgeRef, b: EdgeRef): EdgeRef[] {
  const edges = allEdges(loops)
  const ends = [a, b].map((end) => edges.findIndex((edge) => sameEdge(edge, end)))
  if (ends.includes(-1)) return [b]
  return edges.slice(Math.min(...ends), Math.max(...ends) + 1)
}

/** The edge `step` places further on in profile order, round from the last to the first. */
export function stepEdge(loops: readonly Loop[], from: EdgeRef | null, step: number): EdgeRef | null {
  const edges = allEdges(loops)
  if (edges.length === 0) return null
  const at = from === null ? -1 : edges.findIndex((edge) => sameEdge(edge, from))
  const start = at === -1 ? (step > 0 ? -1 : 0) : at
  return edges[(start + step + edges.length) % edges.length]!
}

export function toggleEdge(selection: readonly EdgeRef[], edge: EdgeRef): EdgeRef[] {
  const rest = selection.filter((other) => !sameEdge(other, edge))
  return rest.length < selection.length ? rest : [...selection, edge]
}

function segmentsOf(loops: readonly Loop[], edges: readonly EdgeRef[]): Segment[] {
  return edges.flatMap(({ loop, edge }) => loops[loop]?.[edge] ?? [])
}

/** Angle from direction a to direction b, radians; `either way` takes opposite directions as the same. */
function turn(a: Point, b: Point, sense: 'as they run' | 'either way' = 'as they run'): number {
  const cross = a.x * b.y - a.y * b.x
  const dot = a.x * b.x + a.y * b.y
  return Math.atan2(cross, sense === 'either way' ? Math.abs(dot) : dot)
}
