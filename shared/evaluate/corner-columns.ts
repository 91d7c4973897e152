import { CornerMode, type Frame } from '../contours/frame.ts'
import { bandsOf, type Band } from '../contours/slides.ts'
import { FILLET_WORTH_SAYING } from '../findings/corner.ts'
import { seamLength } from '../passes/jet-lines.ts'
import type { CornerKind } from '../seams/types.ts'
import { degrees, radians } from '../units/angle.ts'
import type { ReadRequest } from './read.ts'

/**
 * Everything about corners, by corner of the body. Slopes are kept squared: largest over all depths, −1 where there is
 * no seam (a step) or no jet that leaves both walls.
 */
export interface CornerColumns {
  readonly seam: Float64Array
  /** The same column where there is no taper. */
  readonly jet: Float64Array
  /** What is to be said about the corner, `CornerNote` bits. */
  readonly notes: Uint8Array
}

/** Squared slope of a seam as good as level: lines that double back (a tangent of 1e16 is the last before a quarter turn). */
const LEVEL = 1e32

export const CornerNote = { fillet: 1, over: 2, step: 4 } as const

/** What all corners share. */
export interface CornerRules {
  /** Radians per side, and its sine. */
  readonly taper: number
  readonly sine: number
  /** By band: the tangents of the tilts, their secants and squared jet slopes where edges run on smoothly, by row. */
  readonly bands: readonly BandRows[]
  /** Concave corners whose turn has a cosine below this keep a fillet worth a word; −2: none. */
  readonly filletCosine: number
  /** Squared jet slope at which a limit is passed. */
  readonly limitSlope: number
}

interface BandRows {
  readonly band: Band
  readonly secStart: Float64Array
  readonly secEnd: Float64Array
  readonly jetStart: Float64Array
  readonly jetEnd: Float64Array
}

/** `lowest`: the strictest limit, degrees; null where no head is given. */
export function cornerRules({ request, frame }: ReadRequest, lowest: number | null): CornerRules {
  const { kerf } = request.jet ?? {}
  const taper = radians(request.jet?.taper ?? 0)
  const secants = (rate: ArrayLike<number>) => Float64Array.from(rate, (w) => Math.sqrt(1 + w * w))
  const jets = (rate: ArrayLike<number>) =>
    Float64Array.from(rate, (w) => Math.tan(Math.atan(w) - taper) ** 2)
  const bands = bandsOf(frame).map((band) => {
    const { start, end } = band.rate
    const [secStart, jetStart] = [secants(start), jets(start)]
    const same = start === end
    return {
      band,
      secStart,
      secEnd: same ? secStart : secants(end),
      jetStart,
      jetEnd: same ? jetStart : jets(end),
    }
  })
  return {
    taper,
    sine: Math.sin(taper),
    bands,
    filletCosine: kerf === undefined ? -2 : filletCosine(kerf),
    limitSlope: lowest === null ? Infinity : Math.tan(radians(Math.min(lowest, 89.999999))) ** 2,
  }
}

/** A fillet of radius r leaves r(1/cos(turn/2) − 1) of a sharp corner: worth a word from a turn of this cosine. */
function filletCosine(kerf: number): number {
  const share = kerf / 2 / (kerf / 2 + FILLET_WORTH_SAYING)
  return 2 * share * share - 1
}

export function cornerColumns(read: ReadRequest, rules: CornerRules): CornerColumns {
  const { count } = read.frame
  const seam = new Float64Array(count)
  const jet = rules.taper === 0 ? seam : new Float64Array(count)
  const out = { seam, jet, notes: new Uint8Array(count) }
  for (let g = 0; g < count; g++) fillCorner(read.frame, g, rules, out)
  return out
}

export function fillCorner(frame: Frame, g: number, rules: CornerRules, out: CornerColumns): void {
  const { taper, sine } = rules
  const { rowOfEdge } = frame.table
  const before = rowOfEdge[frame.previous[g]!]!
  const after = rowOfEdge[g]!
  const mode = frame.mode[g]!
  const smooth = mode === CornerMode.smooth || mode === CornerMode.step
  let seam = 0
  let jet = 0
  if (mode === CornerMode.step) {
    seam = jet = -1
  } else {
    const sin = frame.turnSin[g]!
    const half = sin / (1 + frame.turnCos[g]!)
    for (let i = 0; i < rules.bands.length; i++) {
      const { band, secStart, secEnd, jetStart, jetEnd } = rules.bands[i]!
      const w = band.rate.end[before]!
      const ahead = band.slides.ahead[g]!
      let slope = w * w + ahead * ahead
      if (!(slope <= LEVEL)) slope = LEVEL
      if (slope > seam) seam = slope
      if (taper === 0) continue
      let own: number
      if (smooth) {
        own = Math.max(jetEnd[before]!, jetStart[after]!)
      } else {
        const first = secEnd[before]!
        const second = secStart[after]!
        const along = (first === second ? 0 : (second - first) / sin) + first * half
        const length = seamLength(sine, w, ahead, first, along)
        const x = w - sine * length * first
        const y = ahead - sine * length * along
        own = x * x + y * y
      }
      // No number: the corner is sharper than twice the taper, no jet leaves both walls.
      if (!(own < Infinity)) jet = -1
      else if (jet >= 0 && own > jet) jet = own
    }
  }
  out.seam[g] = seam
  if (taper !== 0) out.jet[g] = jet
  const isSharp = !smooth && !(frame.turnSin[g]! > 0) && frame.turnCos[g]! < rules.filletCosine
  out.notes[g] =
    (isSharp ? CornerNote.fillet : 0) |
    (!smooth && (taper === 0 ? seam : jet) > rules.limitSlope ? CornerNote.over : 0) |
    (smooth && seam < 0 ? CornerNote.step : 0)
}

/** Degrees of a squared slope; null where there is none. */
export function slopeDegrees(square: number): number | null {
  return square < 0 ? null : degrees(Math.atan(Math.sqrt(square)))
}

/** A line that doubles back on itself is a convex corner of no angle. */
export function cornerKind(frame: Frame, g: number): CornerKind {
  const mode = frame.mode[g]
  if (mode === CornerMode.smooth || mode === CornerMode.step) return 'smooth'
  return interiorAngle(frame, g) < Math.PI ? 'convex' : 'concave'
}

/** Inside the material, radians. */
export function interiorAngle({ turnSin, turnCos }: Frame, g: number): number {
  return Math.PI - Math.atan2(turnSin[g]!, turnCos[g]!)
}
