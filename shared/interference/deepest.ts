import { biteOnArc, found } from './arc-bite.ts'
import type { Scene } from './clear.ts'
import {
  axisLength,
  biteBeside,
  biteOnSegment,
  deepestBeside,
  deepestOnSegment,
  makeJetLine,
  sectionSpread,
} from './jet-cone.ts'
import { isSteady, lineAt, moveRates, roundMove, type RoundMove } from './moves.ts'
import { BITE_ACCURACY } from './types.ts'
import { bentCorner, cornerStray, isPlane, makeWallLine, radiusOf, wallAt } from './wall-band.ts'

/** Where a move bites deepest into a wall: along the move (u), down the band (s), both 0 to 1. */
export interface Deepest {
  readonly bite: number
  readonly u: number
  readonly depth: number
  readonly x: number
  readonly y: number
}

/** Nothing deeper than the floor; or the search gave up, when it cannot be said. */
export type Search = Deepest | 'none' | 'undecided'

/** Golden section: the share of a bracket that stays. */
const GOLDEN = (Math.sqrt(5) - 1) / 2

/** Share of the band to which the depth of a maximum is narrowed: a maximum is flat, so the bite is far better. */
const FINE_SHARE = 1e-11

/** Places along the move and down the band that are looked at first: the ends, where bites are often deepest, and the middle. */
const SEEDS = [0, 1, 0.5] as const

const line = makeJetLine()
const wall = makeWallLine()

/**
 * The deepest bite of move i into wall f within the band, where it is deeper than `floor` (mm); told to
 * `BITE_ACCURACY` below the truth, and never missed where it passes the floor.
 *
 * A steady move and a plane facet: the bite is concave in place along the move, along the wall and in depth
 * together, so that at each depth it is found in closed form and the depth by golden section. Else the move (and,
 * beside bent walls, the depth) is halved, and a piece is dropped when the bite in its middle plus all that it could
 * gain up to the piece's ends stays below what counts.
 */
export function deepestBite(scene: Scene, i: number, f: number, floor: number): Search {
  const { band, path } = scene
  const even = isPlane(band, f) && !bentCorner(band, f) && !bentCorner(band, band.frame.next[f]!)
  if (even && isSteady(path, i)) return steadyBite(scene, i, f, floor)
  const round = path.sweep[i] === 0 ? null : roundMove(path, i)
  return even ? turningBite(scene, i, f, round, floor) : bentBite(scene, i, f, round, floor)
}

/** The greatest of a concave function of s in [0, 1]; stops early where it cannot reach `floor` (`rate` bounds its slope). */
function peak(value: (s: number) => number, rate: number, floor: number): { s: number; bite: number } {
  let a = 0
  let b = 1
  let x = 1 - GOLDEN
  let y = GOLDEN
  let [vx, vy] = [value(x), value(y)]
  let best = vx < vy ? { s: y, bite: vy } : { s: x, bite: vx }
  while (b - a > FINE_SHARE) {
    if (best.bite + rate * (b - a) <= floor) return best
    if (vx < vy) {
      a = x
      x = y
      vx = vy
      y = a + GOLDEN * (b - a)
      vy = value(y)
      if (vy > best.bite) best = { s: y, bite: vy }
    } else {
      b = y
      y = x
      vy = vx
      x = b - GOLDEN * (b - a)
      vx = value(x)
      if (vx > best.bite) best = { s: x, bite: vx }
    }
  }
  for (const s of [0, 1]) {
    const bite = value(s)
    if (bite > best.bite) best = { s, bite }
  }
  return best
}

/** Bound of how fast a bite changes down the band (per s), axis and wall each moving their own way. */
function depthRate({ cone, band }: Scene, f: number, p: number, q: number): number {
  const height = band.bottom - band.top
  const [high, low] = band.places
  const beside = (ax: number, ay: number, bx: number, by: number) =>
    Math.hypot(bx - ax - height * p, by - ay - height * q)
  return (
    Math.max(
      beside(high.sx[f]!, high.sy[f]!, low.sx[f]!, low.sy[f]!),
      beside(high.ex[f]!, high.ey[f]!, low.ex[f]!, low.ey[f]!),
    ) +
    height * Math.abs(cone.sin) * Math.sqrt(1 + p * p + q * q)
  )
}

