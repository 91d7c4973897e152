import { CornerMode } from '../contours/frame.ts'
import { makeAxisEdge, readAxisEdge } from './axis-edges.ts'
import type { Level } from './level.ts'
import { meetAcross } from './meet-across.ts'
import type { PassProblem } from './types.ts'

/** A level without the edges that the jet is too thick to follow, and what that leaves. */
export interface Followed {
  readonly level: Level
  readonly problems: readonly PassProblem[]
  /** Loops of which nothing is left to follow. */
  readonly lost: ReadonlySet<number>
}

/** Material left by less than this is not worth a word, mm: as with fillets (common practice, no source). */
const WORTH_SAYING = 0.01

/**
 * In a hollow finer than the jet the axis' edges shrink to nothing, at the top face or at the bottom. Such edges
 * leave the way one by one, and their neighbours meet; only edges beside one that left are looked at again, so
 * the time is linear. A hole of which nothing stays is too small for the jets of its walls: told with the
 * diameter at which they just do not cross (for other shapes than round ones a width, and a bound).
 */
export function followable(level: Level): Followed {
  const { frame } = level
  const edge = makeAxisEdge()
  const waiting: number[] = []
  const { x, y, p, q, next: after, mode: kind } = level
  const { ux, uy, arc } = frame
  const t = frame.body.thickness
  for (let g = 0; g < frame.count; g++) {
    const h = after[g]!
    if (!arc[g] && kind[g] === CornerMode.mitre && kind[h] === CornerMode.mitre) {
      // What `shrinksAway` asks, for the usual edge.
      const length = (x[h]! - x[g]!) * ux[g]! + (y[h]! - y[g]!) * uy[g]!
      const gain = (p[h]! - p[g]!) * ux[g]! + (q[h]! - q[g]!) * uy[g]!
      if (length > 0 && length + t * gain > 0) continue
    }
    if (shrinksAway(level, g, edge)) waiting.push(g)
  }
  if (waiting.length === 0) return { level, problems: [], lost: new Set() }

  const own: Level = {
    ...level,
    previous: level.previous.slice(),
    next: level.next.slice(),
    turnSin: level.turnSin.slice(),
    turnCos: level.turnCos.slice(),
    mode: level.mode.slice(),
    gaps: true,
  }
  const { previous, next, gone } = own
  const left: number[] = []
  const lost = new Set<number>()
  const edgesOf = frame.loopStart.slice(1).map((end, loop) => end - frame.loopStart[loop]!)
  for (let i = 0; i < waiting.length; i++) {
    const g = waiting[i]!
    const loop = frame.loopOf[g]!
    if (gone[g] || lost.has(loop) || !shrinksAway(own, g, edge)) continue
    const [p, h] = [previous[g]!, next[g]!]
    gone[g] = 1
    left.push(g)
    edgesOf[loop]!--
    next[p] = h
    previous[h] = p
    if (edgesOf[loop]! < 2 || p === h) {
      lost.add(loop)
      continue
    }
    if (!meetAcross(own, p, h)) {
      // Two sides of a slot narrower than the jet: neither can be followed.
      own.mode[h] = CornerMode.spike
    }
    waiting.push(p, h)
  }
  const problems = [...lost].map((loop) => lostProblem(own, loop))
  for (const g of left) {
    const loop = frame.loopOf[g]!
    if (lost.has(loop)) continue
    const value = leftAt(own, g)
    if (value < WORTH_SAYING) continue
    problems.push({ code: 'detail-finer-than-jet', loop, at: g, level: level.level, value })
  }
  for (const loop of lost) gone.fill(1, frame.loopStart[loop], frame.loopStart[loop + 1])
  return { level: own, problems, lost }
}

/** Whether the axis would go backward along an edge, at the top face or at the bottom. */
function shrinksAway(level: Level, g: number, edge: ReturnType<typeof makeAxisEdge>): boolean {
  const { frame, next, mode } = level
  const h = next[g]!
  if (mode[g] === CornerMode.spike || mode[h] === CornerMode.spike) {
    return level.previous[g] !== frame.previous[g] || h !== frame.next[g]
  }
  const t = frame.body.thickness
  const { arc, length, alongStart, alongEnd, radius, grow, slopeStart, slopeEnd, rise } = readAxisEdge(
    level,
    g,
    edge,
  )
  if (!arc) return !(length > 0 && length + t * (alongEnd - alongStart) > 0)
  const ends = [radius, radius + t * grow * slopeStart, radius + rise, radius + rise + t * grow * slopeEnd]
  return !(length > 0 && Math.min(...ends) > 0)
}

function lostProblem({ frame, axis, figure, level }: Level, loop: number): PassProblem {
  let most = 0
  for (let g = frame.loopStart[loop]!; g < frame.loopStart[loop + 1]!; g++) {
    for (const ends of [axis.start, axis.end]) {
      const top = ends.axis[figure[g]!]!
      most = Math.max(most, top, top + frame.body.thickness * ends.slope[figure[g]!]!)
    }
  }
  return loop > 0
    ? { code: 'hole-too-small-for-tilt', loop, at: -1, level, value: 2 * most }
    : { code: 'detail-finer-than-jet', loop, at: -1, level, value: null }
}

/** The next edge that has not left; the way there is cut short for those who ask after. */
function nextLeft({ gone, next }: Level, g: number): number {
  let h = g
  while (gone[h]) h = next[h]!
  for (let at = g; gone[at];) {
    const after = next[at]!
    next[at] = h
    at = after
  }
  return h
}

/** What the passing jet leaves on an edge that was left out: from its middle at the top face to the corner of the axis there, less the axis' own distance. */
function leftAt(level: Level, g: number): number {
  const { frame, axis, figure } = level
  const h = nextLeft(level, g)
  const e = frame.next[g]!
  const wall = axis.start.wall[figure[g]!]!
  let x: number
  let y: number
  if (frame.arc[g]) {
    const [cx, cy] = [frame.cx[g]!, frame.cy[g]!]
    const middle = Math.atan2(frame.py[g]! - cy, frame.px[g]! - cx) + frame.sweep[g]! / 2
    const radius = frame.radius[g]! + Math.sign(frame.sweep[g]!) * wall
    x = cx + radius * Math.cos(middle)
    y = cy + radius * Math.sin(middle)
  } else {
    x = (frame.px[g]! + frame.px[e]!) / 2 + wall * frame.uy[g]!
    y = (frame.py[g]! + frame.py[e]!) / 2 - wall * frame.ux[g]!
  }
  return Math.hypot(level.x[h]! - x, level.y[h]! - y) - (axis.start.axis[figure[g]!]! - wall)
}
