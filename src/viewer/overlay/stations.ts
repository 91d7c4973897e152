import { along, type ScreenPoint, type Vec3 } from '../camera/view-state.ts'
import type { EdgeLines } from '../scene/mesh-index.ts'
import { lengthOf } from '../scene/mesh-index.ts'
import type { Place } from './place.ts'

/** A spot along an edge beside which its label may stand. */
export interface Station {
  readonly top: Vec3
  /** The same spot on every line of the wall, the top one first; the outermost on screen bears the label. */
  readonly rims: readonly Vec3[]
  /** Half-way down the wall. */
  readonly middle: Vec3
  /** Into the waste, square to the edge, in the plate's plane. */
  readonly outward: Vec3
}

/** Shares of the edge's length at which a label is tried: the middle first. */
const SHARES = [0.5, 0.32, 0.68, 0.18, 0.82]
/** Gaps between the part and the label that are tried, px. */
const GAPS = [7, 22, 40]
/** A wall whose outward direction is seen shorter than this share of its length faces the eye, or away. */
const HEAD_ON = 0.65

export function stationsOf(lines: EdgeLines): Station[] {
  const top = lines.top[0]
  if (!top || top.length < 6) return []
  return SHARES.map((share) => {
    const { at, tangent } = pointAt(top, share)
    const below = [...lines.level, ...lines.bottom].filter((run) => run.length >= 6)
    const rims = [at, ...below.map((run) => pointAt(run, share).at)]
    const lowest = rims.at(-1)!
    return {
      top: at,
      rims,
      middle: [0, 1, 2].map((axis) => (at[axis]! + lowest[axis]!) / 2) as unknown as Vec3,
      outward: [tangent[1], -tangent[0], 0],
    }
  })
}

/** A place for a label, and the point of the rim that a leader would start from. */
export interface LabelPlace extends Place {
  readonly anchor: { readonly x: number; readonly y: number }
  /** Far enough from the rim to need a leader. */
  readonly apart: boolean
}

/** Places outside the part for a label of a given size, best first. */
export function labelPlaces(
  stations: readonly Station[],
  project: (p: Vec3) => ScreenPoint,
  pixelsPerMm: number,
  size: { width: number; height: number },
): LabelPlace[] {
  const places: LabelPlace[] = []
  for (const gap of GAPS) {
    for (const station of stations) {
      const top = project(station.top)
      const ahead = project(along(station.top, station.outward, 1 / pixelsPerMm))
      const length = Math.hypot(ahead.x - top.x, ahead.y - top.y)
      // A wall that faces the eye has its label below it, one that faces away above.
      const upright = ahead.nearness > top.nearness ? 1 : -1
      const dx = length < HEAD_ON ? 0 : (ahead.x - top.x) / length
      const dy = length < HEAD_ON ? upright : (ahead.y - top.y) / length
      const reach = (p: { x: number; y: number }) => p.x * dx + p.y * dy
      const rim = station.rims.map(project).reduce((far, p) => (reach(p) > reach(far) ? p : far))
      const push = gap + (Math.abs(dx) * size.width) / 2 + (Math.abs(dy) * size.height) / 2
      places.push({
        x: rim.x + dx * push,
        y: rim.y + dy * push,
        anchor: { x: rim.x, y: rim.y },
        apart: gap > GAPS[0]!,
      })
    }
  }
  return places
}

/** The point at a share of a polyline's length, and the direction there. */
export function pointAt(run: Float64Array, share: number): { at: Vec3; tangent: Vec3 } {
  let left = lengthOf(run) * share
  for (let i = 3; i + 2 < run.length; i += 3) {
    const from: Vec3 = [run[i - 3]!, run[i - 2]!, run[i - 1]!]
    const step: Vec3 = [run[i]! - from[0], run[i + 1]! - from[1], run[i + 2]! - from[2]]
    const length = Math.hypot(...step)
    if (length > 0 && (left <= length || i + 5 >= run.length)) {
      const tangent: Vec3 = [step[0] / length, step[1] / length, step[2] / length]
      return { at: along(from, tangent, Math.min(left, length)), tangent }
    }
    left -= length
  }
  return { at: [run[0]!, run[1]!, run[2]!], tangent: [1, 0, 0] }
}
