import { areaByDepth } from '../contours/area.ts'
import { frameOf } from '../contours/frame.ts'
import { levelsOf } from '../walls/levels.ts'
import { soundRange } from '../events/range.ts'
import type { Body } from '../walls/types.ts'

/**
 * Relative error at which the integral over depth stops being refined, for bodies in which an arc meets a
 * neighbour at an angle: a thousand roundings of the area itself, so that asking for more would chase noise.
 */
const VOLUME_TOLERANCE = 1e-13

/** Halvings at most of one band; 2^-30 of a plate is below an atom. */
const DEEPEST = 30

/**
 * Volume, mm³; null when an event lies within the plate. Between two levels the area is quadratic in depth
 * for lines and tangent arcs, blended ones too as their corners and radii go evenly, so that the prismatoid rule is
 * exact; otherwise Gauss's rule is refined.
 */
export function volumeOf(body: Body): number | null {
  const { from, to, empty } = soundRange(body)
  if (empty || from > 0 || to < body.thickness) return null
  const area = areaByDepth(body)
  const levels = levelsOf(body)
  const smooth = frameOf(body).branches.size === 0
  let volume = 0
  for (let i = 1; i < levels.length; i++) {
    const a = levels[i - 1]!
    const b = levels[i]!
    volume += smooth
      ? ((b - a) / 6) * (area(a) + 4 * area((a + b) / 2) + area(b))
      : integrate(area, a, b, gauss(area, a, b), DEEPEST)
  }
  return volume
}

function integrate(f: (x: number) => number, a: number, b: number, whole: number, depth: number): number {
  const m = (a + b) / 2
  const left = gauss(f, a, m)
  const right = gauss(f, m, b)
  const halves = left + right
  if (depth === 0 || Math.abs(halves - whole) <= VOLUME_TOLERANCE * Math.abs(halves)) return halves
  return integrate(f, a, m, left, depth - 1) + integrate(f, m, b, right, depth - 1)
}

/** Gauss–Legendre rule of seven points (Abramowitz and Stegun, table 25.4; exact to degree 13). */
const GAUSS_POINTS: readonly (readonly [place: number, weight: number])[] = [
  [0, 0.417959183673469],
  [0.4058451513773972, 0.3818300505051189],
  [0.7415311855993945, 0.2797053914892766],
  [0.9491079123427585, 0.1294849661688697],
]

function gauss(f: (x: number) => number, a: number, b: number): number {
  const m = (a + b) / 2
  const h = (b - a) / 2
  let sum = 0
  for (const [x, w] of GAUSS_POINTS) sum += x === 0 ? w * f(m) : w * (f(m - h * x) + f(m + h * x))
  return sum * h
}
