import type { EvaluationRequest } from '../../shared/evaluate/schema.ts'
import type { Vertex } from '../../shared/geometry/types.ts'

/** The same part drawn another way: what must not change an answer but in its stated way. */
export interface Transform {
  readonly name: string
  /** Radians, about the origin. */
  readonly turn: number
  readonly mirror: boolean
  readonly scale: number
  /** Vertices told the other way round. */
  readonly reverse: boolean
}

const still: Transform = { name: 'as drawn', turn: 0, mirror: false, scale: 1, reverse: false }

/** Four turns, a mirror, two scales, and the other way round. */
export const transforms: readonly Transform[] = [
  ...[Math.PI / 2, 1, 2.5, 4.2].map((turn) => ({ ...still, name: `turned by ${turn.toFixed(2)}`, turn })),
  { ...still, name: 'mirrored', mirror: true },
  { ...still, name: 'an eighth of the size', scale: 0.125 },
  { ...still, name: 'three times the size', scale: 3 },
  { ...still, name: 'the other way round', reverse: true },
  { name: 'all at once', turn: 0.7, mirror: true, scale: 1.7, reverse: true },
]

/** Every length grows with the scale, the jet's too; angles stay. */
export function transformed(request: EvaluationRequest, transform: Transform): EvaluationRequest {
  const { scale, reverse } = transform
  const { jet } = request
  const length = (value: number | undefined) => (value === undefined ? {} : value * scale)
  const loops = request.loops.map((loop) => {
    const moved = loop.map((vertex) => movedVertex(vertex, transform))
    return reverse ? turnedRound(moved) : moved
  })
  return {
    ...request,
    plate: { thickness: request.plate.thickness * scale },
    loops,
    walls: request.walls.map(({ loop, edge, facets }) => ({
      loop,
      edge: reverse ? (request.loops[loop]?.length ?? 0) - 1 - edge : edge,
      facets: facets.map((facet) => ({
        ...facet,
        depth: facet.depth * scale,
        ...(reverse && facet.endTilt !== undefined ? { tilt: facet.endTilt, endTilt: facet.tilt } : {}),
      })),
    })),
    ...(jet && {
      jet: {
        ...jet,
        ...Object.fromEntries(
          (['kerf', 'standoff', 'nozzleDiameter'] as const).flatMap((key) =>
            jet[key] === undefined ? [] : [[key, length(jet[key])]],
          ),
        ),
      },
    }),
  }
}

/** Where an edge of the part as drawn is found after the transform. */
export function edgeAfter(edge: number, count: number, { reverse }: Transform): number {
  return reverse ? count - 1 - edge : edge
}

/** Where a corner is found: corner 0 of a loop told the other way round stays corner 0. */
export function cornerAfter(vertex: number, count: number, { reverse }: Transform): number {
  return reverse ? (count - vertex) % count : vertex
}

export function movedVertex({ x, y, bulge }: Vertex, { turn, mirror, scale }: Transform): Vertex {
  const my = mirror ? -y : y
  const [cos, sin] = [Math.cos(turn), Math.sin(turn)]
  const at = { x: scale * (cos * x - sin * my), y: scale * (sin * x + cos * my) }
  return bulge === undefined ? at : { ...at, bulge: mirror ? -bulge : bulge }
}

function turnedRound(loop: readonly Vertex[]): Vertex[] {
  const n = loop.length
  return loop.map((_, i) => {
    const { x, y } = loop[(n - i) % n]!
    const bulge = loop[(n - i - 1) % n]!.bulge
    return bulge === undefined ? { x, y } : { x, y, bulge: -bulge }
  })
}
