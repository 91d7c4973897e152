import { CornerMode } from '../contours/frame.ts'
import type { JetPath } from '../passes/types.ts'
import { fallBeside, type JetCone } from './jet-cone.ts'
import { isSteady, roundMove } from './moves.ts'
import { HALF, outsidePlane } from './plane.ts'
import {
  bentCorner,
  cornerStray,
  isPlane,
  makeWallLine,
  radiusOf,
  wallAt,
  type WallBand,
} from './wall-band.ts'

/**
 * Quick proofs that a move keeps clear of a wall, exact where the two touch by construction: the move stays on
 * the outer side of some plane (or of every plane round a cone), or inside some circle at every depth, and the wall
 * on the other side. All are sufficient, none necessary; what no proof clears is searched.
 */

/** Two centres, radii or slopes nearer than this are one, mm: what a few operations lose on coordinates of metres. */
const SAME = 1e-9

export interface Scene {
  /** Looks that the searches of one evaluation may still take together, and each by itself. */
  readonly budget: { left: number; readonly each: number }
  readonly cone: JetCone
  readonly path: JetPath
  readonly band: WallBand
}

/** Whether one of the proofs holds for move i and wall f. */
export function isClear(scene: Scene, i: number, f: number): boolean {
  const { path, band } = scene
  const { arc } = band.frame
  if (outsideWall(scene, i, f)) return true
  if (path.sweep[i] !== 0) return isRoundClear(scene, i, f)
  const e = path.edge[i]!
  if (
    e >= 0 &&
    e !== f &&
    !arc[e] &&
    isPlane(band, e) &&
    liesBehind(band, f, e) &&
    outsideWall(scene, i, e)
  ) {
    return true
  }
  if (arc[f]) return isArcClear(scene, i, f)
  return outsideCorner(scene, i, f) || outsideCorner(scene, i, band.frame.next[f]!)
}

/** Whether f is a line and a straight move keeps outside the endless plane of its wall within the band. */
export function outsideWall({ cone, path, band }: Scene, i: number, f: number): boolean {
  if (path.sweep[i] !== 0 || !isPlane(band, f)) return false
  const nx = band.frame.uy[f]!
  const ny = -band.frame.ux[f]!
  const [high, low] = band.places
  const h0 = high.sx[f]! * nx + high.sy[f]! * ny
  const h1 = low.sx[f]! * nx + low.sy[f]! * ny
  return outsidePlane(cone, path, i, nx, ny, band.top, h0, band.bottom, h1)
}

/**
 * Whether a straight move keeps outside a plane that leans against line f's wall from corner g, one of its ends:
 * square to the mitre there, so that with a convex corner the wall lies behind it. Jets that pass from one
 * wall's prolongation to the next one's do.
 */
function outsideCorner({ cone, path, band }: Scene, i: number, g: number): boolean {
  const { frame } = band
  if (!(frame.turn[g]! > 0) || frame.mode[g] !== CornerMode.mitre) return false
  const scale = 1 / Math.hypot(frame.mx[g]!, frame.my[g]!)
  const [nx, ny] = [frame.mx[g]! * scale, frame.my[g]! * scale]
  const [high, low] = band.places
  const h0 = high.sx[g]! * nx + high.sy[g]! * ny
  const h1 = low.sx[g]! * nx + low.sy[g]! * ny
  return outsidePlane(cone, path, i, nx, ny, band.top, h0, band.bottom, h1)
}

/** Whether wall f lies wholly behind the plane of line e's wall, within the band. */
export function liesBehind(band: WallBand, f: number, e: number): boolean {
  const { frame, places } = band
  const nx = frame.uy[e]!
  const ny = -frame.ux[e]!
  const [high, low] = places
  const h0 = high.sx[e]! * nx + high.sy[e]! * ny + HALF
  const h1 = low.sx[e]! * nx + low.sy[e]! * ny + HALF
  const next = frame.next[f]!
  if (high.sx[f]! * nx + high.sy[f]! * ny > h0 || high.ex[f]! * nx + high.ey[f]! * ny > h0) return false
  if (low.sx[f]! * nx + low.sy[f]! * ny > h1 || low.ex[f]! * nx + low.ey[f]! * ny > h1) return false
  if (!frame.hasArcs) return true
  for (const g of [f, next]) {
    // A bent corner of e itself stays on its plane.
    if (!bentCorner(band, g) || g === e || g === frame.next[e]) continue
    const isBehind = (s0: number, s1: number) => {
      const { x, y, stray } = cornerPlace(band, g, s0, s1)
      return x * nx + y * ny + stray <= Math.min(h0 + s0 * (h1 - h0), h0 + s1 * (h1 - h0))
    }
    if (!everywhere(isBehind)) return false
  }
  if (!frame.arc[f]) return true
  const toward = Math.atan2(ny, nx)
  const c = frame.cx[f]! * nx + frame.cy[f]! * ny
  if (c + radiusOf(band, f, 0) <= h0 && c + radiusOf(band, f, 1) <= h1) return true
  return everywhere((s0, s1) => !holdsHeading(headingsOf(band, f, s0, s1), toward))
}

