import { arcBounds } from '../geometry/segment.ts'
import { MoveKind, type JetPath } from '../passes/types.ts'
import { halfWidthAt, sectionSpread, type JetCone, type JetLine } from './jet-cone.ts'

/** The jet along a move: u runs from 0 at station i to 1 at station i + 1. */

/** Slopes nearer than this are one, mm per mm: a metre of depth then parts by 1e-9 mm, rounding's own size. */
const SAME_SLOPE = 1e-12

export function hasMove(path: JetPath, i: number): boolean {
  return path.move[i] !== MoveKind.end && i + 1 < path.count
}

/** A straight move along which the jet does not turn: it sweeps a plane sheet. */
export function isSteady({ p, q, sweep }: JetPath, i: number): boolean {
  return (
    sweep[i] === 0 && Math.abs(p[i + 1]! - p[i]!) <= SAME_SLOPE && Math.abs(q[i + 1]! - q[i]!) <= SAME_SLOPE
  )
}

/** A round move in the frame that turns with it: distance from the centre, and slope along and across the radius, at both ends. */
export interface RoundMove {
  readonly cx: number
  readonly cy: number
  /** Heading of the start from the centre. */
  readonly heading: number
  readonly sweep: number
  readonly radius: readonly [number, number]
  readonly radial: readonly [number, number]
  readonly across: readonly [number, number]
}

export function roundMove({ x, y, p, q, sweep, cx, cy }: JetPath, i: number): RoundMove {
  const [rx, ry] = [x[i]! - cx[i]!, y[i]! - cy[i]!]
  const heading = Math.atan2(ry, rx)
  const [c0, s0] = [Math.cos(heading), Math.sin(heading)]
  const [c1, s1] = [Math.cos(heading + sweep[i]!), Math.sin(heading + sweep[i]!)]
  const [p0, q0, p1, q1] = [p[i]!, q[i]!, p[i + 1]!, q[i + 1]!]
  return {
    cx: cx[i]!,
    cy: cy[i]!,
    heading,
    sweep: sweep[i]!,
    radius: [Math.hypot(rx, ry), Math.hypot(x[i + 1]! - cx[i]!, y[i + 1]! - cy[i]!)],
    radial: [p0 * c0 + q0 * s0, p1 * c1 + q1 * s1],
    across: [q0 * c0 - p0 * s0, q1 * c1 - p1 * s1],
  }
}

/** Writes the jet line at u of move i. `round` is its round form, or null when it is straight. */
export function lineAt(path: JetPath, i: number, round: RoundMove | null, u: number, out: JetLine): void {
  if (round) {
    const heading = round.heading + u * round.sweep
    const [cos, sin] = [Math.cos(heading), Math.sin(heading)]
    const radius = between(round.radius, u)
    const radial = between(round.radial, u)
    const across = between(round.across, u)
    out.x = round.cx + radius * cos
    out.y = round.cy + radius * sin
    out.p = radial * cos - across * sin
    out.q = radial * sin + across * cos
    return
  }
  const { x, y, p, q } = path
  out.x = x[i]! + u * (x[i + 1]! - x[i]!)
  out.y = y[i]! + u * (y[i + 1]! - y[i]!)
  out.p = p[i]! + u * (p[i + 1]! - p[i]!)
  out.q = q[i]! + u * (q[i + 1]! - q[i]!)
}

function between([from, to]: readonly [number, number], u: number): number {
  return from + u * (to - from)
}

/** Bounds of how fast the axis at a depth, and the slope, change over the whole of a move (per u). */
export function moveRates(
  path: JetPath,
  i: number,
  round: RoundMove | null,
  depth: number,
): { readonly axis: number; readonly slope: number } {
  if (!round) {
    const { x, y, p, q } = path
    const [dp, dq] = [p[i + 1]! - p[i]!, q[i + 1]! - q[i]!]
    const axis = Math.hypot(x[i + 1]! - x[i]! + depth * dp, y[i + 1]! - y[i]! + depth * dq)
    return { axis, slope: Math.hypot(dp, dq) }
  }
  const { radius, radial, across, sweep } = round
  const turn = Math.abs(sweep)
  // In the turning frame the axis lies at (radius + d·radial, d·across), which changes evenly.
  const far = (e: 0 | 1) => Math.hypot(radius[e] + depth * radial[e], depth * across[e])
  const steep = (e: 0 | 1) => Math.hypot(radial[e], across[e])
  const [dr, da] = [radial[1] - radial[0], across[1] - across[0]]
  return {
    axis: turn * Math.max(far(0), far(1)) + Math.hypot(radius[1] - radius[0] + depth * dr, depth * da),
    slope: turn * Math.max(steep(0), steep(1)) + Math.hypot(dr, da),
  }
}

/** Widens the box at out[at…] by everywhere that the jet of move i is at a depth. */
export function coverMove(
  cone: JetCone,
  path: JetPath,
  i: number,
  depth: number,
  out: Float64Array,
  at: number,
): void {
  if (path.sweep[i] !== 0) {
    coverRound(cone, path, i, depth, out, at)
    return
  }
  coverLine(cone, path, i, depth, out, at)
  coverLine(cone, path, i + 1, depth, out, at)
}

function coverLine(
  cone: JetCone,
  path: JetPath,
  i: number,
  depth: number,
  out: Float64Array,
  at: number,
): void {
  const p = path.p[i]!
  const q = path.q[i]!
  const width = cone.sin === 0 ? cone.radius : widthAt(cone, depth, 1 + p * p + q * q)
  const [wx, wy] = [width * Math.sqrt(1 + p * p), width * Math.sqrt(1 + q * q)]
  const x = path.x[i]! + depth * p
  const y = path.y[i]! + depth * q
  if (x - wx < out[at]!) out[at] = x - wx
  if (y - wy < out[at + 1]!) out[at + 1] = y - wy
  if (x + wx > out[at + 2]!) out[at + 2] = x + wx
  if (y + wy > out[at + 3]!) out[at + 3] = y + wy
}

/** A jet that turns between two tilts may stand upright in the middle, where a cone that narrows is widest at a depth. */
function widthAt(cone: JetCone, depth: number, square: number): number {
  return halfWidthAt(cone, depth, cone.sin > 0 ? 1 : square) * sectionSpread(cone, square)
}

function coverRound(
  cone: JetCone,
  path: JetPath,
  i: number,
  depth: number,
  out: Float64Array,
  at: number,
): void {
  const round = roundMove(path, i)
  const centre = { x: round.cx, y: round.cy }
  for (const e of [0, 1] as const) {
    const [along, across] = [round.radius[e] + depth * round.radial[e], depth * round.across[e]]
    // The ends' places change evenly in the turning frame: an arc through each, padded by the change.
    const change = Math.hypot(
      round.radius[1] - round.radius[0] + depth * (round.radial[1] - round.radial[0]),
      depth * (round.across[1] - round.across[0]),
    )
    const steep = round.radial[e] ** 2 + round.across[e] ** 2
    const square = 1 + steep
    const pad = change + widthAt(cone, depth, square) * Math.sqrt(square)
    const box = arcBounds(
      centre,
      Math.hypot(along, across),
      round.heading + Math.atan2(across, along),
      round.sweep,
    )
    out[at] = Math.min(out[at]!, box.minX - pad)
    out[at + 1] = Math.min(out[at + 1]!, box.minY - pad)
    out[at + 2] = Math.max(out[at + 2]!, box.maxX + pad)
    out[at + 3] = Math.max(out[at + 3]!, box.maxY + pad)
  }
}
