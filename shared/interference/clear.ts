import type { JetPath } from '../passes/types.ts'
import { fallBeside, type JetCone } from './jet-cone.ts'
import { isSteady, roundMove } from './moves.ts'
import { BITE_TOLERANCE } from './types.ts'
import { bentCorner, isPlane, radiusOf, type WallBand } from './wall-band.ts'

/**
 * Quick proofs that a move keeps clear of a wall, exact where the two touch by construction: the move stays on
 * the outer side of some plane (or of every plane round a cone), or inside some circle at every depth, and the wall
 * on the other side. All are sufficient, none necessary; what no proof clears is searched.
 */

/** A proof has two sides, the jet's and the wall's: each may miss by half of what counts, mm. */
const HALF = BITE_TOLERANCE / 2

/** Two centres, radii or slopes nearer than this are one, mm: what a few operations lose on coordinates of metres. */
const SAME = 1e-9

/** Turning moves are looked at this often and no oftener before the search takes over. */
const MOST_LOOKS = 400

export interface Scene {
  readonly cone: JetCone
  readonly path: JetPath
  readonly band: WallBand
}

/** Whether one of the proofs holds for move i and wall f. */
export function isClear(scene: Scene, i: number, f: number): boolean {
  const { path, band } = scene
  const { arc } = band.frame
  if (!arc[f] && isPlane(band, f) && outsideWall(scene, i, f)) return true
  if (path.sweep[i] !== 0) return isRoundClear(scene, i, f)
  const e = path.edge[i]!
  if (e >= 0 && e !== f && !arc[e] && isPlane(band, e) && liesBehind(band, f, e) && outsideWall(scene, i, e)) {
    return true
  }
  return arc[f] !== 0 && isArcClear(scene, i, f)
}

/** Whether a straight move keeps outside the endless plane of line f's wall within the band. */
export function outsideWall({ cone, path, band }: Scene, i: number, f: number): boolean {
  if (path.sweep[i] !== 0) return false
  const nx = band.frame.uy[f]!
  const ny = -band.frame.ux[f]!
  const [high, low] = band.places
  const h0 = high.sx[f]! * nx + high.sy[f]! * ny
  const h1 = low.sx[f]! * nx + low.sy[f]! * ny
  return outsidePlane(cone, path, i, nx, ny, band.top, h0, band.bottom, h1)
}

/**
 * Whether a straight move keeps outside a plane of level normal n, which stands at height h0 along n at depth z0
 * and at h1 at z1. Against an endless plane the deepest bite at a depth is cos τ·r − sin τ·L·d − κ·gap; with a steady
 * slope that is even in d and along the move, so the four corners tell.
 */
function outsidePlane(
  cone: JetCone,
  path: JetPath,
  i: number,
  nx: number,
  ny: number,
  z0: number,
  h0: number,
  z1: number,
  h1: number,
): boolean {
  const { x, y, p, q } = path
  const j = i + 1
  const [p0, q0, p1, q1] = [p[i]!, q[i]!, p[j]!, q[j]!]
  const a0 = x[i]! * nx + y[i]! * ny
  const a1 = x[j]! * nx + y[j]! * ny
  const c0 = p0 * nx + q0 * ny
  const c1 = p1 * nx + q1 * ny
  // Quickly out: the axis itself is behind the plane.
  if (a0 + z0 * c0 < h0 || a0 + z1 * c0 < h1 || a1 + z0 * c1 < h0 || a1 + z1 * c1 < h1) return false
  const bite = (a: number, c: number, square: number, z: number, h: number) =>
    cone.cos * cone.radius -
    cone.sin * Math.sqrt(square) * z -
    fallBeside(cone, c, square) * (a + z * c - h)
  const square0 = 1 + p0 * p0 + q0 * q0
  const square1 = 1 + p1 * p1 + q1 * q1
  if (!(bite(a0, c0, square0, z0, h0) <= HALF)) return false
  if (!(bite(a0, c0, square0, z1, h1) <= HALF)) return false
  if (!(bite(a1, c1, square1, z0, h0) <= HALF)) return false
  if (!(bite(a1, c1, square1, z1, h1) <= HALF)) return false
  const turn = Math.hypot(p1 - p0, q1 - q0)
  const closing = Math.abs(c1 - c0)
  const sin = Math.abs(cone.sin)
  if (turn === 0 || (sin === 0 && closing === 0)) return true
  if (sin * sin * Math.max(square0, square1) > LEAST_ROOT) return false
  // Between looks a step apart the bite passes the higher one by at most bend·step²/8, bend a bound of its second derivative.
  for (const [z, h] of [
    [z0, h0],
    [z1, h1],
  ] as const) {
    const [g0, g1] = [a0 + z * c0 - h, a1 + z * c1 - h]
    const bend =
      z * sin * turn * turn +
      2 * Math.abs(g1 - g0) * (closing + sin * turn) +
      Math.max(g0, g1) * (2 * closing * closing + 4 * sin * turn * turn)
    const looks = Math.ceil(Math.sqrt(bend / (8 * HALF)))
    if (looks > MOST_LOOKS) return false
    const slack = BITE_TOLERANCE - (looks > 0 ? bend / (looks * looks * 8) : 0)
    for (let k = 1; k < looks; k++) {
      const u = k / looks
      const [pu, qu] = [p0 + u * (p1 - p0), q0 + u * (q1 - q0)]
      const square = 1 + pu * pu + qu * qu
      if (!(bite(a0 + u * (a1 - a0), c0 + u * (c1 - c0), square, z, h) <= slack)) return false
    }
  }
  return true
}

