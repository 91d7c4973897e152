import { jetAt, type JetLine } from '../passes/jet-at.ts'
import { MoveKind, type Jet, type JetPath, type Pass } from '../passes/types.ts'
import { putSpot, type Spots } from './spots.ts'

/**
 * Spots whose convex hull holds a jet along its passes: its sections at the top face and at a depth below the plate,
 * and the nozzle's tip where jet and stand-off tell it. Along a straight move the axis goes evenly in the move and in
 * depth, so the ends do; a round one is cut into chords and padded by what the way bulges past them. Returns how much
 * wider than the jet its spots may be because of taper (and the tip's because it is tilted), mm; pads come on top.
 */
export function putJet(
  spots: Spots,
  path: JetPath,
  { first, last, loop }: Pass,
  jet: Jet,
  deepest: number,
  chordTolerance: number,
): number {
  const nozzle = jet.standoff ?? null
  const tip = (jet.nozzleDiameter ?? jet.kerf) / 2
  const half = jet.kerf / 2
  const tan = Math.tan(jet.taper)
  let wider = 0
  for (let i = first; i < last; i++) {
    if (path.move[i] === MoveKind.end) continue
    const slopes = slopeRange(path, i)
    const longest = Math.sqrt(1 + slopes.most ** 2)
    const shortest = Math.sqrt(1 + slopes.least ** 2)
    // A narrowing jet is widest where it stands steepest, a widening one where it leans most; a level section of a cone
    // lies within that of a cylinder as wide as the cone is at the section's upper (lower) tip (derived).
    const spread = 1 / Math.max(LEAST_CROSSING, 1 - slopes.most * Math.abs(tan))
    const widthAt = (length: number) => Math.max(0, half - deepest * length * tan)
    const top = half * spread
    const low = widthAt(tan > 0 ? shortest : longest) * spread
    wider = Math.max(wider, (top - half) * longest, (low - widthAt(tan > 0 ? longest : shortest)) * longest)
    if (nozzle !== null) wider = Math.max(wider, tip * (1 - 1 / longest))
    const bend = bendOf(path, i, deepest)
    const pieces = Math.max(
      1,
      Math.ceil(Math.sqrt(bend.place + top * bend.slope) / Math.sqrt(8 * chordTolerance)),
    )
    const pad = (bend.place + Math.max(top, low) * bend.slope) / (8 * pieces * pieces)
    for (let k = 0; k <= pieces; k++) {
      const line = pieces === 1 ? lineAtStation(path, i + k) : jetAt(path, i, k / pieces)
      const { x, y, p, q } = line
      putSpot(spots, loop, x, y, top, p, q, pad)
      putSpot(spots, loop, x + deepest * p, y + deepest * q, low, p, q, pad)
      if (nozzle === null) continue
      // The tip lies a stand-off up the axis, a round disc however it leans. Up the axis is not even in the slope: its
      // second change is under that of the slope's square (|f″| ≤ 0.86 for v/√(1 + v²), derived).
      const up = nozzle / Math.sqrt(1 + p * p + q * q)
      const sway = (nozzle * slopes.change ** 2) / (8 * pieces * pieces)
      putSpot(spots, loop, x - up * p, y - up * q, tip, 0, 0, pad + sway)
    }
  }
  return wider
}

/** A jet that lies so flat that its side nearly runs level is followed no further than this. */
const LEAST_CROSSING = 0.1

function lineAtStation({ x, y, p, q }: JetPath, i: number): JetLine {
  return { x: x[i]!, y: y[i]!, p: p[i]!, q: q[i]! }
}

/** Steepest and flattest slope during a move, and how much the slope changes; slopes go straight, also in a turning frame. */
function slopeRange({ p, q, x, y, cx, cy, sweep }: JetPath, i: number) {
  const j = i + 1
  let [p0, q0, p1, q1] = [p[i]!, q[i]!, p[j]!, q[j]!]
  if (sweep[i] !== 0) {
    const heading = Math.atan2(y[i]! - cy[i]!, x[i]! - cx[i]!)
    ;[p0, q0] = turned(p0, q0, -heading)
    ;[p1, q1] = turned(p1, q1, -heading - sweep[i]!)
  }
  const [dp, dq] = [p1 - p0, q1 - q0]
  const change = Math.hypot(dp, dq)
  const most = Math.max(Math.hypot(p0, q0), Math.hypot(p1, q1))
  const at = change === 0 ? 0 : Math.min(1, Math.max(0, -(p0 * dp + q0 * dq) / (change * change)))
  return { most, least: Math.hypot(p0 + at * dp, q0 + at * dq), change: change + most * Math.abs(sweep[i]!) }
}

function turned(x: number, y: number, by: number): [number, number] {
  const [c, s] = [Math.cos(by), Math.sin(by)]
  return [x * c - y * s, x * s + y * c]
}

/** Bounds of the second derivative, per u², of a round move's place at any depth down to the deepest and of its slope: s²|Z| + 2|s||ΔZ|. */
function bendOf({ x, y, p, q, cx, cy, sweep }: JetPath, i: number, deepest: number) {
  const s = Math.abs(sweep[i]!)
  if (s === 0) return { place: 0, slope: 0 }
  const j = i + 1
  const from = Math.hypot(x[i]! - cx[i]!, y[i]! - cy[i]!)
  const to = Math.hypot(x[j]! - cx[i]!, y[j]! - cy[i]!)
  const [steepFrom, steepTo] = [Math.hypot(p[i]!, q[i]!), Math.hypot(p[j]!, q[j]!)]
  // Changes are at most the sum of both ends; only the distance's own is told closer, as most moves keep it.
  const steep = Math.max(steepFrom, steepTo)
  const slope = s * s * steep + 2 * s * (steepFrom + steepTo)
  const place = s * s * Math.max(from, to) + 2 * s * Math.abs(to - from) + deepest * slope
  return { place, slope }
}