/** Steady move, plane facet. At a depth wall minus axis is a parallelogram, and the bite is greatest on its side or at its inside. */
function steadyBite(scene: Scene, i: number, f: number, floor: number): Search {
  const { cone, path, band } = scene
  const height = band.bottom - band.top
  const [p, q] = [path.p[i]!, path.q[i]!]
  const [mx, my] = [path.x[i + 1]! - path.x[i]!, path.y[i + 1]! - path.y[i]!]
  let [u, v] = [0, 0]
  const value = (s: number) => {
    const depth = band.top + s * height
    wallAt(band, f, s, wall)
    const [vx, vy] = [wall.ex - wall.sx, wall.ey - wall.sy]
    const dx = wall.sx - path.x[i]! - depth * p
    const dy = wall.sy - path.y[i]! - depth * q
    const det = vx * my - vy * mx
    if (det !== 0) {
      u = (vx * dy - vy * dx) / det
      v = (dy * mx - dx * my) / det
      if (u >= 0 && u <= 1 && v >= 0 && v <= 1) return biteBeside(cone, p, q, depth, 0, 0)
    }
    let best = -Infinity
    for (let side = 0; side < 4; side++) {
      // Sides 0 and 1: the whole wall from the move's start and end; 2 and 3: the whole move from the wall's ends.
      const far = side & 1
      const along = side < 2
      const sx = dx + (along ? -far * mx : far * vx)
      const sy = dy + (along ? -far * my : far * vy)
      const [wx, wy] = along ? [vx, vy] : [-mx, -my]
      const at = deepestBeside(cone, p, q, sx, sy, wx, wy)
      const bite = biteBeside(cone, p, q, depth, sx + at * wx, sy + at * wy)
      if (bite > best) {
        best = bite
        u = along ? far : at
        v = along ? at : far
      }
    }
    return best
  }
  const { s, bite } = peak(value, depthRate(scene, f, p, q), floor)
  if (bite <= floor) return 'none'
  value(s)
  wallAt(band, f, s, wall)
  return {
    bite,
    u: u < 0 ? 0 : u > 1 ? 1 : u,
    depth: band.top + s * height,
    x: wall.sx + v * (wall.ex - wall.sx),
    y: wall.sy + v * (wall.ey - wall.sy),
  }
}

/** How much a bite can gain while the move goes on by du, whatever the depth within the band. */
function moveGain(scene: Scene, i: number, round: RoundMove | null, square: number): number {
  const { cone, path, band } = scene
  const top = moveRates(path, i, round, band.top)
  const low = moveRates(path, i, round, band.bottom)
  // A point within reach of the jet swings with the axis' direction, and the half-width there changes with its length.
  const reach = cone.radius * sectionSpread(cone, square) * Math.sqrt(square)
  const swing = reach + Math.abs(cone.sin) * band.bottom
  return Math.max(top.axis, low.axis) + swing * top.slope
}

/** The longest that the axis is per mm of depth anywhere along a move, squared: at one of its ends. */
function steepest({ path }: Scene, i: number): number {
  const square = (k: number) => 1 + path.p[k]! * path.p[k]! + path.q[k]! * path.q[k]!
  return Math.max(square(i), square(i + 1))
}

/** A move that turns or goes round, and a plane facet: for each jet line the bite is concave in depth. */
function turningBite(scene: Scene, i: number, f: number, round: RoundMove | null, floor: number): Search {
  const { cone, path, band } = scene
  const height = band.bottom - band.top
  const value = (s: number) => {
    wallAt(band, f, s, wall)
    return biteOnSegment(cone, line, band.top + s * height, wall.sx, wall.sy, wall.ex, wall.ey)
  }
  const gain = moveGain(scene, i, round, steepest(scene, i))
  let best = { u: 0, s: 0, bite: -Infinity }
  for (const u of SEEDS) {
    lineAt(path, i, round, u, line)
    for (const s of SEEDS) {
      const bite = value(s)
      if (bite > best.bite) best = { u, s, bite }
    }
  }
  const pieces = [0, 1]
  for (let looks = 0; pieces.length > 0; looks++) {
    if (looks > scene.budget.each || scene.budget.left-- <= 0) {
      if (best.bite <= floor) return 'undecided'
      break
    }
    const b = pieces.pop()!
    const a = pieces.pop()!
    const u = (a + b) / 2
    lineAt(path, i, round, u, line)
    const slack = (gain * (b - a)) / 2
    const counts = Math.max(floor, best.bite + BITE_ACCURACY)
    const { s, bite } = peak(value, depthRate(scene, f, line.p, line.q), counts - slack)
    if (bite > best.bite) best = { u, s, bite }
    if (bite + slack > Math.max(floor, best.bite + BITE_ACCURACY)) pieces.push(a, u, u, b)
  }
  if (best.bite <= floor) return 'none'
  const depth = band.top + best.s * height
  lineAt(path, i, round, best.u, line)
  wallAt(band, f, best.s, wall)
  const v = deepestOnSegment(cone, line, depth, wall.sx, wall.sy, wall.ex, wall.ey)
  const [x, y] = [wall.sx + v * (wall.ex - wall.sx), wall.sy + v * (wall.ey - wall.sy)]
  return { bite: best.bite, u: best.u, depth, x, y }
}