/** The bound of the second derivative holds where sin²τ·L² is below this: its root then stays near that of 1 + c². */
const LEAST_ROOT = 0.1

/** Whether wall f lies wholly behind the plane of line e's wall, within the band. */
export function liesBehind(band: WallBand, f: number, e: number): boolean {
  const { frame, places } = band
  const nx = frame.uy[e]!
  const ny = -frame.ux[e]!
  const next = frame.next[f]!
  if (bentCorner(band, f) || bentCorner(band, next)) return false
  for (const level of [0, 1] as const) {
    const at = places[level]
    const h = at.sx[e]! * nx + at.sy[e]! * ny + HALF
    if (at.sx[f]! * nx + at.sy[f]! * ny > h || at.ex[f]! * nx + at.ey[f]! * ny > h) return false
    if (!frame.arc[f]) continue
    if (!holdsHeading(startHeading(band, f), frame.sweep[f]!, Math.atan2(ny, nx))) continue
    if (frame.cx[f]! * nx + frame.cy[f]! * ny + radiusOf(band, f, level) > h) return false
  }
  return true
}

/** Heading from an arc's centre to its start in the drawing, which smooth ends keep at every depth. */
function startHeading({ frame }: WallBand, f: number): number {
  return Math.atan2(frame.py[f]! - frame.cy[f]!, frame.px[f]! - frame.cx[f]!)
}

/** Whether a heading lies within a sweep, ends included (to rounding). */
function holdsHeading(from: number, sweep: number, heading: number): boolean {
  const turn = (heading - from) * Math.sign(sweep)
  const full = 2 * Math.PI
  return turn - full * Math.floor((turn + SAME) / full) <= Math.abs(sweep) + SAME
}

/**
 * A round move whose jet keeps its slope along the radius: turned about its centre, the jet sweeps a body whose
 * section at a depth is a ring. It stays outside every plane round the cone of its near sides, and inside its far sides' circle.
 */
function isRoundClear(scene: Scene, i: number, f: number): boolean {
  const { cone, path, band } = scene
  const round = roundMove(path, i)
  const { radius, radial, across } = round
  if (Math.abs(across[0]) > SAME || Math.abs(across[1]) > SAME) return false
  if (Math.abs(radius[1] - radius[0]) > SAME || Math.abs(radial[1] - radial[0]) > SAME) return false
  const next = band.frame.next[f]!
  if (bentCorner(band, f) || bentCorner(band, next)) return false
  const square = 1 + radial[0] * radial[0]
  const length = Math.sqrt(square)
  let outside = true
  let inside = true
  for (const level of [0, 1] as const) {
    const z = level === 0 ? band.top : band.bottom
    const at = radius[0] + z * radial[0]
    const width = cone.cos * cone.radius - cone.sin * length * z
    const near = at - width / fallBeside(cone, radial[0], square)
    // How far the section reaches along the radius to either side of the axis.
    const out = (width * length) / (cone.cos + cone.sin * radial[0])
    const back = (width * length) / (cone.cos - cone.sin * radial[0])
    const far = Math.max(at + out, back - at)
    outside &&= behindCone(band, f, level, round.cx, round.cy, round.heading, round.sweep, near + HALF)
    inside &&= out >= 0 && back >= 0 && outsideCircle(band, f, level, round.cx, round.cy, far - HALF)
    if (!outside && !inside) return false
  }
  return true
}

/** Whether wall f at a level lies behind every line at a distance from a centre, square to the headings of a sweep. */
function behindCone(
  band: WallBand,
  f: number,
  level: 0 | 1,
  cx: number,
  cy: number,
  heading: number,
  sweep: number,
  distance: number,
): boolean {
  const { frame, places } = band
  const at = places[level]
  const behind = (x: number, y: number, beyond: number) => {
    const most = holdsHeading(heading, sweep, Math.atan2(y, x))
      ? Math.hypot(x, y)
      : Math.max(
          x * Math.cos(heading) + y * Math.sin(heading),
          x * Math.cos(heading + sweep) + y * Math.sin(heading + sweep),
        )
    return most + beyond <= distance
  }
  if (!behind(at.sx[f]! - cx, at.sy[f]! - cy, 0) || !behind(at.ex[f]! - cx, at.ey[f]! - cy, 0)) return false
  if (!frame.arc[f]) return true
  // Between its ends an arc is farthest along a heading where its own heading is the same.
  const radius = radiusOf(band, f, level)
  const from = startHeading(band, f)
  const [dx, dy] = [frame.cx[f]! - cx, frame.cy[f]! - cy]
  const both: number[] = []
  for (const end of [from, from + frame.sweep[f]!]) if (holdsHeading(heading, sweep, end)) both.push(end)
  for (const end of [heading, heading + sweep]) {
    if (holdsHeading(from, frame.sweep[f]!, end)) both.push(end)
  }
  if (both.length === 0) return true
  const most = Math.atan2(dy, dx)
  if (holdsHeading(heading, sweep, most) && holdsHeading(from, frame.sweep[f]!, most)) both.push(most)
  return both.every((end) => dx * Math.cos(end) + dy * Math.sin(end) + radius <= distance)
}

