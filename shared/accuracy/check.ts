import { jetAt } from '../passes/jet-at.ts'
import { MoveKind, type Jet, type Passes } from '../passes/types.ts'
import type { SpacingEnvelope } from './spacing-envelope.ts'

export type EnvelopeFaultCode =
  /** The hull does not turn left at a corner. */
  | 'not-convex'
  /** Part of the jet stands outside the hull, by `value`. */
  | 'outside'
  /** Box and hull do not agree. */
  | 'box'
  /** The hull stands further out than its slack and the sampling explain, by `value`. */
  | 'too-far-out'

export interface EnvelopeFault {
  readonly code: EnvelopeFaultCode
  /** Station, or corner of the hull. */
  readonly at: number
  readonly value: number
}

/** How finely the jet is looked at: along a straight and a round move, down the depth, round its section. */
const [ALONG, ALONG_ROUND, DOWN, ROUND] = [4, 32, 3, 32]

/** Rounding of a tangents' crossing, as a share of the plate's size. */
const ROUNDING = 1e-9

/**
 * What is wrong with an envelope, by points on the side of the jet's true cone, all along. `sampling`: by how much the
 * samples may miss the furthest point of the jet, mm; the hull may be that much and its slack further out.
 */
export function envelopeFaults(
  envelope: SpacingEnvelope,
  { path, passes }: Passes,
  jet: Jet,
  deepest: number,
  sampling: number,
): EnvelopeFault[] {
  const faults: EnvelopeFault[] = []
  const { hull, box, outline } = envelope
  const n = hull.x.length
  const size = Math.max(...[box.minX, box.minY, box.maxX, box.maxY].map(Math.abs), 1)
  const side = (k: number) => {
    const m = (k + 1) % n
    const [ux, uy] = [hull.x[m]! - hull.x[k]!, hull.y[m]! - hull.y[k]!]
    const length = Math.hypot(ux, uy)
    return { nx: uy / length, ny: -ux / length }
  }
  const sides = Array.from({ length: n }, (_, k) => side(k))
  sides.forEach(({ nx, ny }, k) => {
    const next = sides[(k + 1) % n]!
    if (!(nx * next.ny - ny * next.nx > -ROUNDING)) faults.push({ code: 'not-convex', at: k, value: 0 })
  })
  // How far the samples come in the direction of every side.
  const reached = sides.map(() => -Infinity)
  const look = (x: number, y: number, station: number) => {
    sides.forEach(({ nx, ny }, k) => {
      const along = x * nx + y * ny
      if (along > reached[k]!) reached[k] = along
      const out = along - hull.x[k]! * nx - hull.y[k]! * ny
      if (out > ROUNDING * size) faults.push({ code: 'outside', at: station, value: out })
    })
  }
  for (const { first, last } of passes) {
    for (let i = first; i < last; i++) {
      if (path.move[i] === MoveKind.end) continue
      const steps = path.sweep[i] === 0 ? ALONG : ALONG_ROUND
      for (let a = 0; a <= steps; a++)
        for (let d = 0; d <= DOWN; d++)
          for (let r = 0; r < ROUND; r++) {
            const [x, y] = sidePoint(
              jet,
              jetAt(path, i, a / steps),
              (d / DOWN) * deepest,
              (2 * Math.PI * r) / ROUND,
            )
            look(x, y, i)
          }
    }
  }
  reached.forEach((along, k) => {
    const { nx, ny } = sides[k]!
    const spare = hull.x[k]! * nx + hull.y[k]! * ny - along - envelope.slack - sampling
    if (spare > 0) faults.push({ code: 'too-far-out', at: k, value: spare })
  })
  const near = (a: number, b: number) => Math.abs(a - b) <= envelope.slack + ROUNDING * size
  const agrees =
    near(Math.min(...hull.x), box.minX) &&
    near(Math.max(...hull.x), box.maxX) &&
    near(Math.min(...hull.y), box.minY) &&
    near(Math.max(...hull.y), box.maxY)
  if (!agrees || outline.minX < box.minX || outline.maxX > box.maxX)
    faults.push({ code: 'box', at: -1, value: 0 })
  return faults
}

/** Point on the jet's side, level with the axis at a depth, in a heading from it: where ρ = r − s·tan τ. */
function sidePoint(
  jet: Jet,
  { x, y, p, q }: { x: number; y: number; p: number; q: number },
  depth: number,
  heading: number,
): readonly [number, number] {
  const [ex, ey] = [Math.cos(heading), Math.sin(heading)]
  const length = Math.sqrt(1 + p * p + q * q)
  const tan = Math.tan(jet.taper)
  const across = Math.sqrt(1 + (ex * q - ey * p) ** 2) / length
  const along = (ex * p + ey * q) / length
  const far = Math.max(0, (jet.kerf / 2 - tan * depth * length) / (across + tan * along))
  return [x + depth * p + far * ex, y + depth * q + far * ey]
}
