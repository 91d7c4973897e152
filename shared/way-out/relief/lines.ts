import type { Frame } from '../../contours/frame.ts'
import type { Point } from '../../geometry/types.ts'
import { fillOffsets, makeEdgeEnds, type EdgeEnds } from '../../walls/wall-table.ts'
import type { Holds } from '../holds.ts'
import type { ReliefLine } from './types.ts'
import { meetsWall, type Walls } from './walls-met.ts'

/** Where on the loop a line stands, and which way it goes. */
export interface Stand {
  readonly g: number
  readonly fraction: number
  readonly at: Point
  /** Outward unit normals just before and just after. */
  readonly before: Point
  readonly after: Point
  /** Unit direction of the line, away from the wall. */
  readonly along: Point
}

/** Least part of a line's direction that must go straight away from both walls; else it would graze one. */
const LEAST_AWAY = 0.1

/** A line at the start of a row: towards `aim` where that leads away from the walls, otherwise between their normals. */
export function standOf(frame: Frame, holds: Holds, row: number, aim: Point | null): Stand {
  const g = holds.edge[row]!
  let first = row
  while (first > 0 && holds.edge[first - 1] === g) first--
  let last = row
  while (last + 1 < holds.count && holds.edge[last + 1] === g) last++
  const fraction = (row - first) / (last + 1 - first)
  const after = normalOf(frame, g, fraction)
  const previous = frame.previous[g]!
  const before = fraction > 0 ? after : normalOf(frame, previous, 1)
  const corner = { x: frame.px[g]!, y: frame.py[g]! }
  const at = fraction > 0 ? onArc(frame, g, after) : corner
  const along = directionAt(at, before, after, aim)
  return { g, fraction, at, before, after, along }
}

function directionAt(at: Point, before: Point, after: Point, aim: Point | null): Point {
  if (aim) {
    const far = Math.hypot(aim.x - at.x, aim.y - at.y)
    const to = { x: (aim.x - at.x) / far, y: (aim.y - at.y) / far }
    if (awayFrom(to, before, after) >= LEAST_AWAY) return to
  }
  const x = before.x + after.x
  const y = before.y + after.y
  const length = Math.hypot(x, y)
  // Edges that double back have no middle between their normals.
  return length > 0 ? { x: x / length, y: y / length } : after
}

function awayFrom(along: Point, before: Point, after: Point): number {
  return Math.min(along.x * before.x + along.y * before.y, along.x * after.x + along.y * after.y)
}

function normalOf(frame: Frame, g: number, fraction: number): Point {
  const turn = frame.sweep[g]! * fraction
  const [nx, ny] = [frame.uy[g]!, -frame.ux[g]!]
  return {
    x: nx * Math.cos(turn) - ny * Math.sin(turn),
    y: nx * Math.sin(turn) + ny * Math.cos(turn),
  }
}

function onArc(frame: Frame, g: number, normal: Point): Point {
  const out = Math.sign(frame.sweep[g]!) * frame.radius[g]!
  return { x: frame.cx[g]! + out * normal.x, y: frame.cy[g]! + out * normal.y }
}

/** Offsets of all edges at the depths that matter, worked out once. */
export function offsetsAt(frame: Frame, depths: readonly number[]): readonly EdgeEnds[] {
  return depths.map((depth) => {
    const offsets = makeEdgeEnds(frame.table)
    fillOffsets(frame.table, depth, offsets)
    return offsets
  })
}

/** A line is tested from this share of its length on; at its foot it stands beside the wall on purpose. */
const FOOT = 0.01

/**
 * The line as cut. At each depth the axis of a square cut clears both walls by half a kerf where it is far
 * enough out along the line: past either wall at a convex corner, past both at a concave one.
 */
export function reliefLine(
  frame: Frame,
  { g, fraction, at, before, after, along }: Stand,
  offsets: readonly EdgeEnds[],
  walls: Walls,
  kerf: number,
  reach: (from: Point) => number,
): ReliefLine {
  const previous = frame.previous[g]!
  const convex = fraction > 0 || frame.turn[g]! >= 0
  const away = (n: Point) => Math.max(LEAST_AWAY, n.x * along.x + n.y * along.y)
  const starts = offsets.map(({ start, end }) => {
    const here = start[g]! + fraction * (end[g]! - start[g]!)
    const first = ((fraction > 0 ? here : end[previous]!) + kerf / 2) / away(before)
    const second = (here + kerf / 2) / away(after)
    return convex ? Math.min(first, second) : Math.max(first, second)
  })
  const outermost = Math.max(...starts)
  const from = { x: at.x + outermost * along.x, y: at.y + outermost * along.y }
  const length = reach(from)
  const to = { x: from.x + length * along.x, y: from.y + length * along.y }
  const foot = { x: from.x + FOOT * length * along.x, y: from.y + FOOT * length * along.y }
  const path = { kind: 'line', from: foot, to } as const
  const clear = length > 0 && !meetsWall(walls, path)
  const web = Math.max(0, outermost - Math.min(...starts) - kerf)
  return { edge: frame.edgeOf[g]!, fraction, from, to, web, clear }
}
