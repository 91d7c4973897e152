import type { EdgePlan } from './edge-plan.ts'
import { sideSlope, sideSlopeRate } from './jet-lines.ts'
import type { Level } from './level.ts'
import { MoveKind, type Jet } from './types.ts'
import { put, type PathWriter } from './writer.ts'

/**
 * Stations within a lean on a straight edge with taper. There the side slope s is bent over the slope a along the
 * edge: s = (sin β cos β − sin τ·√(cos² τ + n a²))/n with n = cos² β − sin² τ. A straight move between the lean's
 * ends would enter the part (τ > 0). Between tangents of that bend it stays outside; for τ < 0 chords do.
 */

/**
 * How far a leaning jet with taper may stand off its wall between stations, outside the part, mm: a fifth of a
 * machine's repeatability (0.025 mm, common practice, no source).
 */
const LEAN_STAND_OFF = 0.005

/** More pieces than this per lean are not worth their length. */
const MOST_PIECES = 32

/**
 * What a straight move may enter before it takes a station in between, mm: half of what counts as on the wall in the
 * tests (1e-9), a thousand times a double's rounding.
 */
const LEAN_ENTERS = 5e-10

/** What the leans of a level have in common. */
export interface LeanKnots {
  readonly cosTaper: number
  readonly tanTaper: number
  /** Half the kerf, mm. */
  readonly half: number
  /** A lean from square to a slope whose square is at most this takes no station in between, at most that a single one. */
  readonly none: number
  readonly single: number
}

export function leanKnots({ jet, frame }: Level): LeanKnots {
  const tanTaper = Math.tan(jet.taper)
  return {
    cosTaper: Math.cos(jet.taper),
    tanTaper,
    half: jet.kerf / 2,
    none: mostStraight(jet, frame.body.thickness),
    single: 1 / piecesPerTurn(jet.taper, frame.body.thickness) ** 2,
  }
}

/** Writes them between the lengths `from` and `to`, over which the slope along the edge goes from `alongFrom` to `alongTo`. */
export function writeLean(
  w: PathWriter,
  level: Level,
  plan: EdgePlan,
  from: number,
  to: number,
  alongFrom: number,
  alongTo: number,
): void {
  const { axis } = plan
  const { taper } = level.jet
  if (axis.arc || taper === 0 || axis.rise !== 0 || axis.slopeStart !== axis.slopeEnd) return
  const g = axis.g
  const tilt = level.axis.start.tilt[level.figure[g]!]!
  const [bendFrom, bendTo] = [Math.asinh(alongFrom), Math.asinh(alongTo)]
  const pieces = leanPieces(level, bendTo - bendFrom)
  const knots = leanKnots(level)
  if (taper > 0 && (alongTo - alongFrom) ** 2 <= knots.none) return
  const putAt = (along: number, side: number) => {
    const at = from + ((along - alongFrom) / (alongTo - alongFrom)) * (to - from)
    const facing = Math.sin(tilt) - side * Math.cos(tilt)
    const square = 1 + side * side + along * along
    const clear = clearAtTop(knots, Math.sin(tilt), 1 / Math.cos(tilt), facing, square)
    put(
      w,
      axis.x + at * axis.ux + clear * axis.uy,
      axis.y + at * axis.uy - clear * axis.ux,
      side * axis.uy + along * axis.ux,
      along * axis.uy - side * axis.ux,
      MoveKind.lean,
      g,
      level.facet[g]!,
    )
  }
  const knot = (i: number) =>
    i === 0 ? alongFrom : i === pieces ? alongTo : Math.sinh(bendFrom + (i / pieces) * (bendTo - bendFrom))
  if (taper < 0) {
    for (let i = 1; i < pieces; i++) putAt(knot(i), sideSlope(tilt, taper, knot(i)))
    return
  }
  for (let i = 0; i < pieces; i++) {
    const [a, b] = [knot(i), knot(i + 1)]
    const [sa, sb] = [sideSlope(tilt, taper, a), sideSlope(tilt, taper, b)]
    const [ra, rb] = [sideSlopeRate(tilt, taper, a), sideSlopeRate(tilt, taper, b)]
    if (ra === rb) continue
    const meet = (sb - sa + ra * a - rb * b) / (ra - rb)
    putAt(meet, sa + ra * (meet - a))
  }
}

/**
 * How far a jet whose side slope is beyond the wall's must move out so that it does not enter at the top face, mm
 * along the outward normal (micrometres). Its axis is at sin φ < sin τ to the wall, so the cone's nearest line
 * comes closer to the wall upward, by tan τ·cos φ − sin φ per mm of axis, up to `rim`, where it leaves the plate
 * (derived). `facing` = sin β − s·cos β = sin φ times the axis' length per mm of depth, of which `square` is the square.
 */
export function clearAtTop(
  { cosTaper, tanTaper, half }: LeanKnots,
  sinTilt: number,
  sec: number,
  facing: number,
  square: number,
): number {
  const length = Math.sqrt(square)
  // The axis' length per mm of depth, times the cosine of φ.
  const across = Math.sqrt(square - facing * facing)
  // Downward part of the way from the axis to that line; −half·down/(across − tan τ·down) is then the axis' length
  // at which the line is at depth 0.
  const down = sinTilt * square - facing
  const rise = (down * (tanTaper * across - facing)) / (across - tanTaper * down)
  const short = (half * (across - cosTaper * length + rise)) / length
  return short > 0 ? short * sec : 0
}

/**
 * Enough that no tangent stands off by more than allowed at the bottom: with along = sinh u the side slope is bent
 * by tan |τ| over u at most, and a tangent stands off by an eighth of that times the square of a piece (derived).
 */
function leanPieces(level: Level, change: number): number {
  const pieces = Math.ceil(Math.abs(change) * piecesPerTurn(level.jet.taper, level.frame.body.thickness))
  return Math.min(MOST_PIECES, Math.max(1, pieces))
}

/**
 * Square of the greatest change of slope along the edge that a straight move may make. |s″| is at most tan τ (at
 * a = 0), so that a chord is off by tan τ·Δ²/8 per mm of depth at most, and at the top face the cone, turned by as
 * much, comes nearer by that times half a kerf (derived).
 */
function mostStraight({ kerf, taper }: Jet, thickness: number): number {
  return (8 * LEAN_ENTERS) / (Math.tan(Math.abs(taper)) * (thickness + kerf / 2))
}

function piecesPerTurn(taper: number, thickness: number): number {
  return Math.sqrt((Math.tan(Math.abs(taper)) * thickness) / (8 * LEAN_STAND_OFF))
}