/** Arcs, bent corners and blended walls: pieces of move and depth are halved together. */
function bentBite(scene: Scene, i: number, f: number, round: RoundMove | null, floor: number): Search {
  const { cone, path, band } = scene
  const { frame } = band
  const height = band.bottom - band.top
  const next = frame.next[f]!
  const isArc = frame.arc[f] === 1
  const square = steepest(scene, i)
  const alongMove = moveGain(scene, i, round, square)
  const narrowing = height * Math.abs(cone.sin) * Math.sqrt(square)
  const radiusRate = isArc ? Math.abs(radiusOf(band, f, 1) - radiusOf(band, f, 0)) : 0
  const bent = bentCorner(band, f) !== null || bentCorner(band, next) !== null
  const value = (u: number, s: number) => {
    lineAt(path, i, round, u, line)
    wallAt(band, f, s, wall)
    const depth = band.top + s * height
    return isArc
      ? biteOnArc(cone, line, depth, frame.cx[f]!, frame.cy[f]!, wall)
      : biteOnSegment(cone, line, depth, wall.sx, wall.sy, wall.ex, wall.ey)
  }
  /** Half a piece's gain down the band: jet and wall part by their sum where the wall is bent. */
  const downGain = (s0: number, s1: number) => {
    if (!bent && !isArc) return (depthRate(scene, f, line.p, line.q) * (s1 - s0)) / 2
    const slope = Math.sqrt(axisLength(line) ** 2 - 1)
    const even = ((height * slope + radiusRate + narrowing) * (s1 - s0)) / 2
    return bent ? even + endStray(s0, s1) : even
  }
  const endStray = (s0: number, s1: number) => {
    const [high, low] = band.places
    const evenStray = (corner: number, ax: number, ay: number, bx: number, by: number) =>
      bentCorner(band, corner)
        ? cornerStray(band, corner, s0, s1)
        : (Math.hypot(bx - ax, by - ay) * (s1 - s0)) / 2
    return Math.max(
      evenStray(f, high.sx[f]!, high.sy[f]!, low.sx[f]!, low.sy[f]!),
      evenStray(next, high.ex[f]!, high.ey[f]!, low.ex[f]!, low.ey[f]!),
    )
  }
  let best = { u: 0, s: 0, bite: -Infinity }
  for (const u of SEEDS) {
    for (const s of SEEDS) {
      const bite = value(u, s)
      if (bite > best.bite) best = { u, s, bite }
    }
  }
  // Pieces wait as u0, u1, s0, s1 and the most that they can hold; of two halves the better is looked into first.
  const pieces: number[] = []
  const most = (u0: number, u1: number, s0: number, s1: number) => {
    const [u, s] = [(u0 + u1) / 2, (s0 + s1) / 2]
    const bite = value(u, s)
    if (bite > best.bite) best = { u, s, bite }
    return bite + (alongMove * (u1 - u0)) / 2 + downGain(s0, s1)
  }
  pieces.push(0, 1, 0, 1, most(0, 1, 0, 1))
  for (let looks = 0; pieces.length > 0;) {
    const bound = pieces.pop()!
    const s1 = pieces.pop()!
    const s0 = pieces.pop()!
    const u1 = pieces.pop()!
    const u0 = pieces.pop()!
    if (bound <= Math.max(floor, best.bite + BITE_ACCURACY)) continue
    if ((looks += 2) > scene.budget.each || (scene.budget.left -= 2) <= 0) {
      if (best.bite <= floor) return 'undecided'
      break
    }
    const u = (u0 + u1) / 2
    const s = (s0 + s1) / 2
    const split = alongMove * (u1 - u0) > 2 * downGain(s0, s1)
    const [a, b] = split
      ? [[u0, u, s0, s1] as const, [u, u1, s0, s1] as const]
      : [[u0, u1, s0, s] as const, [u0, u1, s, s1] as const]
    const [boundA, boundB] = [most(...a), most(...b)]
    if (boundA < boundB) pieces.push(...a, boundA, ...b, boundB)
    else pieces.push(...b, boundB, ...a, boundA)
  }
  if (best.bite <= floor) return 'none'
  value(best.u, best.s)
  const depth = band.top + best.s * height
  if (isArc) {
    const x = frame.cx[f]! + wall.radius * Math.cos(found.heading)
    const y = frame.cy[f]! + wall.radius * Math.sin(found.heading)
    return { bite: best.bite, u: best.u, depth, x, y }
  }
  const v = deepestOnSegment(cone, line, depth, wall.sx, wall.sy, wall.ex, wall.ey)
  const [x, y] = [wall.sx + v * (wall.ex - wall.sx), wall.sy + v * (wall.ey - wall.sy)]
  return { bite: best.bite, u: best.u, depth, x, y }
}
