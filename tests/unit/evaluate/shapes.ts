import type { EvaluationRequest } from '../../../shared/evaluate/schema.ts'
import type { WallSpec } from '../../../shared/walls/schema.ts'
import type { Vertex } from '../../../shared/geometry/types.ts'

/** Plain shapes and requests for the tests. mm and degrees. */

export function rectangle(width: number, height: number, x = 0, y = 0): Vertex[] {
  return [
    { x, y },
    { x: x + width, y },
    { x: x + width, y: y + height },
    { x, y: y + height },
  ]
}

/** A regular polygon, counter-clockwise. */
export function polygon(sides: number, radius: number): Vertex[] {
  return Array.from({ length: sides }, (_, i) => {
    const angle = (2 * Math.PI * i) / sides
    return { x: radius * Math.cos(angle), y: radius * Math.sin(angle) }
  })
}

/** Two half circles, clockwise as a hole runs. */
export function circle(x: number, y: number, radius: number): Vertex[] {
  return [
    { x: x - radius, y, bulge: -1 },
    { x: x + radius, y, bulge: -1 },
  ]
}

/** An isosceles triangle whose top corner (vertex 2) has the given interior angle, degrees. */
export function wedge(angle: number, side = 200): Vertex[] {
  const half = (angle * Math.PI) / 360
  const [x, y] = [side * Math.sin(half), side * Math.cos(half)]
  return [
    { x: -x, y: -y },
    { x, y: -y },
    { x: 0, y: 0 },
  ]
}

export function tilted(tilts: readonly number[], thickness: number, loop = 0): WallSpec[] {
  return tilts.flatMap((tilt, edge) =>
    tilt === 0 ? [] : [{ loop, edge, facets: [{ depth: thickness, tilt }] }],
  )
}

export function plate(
  loops: readonly Vertex[][],
  walls: readonly WallSpec[],
  thickness = 10,
  more: Partial<EvaluationRequest> = {},
): EvaluationRequest {
  return { plate: { thickness }, loops: loops.map((loop) => [...loop]), walls: [...walls], ...more }
}

/** The same loop walked the other way, from the same first vertex: the caller's edge i becomes edge n − 1 − i. */
export function turned(loop: readonly Vertex[]): Vertex[] {
  const n = loop.length
  return loop.map((_, i) => {
    const vertex = loop[(n - i) % n]
    const edge = loop[n - 1 - i]
    if (!vertex || !edge) throw new Error('a loop has vertices')
    return edge.bulge ? { x: vertex.x, y: vertex.y, bulge: -edge.bulge } : { x: vertex.x, y: vertex.y }
  })
}
