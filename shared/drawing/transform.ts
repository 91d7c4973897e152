import type { Point } from '../geometry/types.ts'

/** An affine map: x′ = ax + cy + e, y′ = bx + dy + f. */
export interface Transform {
  readonly a: number
  readonly b: number
  readonly c: number
  readonly d: number
  readonly e: number
  readonly f: number
}

export const MIRROR_X: Transform = { a: -1, b: 0, c: 0, d: 1, e: 0, f: 0 }

export function scaling(x: number, y: number): Transform {
  return { a: x, b: 0, c: 0, d: y, e: 0, f: 0 }
}

export function moving(by: Point): Transform {
  return { a: 1, b: 0, c: 0, d: 1, e: by.x, f: by.y }
}

/** Counter-clockwise; quarter turns are exact. */
export function turning(angle: number): Transform {
  const quarters = angle / (Math.PI / 2)
  const [cos, sin] = Number.isInteger(quarters)
    ? ([
        [1, 0],
        [0, 1],
        [-1, 0],
        [0, -1],
      ][((quarters % 4) + 4) % 4] ?? [1, 0])
    : [Math.cos(angle), Math.sin(angle)]
  return { a: cos ?? 1, b: sin ?? 0, c: -(sin ?? 0), d: cos ?? 1, e: 0, f: 0 }
}

/** The map that applies the last one first. */
export function compose(...maps: readonly Transform[]): Transform {
  return maps.reduce((outer, inner) => ({
    a: outer.a * inner.a + outer.c * inner.b,
    b: outer.b * inner.a + outer.d * inner.b,
    c: outer.a * inner.c + outer.c * inner.d,
    d: outer.b * inner.c + outer.d * inner.d,
    e: outer.a * inner.e + outer.c * inner.f + outer.e,
    f: outer.b * inner.e + outer.d * inner.f + outer.f,
  }))
}

export function mapPoint(map: Transform, { x, y }: Point): Point {
  return { x: map.a * x + map.c * y + map.e, y: map.b * x + map.d * y + map.f }
}

/** Maps a difference of points. */
export function mapVector(map: Transform, { x, y }: Point): Point {
  return { x: map.a * x + map.c * y, y: map.b * x + map.d * y }
}

export function determinant({ a, b, c, d }: Transform): number {
  return a * d - b * c
}

/** Relative slack under which two axes count as equally long and square; rotations leave a few 1e-16. */
const SQUARE_SLACK = 1e-9

/** True for conjugate radii of a circle: equally long and square to each other. */
export function areCircular(u: Point, v: Point): boolean {
  const [uu, vv] = [u.x * u.x + u.y * u.y, v.x * v.x + v.y * v.y]
  const slack = SQUARE_SLACK * Math.max(uu, vv)
  return Math.abs(uu - vv) <= slack && Math.abs(u.x * v.x + u.y * v.y) <= slack
}
