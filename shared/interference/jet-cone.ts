/**
 * How deep a point stands in a jet. The jet is a cone about its axis: half-width `radius` where the axis
 * crosses the top face, narrowing by tan τ per mm of axis. For a point that lies s along the axis and ρ off it
 * the depth square to the jet's side is
 *     bite = cos τ·(radius − ρ) − sin τ·s,
 * positive inside, zero on the side, at most the half-width, and concave in the point. mm and radians.
 */
export interface JetCone {
  readonly radius: number
  readonly cos: number
  readonly sin: number
}

/** A jet line: axis at the top face and sideways travel per mm of depth. Written in place, as there are many. */
export interface JetLine {
  x: number
  y: number
  p: number
  q: number
}

export function jetCone(kerf: number, taper: number): JetCone {
  return { radius: kerf / 2, cos: Math.cos(taper), sin: Math.sin(taper) }
}

export function makeJetLine(): JetLine {
  return { x: 0, y: 0, p: 0, q: 0 }
}

/** Length of axis per mm of depth. */
export function axisLength({ p, q }: JetLine): number {
  return Math.sqrt(1 + p * p + q * q)
}

/** Bite at the point (x, y) at a depth. */
export function biteAt(cone: JetCone, line: JetLine, depth: number, x: number, y: number): number {
  const { p, q } = line
  const dx = x - line.x - p * depth
  const dy = y - line.y - q * depth
  return biteBeside(cone, p, q, depth, dx, dy)
}

/** Bite at a point (dx, dy) beside the axis, both at a depth. */
export function biteBeside(
  cone: JetCone,
  p: number,
  q: number,
  depth: number,
  dx: number,
  dy: number,
): number {
  const square = 1 + p * p + q * q
  const length = Math.sqrt(square)
  const lean = dx * p + dy * q
  // |δ|² − (δ·a)² as a sum, so that nothing cancels at steep tilts: |δ × a|².
  const turn = dx * q - dy * p
  const off = Math.sqrt((dx * dx + dy * dy + turn * turn) / square)
  return cone.cos * (cone.radius - off) - (cone.sin * (depth * square + lean)) / length
}

/**
 * Where along a level segment, as a fraction of it, a jet bites deepest. Off-axis distance squared is quadratic
 * along the segment and the taper adds a linear term, so the place is in closed form.
 */
export function deepestOnSegment(
  cone: JetCone,
  line: JetLine,
  depth: number,
  sx: number,
  sy: number,
  ex: number,
  ey: number,
): number {
  const { p, q } = line
  return deepestBeside(cone, p, q, sx - line.x - p * depth, sy - line.y - q * depth, ex - sx, ey - sy)
}

/** The same for a segment that starts (dx, dy) beside the axis and runs by (vx, vy). */
export function deepestBeside(
  cone: JetCone,
  p: number,
  q: number,
  dx: number,
  dy: number,
  vx: number,
  vy: number,
): number {
  const square = 1 + p * p + q * q
  const turn = vx * q - vy * p
  const alpha = (vx * vx + vy * vy + turn * turn) / square
  if (alpha === 0) return 0
  const beta = (dx * vx + dy * vy + (dx * q - dy * p) * turn) / square
  let at = -beta / alpha
  if (cone.sin !== 0) {
    // k·v + √(α·(v − v₀)² + h²) is least at v − v₀ = −k·h/√(α(α − k²)).
    const k = (cone.sin / cone.cos) * ((vx * p + vy * q) / Math.sqrt(square))
    const crossing = dx * vy - dy * vx
    const rest = alpha * (alpha - k * k)
    if (rest <= 0) return k > 0 ? 0 : 1
    at -= (k * Math.abs(crossing)) / Math.sqrt(square * alpha * rest)
  }
  return at < 0 ? 0 : at > 1 ? 1 : at
}

/** The deepest bite on a level segment. */
export function biteOnSegment(
  cone: JetCone,
  line: JetLine,
  depth: number,
  sx: number,
  sy: number,
  ex: number,
  ey: number,
): number {
  const at = deepestOnSegment(cone, line, depth, sx, sy, ex, ey)
  return biteAt(cone, line, depth, sx + at * (ex - sx), sy + at * (ey - sy))
}

/**
 * How fast a bite falls per mm of level distance between axis and a straight wall with normal n, the wall taken
 * as endless: κ = (√(1 + c² − sin²τ·L²) − sin τ·c·L)/(1 + c²), c = n·slope, L the axis' length per mm of depth
 * (derived: the least of cos τ·ρ + sin τ·δ·a over n·δ = −1). NaN where the jet's side is flatter than the plane can be.
 */
export function fallBeside(cone: JetCone, c: number, square: number): number {
  const away = 1 + c * c
  if (cone.sin === 0) return 1 / Math.sqrt(away)
  return (Math.sqrt(away - cone.sin * cone.sin * square) - cone.sin * c * Math.sqrt(square)) / away
}

/**
 * The widest that a jet's level section reaches off its axis, as a multiple of half-width × √(1 + slope²) in any
 * one direction: 1/(1 − tan A·|tan τ|). The section of a cone that lies nearly flat is endless; it is followed
 * this many half-widths and no further.
 */
const WIDEST_SECTION = 10

export function sectionSpread(cone: JetCone, square: number): number {
  if (cone.sin === 0) return 1
  const flat = Math.sqrt(square - 1) * Math.abs(cone.sin / cone.cos)
  return flat < 1 - 1 / WIDEST_SECTION ? 1 / (1 - flat) : WIDEST_SECTION
}

/** Half-width at a depth of the axis, never below 0. */
export function halfWidthAt(cone: JetCone, depth: number, square: number): number {
  const width = cone.radius - (depth * Math.sqrt(square) * cone.sin) / cone.cos
  return width > 0 ? width : 0
}
