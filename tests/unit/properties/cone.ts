import { MoveKind, type Jet, type JetPath } from '../../../shared/passes/types.ts'

/**
 * The jet as a solid cone in space, for the properties alone: axis and rulings as vectors (X right, Y away, z down
 * from the top face, mm), so that no formula is shared with the passes or their checkers.
 */

export type Vector = readonly [x: number, y: number, z: number]

export const dot = (a: Vector, b: Vector) => a[0] * b[0] + a[1] * b[1] + a[2] * b[2]

const along = (p: Vector, s: number, a: Vector): Vector => [p[0] + s * a[0], p[1] + s * a[1], p[2] + s * a[2]]

export interface Cone {
  /** Where the axis crosses the top face. */
  readonly at: Vector
  /** Unit vector down the axis. */
  readonly axis: Vector
  /** Half-width there, square to the axis, and how much it narrows per mm of axis. */
  readonly radius: number
  readonly narrows: number
}

/** The jet at a part (0 to 1) of the move from station i, by the words of `JetPath`. */
export function coneAt(path: JetPath, jet: Jet, i: number, part: number): Cone {
  const { x, y, p, q, sweep, cx, cy } = path
  const column = (values: Float64Array) => values[i]! * (1 - part) + values[i + 1]! * part
  let line = [column(x), column(y), column(p), column(q)] as const
  if (sweep[i] !== 0) {
    // Each end in polar form about the centre: distance, and the slope turned back by the end's heading.
    const polar = (k: number) => {
      const heading = Math.atan2(y[k]! - cy[i]!, x[k]! - cx[i]!)
      const distance = Math.hypot(x[k]! - cx[i]!, y[k]! - cy[i]!)
      const slope = turned(p[k]!, q[k]!, -heading)
      return { heading, distance, slope }
    }
    const [from, to] = [polar(i), polar(i + 1)]
    const even = (a: number, b: number) => a * (1 - part) + b * part
    const heading = from.heading + part * sweep[i]!
    const [rx, ry] = turned(even(from.distance, to.distance), 0, heading)
    const [sp, sq] = turned(even(from.slope[0], to.slope[0]), even(from.slope[1], to.slope[1]), heading)
    line = [cx[i]! + rx, cy[i]! + ry, sp, sq]
  }
  const length = Math.hypot(line[2], line[3], 1)
  return {
    at: [line[0], line[1], 0],
    axis: [line[2] / length, line[3] / length, 1 / length],
    radius: jet.kerf / 2,
    narrows: Math.tan(jet.taper),
  }
}

function turned(x: number, y: number, by: number): readonly [number, number] {
  return [x * Math.cos(by) - y * Math.sin(by), x * Math.sin(by) + y * Math.cos(by)]
}

/** The point at which the cone's ruling on the side `out` (a unit vector square to the axis) comes to a depth. */
export function rulingAt({ at, axis, radius, narrows }: Cone, out: Vector, depth: number): Vector {
  const start = along(at, radius, out)
  const way = along(axis, -narrows, out)
  return along(start, (depth - start[2]) / way[2], way)
}

/** Two unit vectors square to the axis and to each other. */
export function acrossAxis({ axis }: Cone): readonly [Vector, Vector] {
  const lean = Math.hypot(axis[0], axis[1])
  const first: Vector = lean > 0 ? [-axis[1] / lean, axis[0] / lean, 0] : [1, 0, 0]
  const second: Vector = [
    axis[1] * first[2] - axis[2] * first[1],
    axis[2] * first[0] - axis[0] * first[2],
    axis[0] * first[1] - axis[1] * first[0],
  ]
  return [first, second]
}

/** The unit vector square to the axis that goes the most against `normal`: the near side's. */
export function nearSide({ axis }: Cone, normal: Vector): Vector {
  const off = along(normal, -dot(normal, axis), axis)
  const size = Math.sqrt(dot(off, off))
  return [-off[0] / size, -off[1] / size, -off[2] / size]
}

/** How deep a point stands in the cone, square to its side, mm; negative outside. */
export function depthInCone({ at, axis, radius, narrows }: Cone, point: Vector): number {
  const from = along(point, -1, at)
  const s = dot(from, axis)
  const off = along(from, -s, axis)
  const half = radius - s * narrows
  if (half <= 0) return -Infinity
  return (half - Math.sqrt(dot(off, off))) / Math.hypot(1, narrows)
}

/** Axis length down to which the jet has a width, mm. */
export function lastsFor({ radius, narrows }: Cone): number {
  return narrows > 0 ? radius / narrows : Infinity
}

/** Every move of a path that goes somewhere. */
export function* movesOf(path: JetPath): Generator<number> {
  for (let i = 0; i < path.count - 1; i++) if (path.move[i] !== MoveKind.end) yield i
}