/** Whether wall f's endless line or circle at a level keeps outside a circle, on the side where the circle is waste. */
function outsideCircle(
  band: WallBand,
  f: number,
  level: 0 | 1,
  cx: number,
  cy: number,
  radius: number,
): boolean {
  const { frame, places } = band
  if (frame.arc[f]) {
    const apart = Math.hypot(frame.cx[f]! - cx, frame.cy[f]! - cy)
    const own = radiusOf(band, f, level)
    return frame.sweep[f]! > 0 ? apart - own >= radius : own - apart >= radius
  }
  if (!isPlane(band, f)) return false
  const nx = frame.uy[f]!
  const ny = -frame.ux[f]!
  return (cx - places[level].sx[f]!) * nx + (cy - places[level].sy[f]!) * ny >= radius
}

/** A straight move beside an arc. */
function isArcClear(scene: Scene, i: number, f: number): boolean {
  const { cone, path, band } = scene
  const { frame } = band
  const [cx, cy] = [frame.cx[f]!, frame.cy[f]!]
  const [x0, y0, x1, y1] = [path.x[i]!, path.y[i]!, path.x[i + 1]!, path.y[i + 1]!]
  if (frame.sweep[f]! > 0) {
    // The wall lies behind the plane that touches its cone where the move is.
    const middle = (band.top + band.bottom) / 2
    const ax = (x0 + x1 + middle * (path.p[i]! + path.p[i + 1]!)) / 2 - cx
    const ay = (y0 + y1 + middle * (path.q[i]! + path.q[i + 1]!)) / 2 - cy
    const apart = Math.hypot(ax, ay)
    if (apart === 0) return false
    const [nx, ny] = [ax / apart, ay / apart]
    const h = cx * nx + cy * ny
    const [h0, h1] = [h + radiusOf(band, f, 0), h + radiusOf(band, f, 1)]
    return outsidePlane(cone, path, i, nx, ny, band.top, h0, band.bottom, h1)
  }
  if (!isSteady(path, i)) return false
  const start = withinArc(scene, i, f)
  const end = withinArc(scene, i + 1, f)
  if (start && end) return true
  // Inside the arc's circle at one end, and coming from (or going to) where the whole arc is ahead (behind): a point
  // of the arc, shifted with the jet, only leaves the circle.
  const way = end ? 1 : start ? -1 : 0
  if (way === 0 || bentCorner(band, f) || bentCorner(band, frame.next[f]!)) return false
  const length = Math.hypot(x1 - x0, y1 - y0)
  if (length === 0) return false
  const [ux, uy] = [(way * (x1 - x0)) / length, (way * (y1 - y0)) / length]
  const from = startHeading(band, f)
  const sweep = frame.sweep[f]!
  if (Math.abs(sweep) > Math.PI + SAME) return false
  return [from, from + sweep / 2, from + sweep].every((at) => Math.cos(at) * ux + Math.sin(at) * uy >= -SAME)
}

/** Whether the jet at a station stands within the circle of arc f at every depth of the band. */
function withinArc({ cone, path, band }: Scene, station: number, f: number): boolean {
  const { frame } = band
  const [p, q] = [path.p[station]!, path.q[station]!]
  const steep = p * p + q * q
  const length = Math.sqrt(1 + steep)
  for (const level of [0, 1] as const) {
    const z = level === 0 ? band.top : band.bottom
    const radius = radiusOf(band, f, level) + HALF
    const dx = path.x[station]! + z * p - frame.cx[f]!
    const dy = path.y[station]! + z * q - frame.cy[f]!
    const apart = Math.hypot(dx, dy)
    const width = (cone.cos * cone.radius - cone.sin * length * z) * length
    if (width < 0) continue
    // Slope along the radius, outward; only the tips of the section count then.
    const radial = apart > 0 ? (p * dx + q * dy) / apart : Math.sqrt(steep)
    const isRadial = Math.abs(Math.abs(radial) - Math.sqrt(steep)) * Math.abs(width) <= SAME
    const leans = Math.abs(cone.sin) * Math.sqrt(steep)
    if (isRadial) {
      if (apart + width / (cone.cos + cone.sin * radial) > radius) return false
      if (width / (cone.cos - cone.sin * radial) - apart > radius) return false
    } else if (!(leans < cone.cos) || apart + width / (cone.cos - leans) > radius) return false
  }
  return true
}