/** Halvings of the band before a proof that wants every depth gives up. */
const HALVINGS = 5

/** Whether a test that may fail only for being too coarse holds over the whole band, halved where it does not. */
function everywhere(holds: (s0: number, s1: number) => boolean, s0 = 0, s1 = 1, depth = 0): boolean {
  if (holds(s0, s1)) return true
  if (depth === HALVINGS) return false
  const s = (s0 + s1) / 2
  return everywhere(holds, s0, s, depth + 1) && everywhere(holds, s, s1, depth + 1)
}

/** Where corner g is in the middle of a part of the band, and how far it strays from there within it. */
function cornerPlace(band: WallBand, g: number, s0: number, s1: number) {
  wallAt(band, g, (s0 + s1) / 2, line)
  const [high, low] = band.places
  const stray = bentCorner(band, g)
    ? cornerStray(band, g, s0, s1)
    : (Math.hypot(low.sx[g]! - high.sx[g]!, low.sy[g]! - high.sy[g]!) * (s1 - s0)) / 2
  return { x: line.sx, y: line.sy, stray }
}

const line = makeWallLine()

/** A range of headings about a centre: from one, by a signed sweep. */
interface Headings {
  readonly from: number
  readonly sweep: number
}

/** Every heading at which arc f has a wall in a part of the band: smooth ends keep the drawing's, bent ones stray. */
function headingsOf(band: WallBand, f: number, s0: number, s1: number): Headings {
  const { frame } = band
  const next = frame.next[f]!
  const bent = bentCorner(band, f) !== null || bentCorner(band, next) !== null
  if (!bent) {
    const from = Math.atan2(frame.py[f]! - frame.cy[f]!, frame.px[f]! - frame.cx[f]!)
    return { from, sweep: frame.sweep[f]! }
  }
  wallAt(band, f, (s0 + s1) / 2, line)
  const { heading, sweep } = line
  const way = Math.sign(frame.sweep[f]!)
  const [r0, r1] = [radiusOf(band, f, 0), radiusOf(band, f, 1)]
  // An end that strays by s turns by at most asin(s / r) ≤ (π/2) s / r.
  const turn = (g: number) => {
    const stray = bentCorner(band, g) ? cornerStray(band, g, s0, s1) : 0
    return Math.min(Math.PI, ((Math.PI / 2) * stray) / Math.max(0, Math.min(r0, r1)))
  }
  const before = turn(f)
  return { from: heading - way * before, sweep: sweep + way * (before + turn(next)) }
}

/** Whether a heading lies within a range, ends included (to rounding). */
function holdsHeading({ from, sweep }: Headings, heading: number): boolean {
  const turn = (heading - from) * Math.sign(sweep)
  const full = 2 * Math.PI
  return turn - full * Math.floor((turn + SAME) / full) <= Math.abs(sweep) + SAME
}

/** A centre with a distance from it at both levels of the band, even between. */
interface Rings {
  readonly cx: number
  readonly cy: number
  readonly at: readonly [number, number]
}

/**
 * A round move whose jet keeps its slope along the radius: turned about its centre, the jet sweeps a body whose
 * section at a depth is a ring. It stays outside every plane round the cone of its near sides, and inside its far sides' circle.
 */
function isRoundClear({ cone, path, band }: Scene, i: number, f: number): boolean {
  const { radius, radial, across, cx, cy, heading, sweep } = roundMove(path, i)
  if (Math.abs(across[0]) > SAME || Math.abs(across[1]) > SAME) return false
  if (Math.abs(radius[1] - radius[0]) > SAME || Math.abs(radial[1] - radial[0]) > SAME) return false
  const slope = radial[0]
  const square = 1 + slope * slope
  const length = Math.sqrt(square)
  const near: [number, number] = [0, 0]
  const far: [number, number] = [0, 0]
  for (const level of [0, 1] as const) {
    const z = level === 0 ? band.top : band.bottom
    const at = radius[0] + z * slope
    const width = cone.cos * cone.radius - cone.sin * length * z
    near[level] = at - width / fallBeside(cone, slope, square) + HALF
    // How far the section reaches along the radius to either side of the axis.
    const out = (width * length) / (cone.cos + cone.sin * slope)
    const back = (width * length) / (cone.cos - cone.sin * slope)
    far[level] = out >= 0 && back >= 0 ? Math.max(at + out, back - at) - HALF : Infinity
  }
  return (
    behindCone(band, f, { cx, cy, at: near }, { from: heading, sweep }) ||
    outsideRings(band, f, { cx, cy, at: far })
  )
}

/** Whether edge f is an arc about the rings' centre. */
function isAbout({ frame }: WallBand, f: number, { cx, cy }: Rings): boolean {
  return frame.arc[f] === 1 && Math.hypot(frame.cx[f]! - cx, frame.cy[f]! - cy) <= SAME
}

/** The arc about the rings' centre that ends or starts at corner g and turns the given way; −1 for none. */
function arcAt(band: WallBand, g: number, rings: Rings, way: 1 | -1): number {
  for (const e of [g, band.frame.previous[g]!]) {
    if (isAbout(band, e, rings) && Math.sign(band.frame.sweep[e]!) === way) return e
  }
  return -1
}

/** Whether wall f lies behind every plane square to the headings that touches the cone of the rings. */
function behindCone(band: WallBand, f: number, rings: Rings, headings: Headings): boolean {
  const { frame, places } = band
  const { cx, cy, at } = rings
  const withinRings = (e: number) => radiusOf(band, e, 0) <= at[0] && radiusOf(band, e, 1) <= at[1]
  if (isAbout(band, f, rings) && frame.sweep[f]! > 0) return withinRings(f)
  const { from, sweep } = headings
  const most = (x: number, y: number) =>
    holdsHeading(headings, Math.atan2(y - cy, x - cx))
      ? Math.hypot(x - cx, y - cy)
      : Math.max(
          (x - cx) * Math.cos(from) + (y - cy) * Math.sin(from),
          (x - cx) * Math.cos(from + sweep) + (y - cy) * Math.sin(from + sweep),
        )
  const next = frame.next[f]!
  for (const g of [f, next]) {
    if (bentCorner(band, g)) {
      const shared = arcAt(band, g, rings, 1)
      if (shared >= 0 && withinRings(shared)) continue
      const isBehind = (s0: number, s1: number) => {
        const { x, y, stray } = cornerPlace(band, g, s0, s1)
        return most(x, y) + stray <= Math.min(at[0] + s0 * (at[1] - at[0]), at[0] + s1 * (at[1] - at[0]))
      }
      if (!everywhere(isBehind)) return false
      continue
    }
    for (const level of [0, 1] as const) {
      const { sx, sy, ex, ey } = places[level]
      if (most(g === f ? sx[f]! : ex[f]!, g === f ? sy[f]! : ey[f]!) > at[level]) return false
    }
  }
  if (!frame.arc[f]) return isPlane(band, f)
  // Between its ends an arc is farthest along a heading where its own heading is the same.
  const own = headingsOf(band, f, 0, 1)
  const [dx, dy] = [frame.cx[f]! - cx, frame.cy[f]! - cy]
  const both = [own.from, own.from + own.sweep].filter((end) => holdsHeading(headings, end))
  both.push(...[from, from + sweep, Math.atan2(dy, dx)].filter((end) => holdsHeading(own, end)))
  return both.every((end) => {
    if (!holdsHeading(headings, end)) return true
    const out = dx * Math.cos(end) + dy * Math.sin(end)
    return out + radiusOf(band, f, 0) <= at[0] && out + radiusOf(band, f, 1) <= at[1]
  })
}

/** Whether wall f keeps outside the circles of the rings: its endless line or circle does, or what there is of it. */
function outsideRings(band: WallBand, f: number, rings: Rings): boolean {
  const { frame, places } = band
  const { cx, cy, at } = rings
  const isArc = frame.arc[f] === 1
  if (!isArc && !isPlane(band, f)) return false
  const nx = frame.uy[f]!
  const ny = -frame.ux[f]!
  const apart = isArc ? Math.hypot(frame.cx[f]! - cx, frame.cy[f]! - cy) : 0
  const endless = (level: 0 | 1) => {
    if (!isArc) return (cx - places[level].sx[f]!) * nx + (cy - places[level].sy[f]!) * ny >= at[level]
    const radius = radiusOf(band, f, level)
    return (frame.sweep[f]! > 0 ? apart - radius : radius - apart) >= at[level]
  }
  if (endless(0) && endless(1)) return true
  const widest = Math.max(at[0], at[1])
  // From the corner g, does wall f only lead away from the centre?
  const clearFrom = (g: number) => {
    const shared = arcAt(band, g, rings, -1)
    const onRing = shared >= 0 && radiusOf(band, shared, 0) >= at[0] && radiusOf(band, shared, 1) >= at[1]
    const way = g === f ? 1 : -1
    return everywhere((s0, s1) => {
      const { x, y, stray } = cornerPlace(band, g, s0, s1)
      if (!onRing && Math.hypot(x - cx, y - cy) - stray < widest) return false
      return isArc || way * (frame.ux[f]! * (x - cx) + frame.uy[f]! * (y - cy)) >= stray
    })
  }
  const next = frame.next[f]!
  if (!isArc) return clearFrom(f) || clearFrom(next)
  const toward = Math.atan2(cy - frame.cy[f]!, cx - frame.cx[f]!)
  return (
    clearFrom(f) &&
    clearFrom(next) &&
    everywhere((s0, s1) => !holdsHeading(headingsOf(band, f, s0, s1), toward))
  )
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
  const { from, sweep } = headingsOf(band, f, 0, 1)
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
