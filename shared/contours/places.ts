import type { EdgeEnds } from '../walls/wall-table.ts'
import { branchPoint } from './branch.ts'
import { CornerMode, type Frame } from './frame.ts'

/** Ends of every edge at some offsets: edge g runs from (sx, sy)[g] to (ex, ey)[g]. */
export interface Places {
  readonly sx: Float64Array
  readonly sy: Float64Array
  readonly ex: Float64Array
  readonly ey: Float64Array
}

export function makePlaces(count: number): Places {
  return {
    sx: new Float64Array(count),
    sy: new Float64Array(count),
    ex: new Float64Array(count),
    ey: new Float64Array(count),
  }
}

/** Places every corner for the given offset of each edge from the drawing, at its two ends. */
export function place(frame: Frame, offsets: EdgeEnds, out: Places): void {
  const { count, previous, px, py, mode, mx, my, kx, ky, branches } = frame
  const { sx, sy, ex, ey } = out
  for (let g = 0; g < count; g++) {
    const p = previous[g]!
    const o1 = offsets.end[p]!
    const o2 = offsets.start[g]!
    let x = px[g]!
    let y = py[g]!
    switch (mode[g]) {
      case CornerMode.mitre:
        x += o1 * mx[g]! + (o2 - o1) * kx[g]!
        y += o1 * my[g]! + (o2 - o1) * ky[g]!
        break
      case CornerMode.smooth:
        x += o1 * mx[g]!
        y += o1 * my[g]!
        break
      case CornerMode.step:
        ex[p] = x + o1 * mx[g]!
        ey[p] = y + o1 * my[g]!
        sx[g] = x + o2 * mx[g]!
        sy[g] = y + o2 * my[g]!
        continue
      case CornerMode.branch: {
        // At rest a corner is where the drawing has it, to the bit.
        if (o1 !== 0 || o2 !== 0) ({ x, y } = branchPoint(branches.get(g)!, o1, o2))
        break
      }
      default: // a spike stays
    }
    ex[p] = sx[g] = x
    ey[p] = sy[g] = y
  }
}

/** Whether the wall of an edge changes its tilt along it. */
export function blendsAt({ table }: Frame, g: number): boolean {
  return table.blends && table.blended[table.rowOfEdge[g]!] === 1
}

/** Radius of an arc edge at an offset, mm; negative past its vanishing. */
export function radiusAt(frame: Frame, g: number, offset: number): number {
  return frame.arc[g] ? frame.radius[g]! + Math.sign(frame.sweep[g]!) * offset : 0
}

/**
 * Sweep of an arc edge when its ends are placed: the drawing's between smooth corners; otherwise each end has
 * turned by less than half a turn about the centre (a corner never crosses its axis).
 */
export function sweepAt(frame: Frame, g: number, places: Places): number {
  if (!frame.arc[g]) return 0
  const { px, py, mode, next } = frame
  const cx = frame.cx[g]!
  const cy = frame.cy[g]!
  const n = next[g]!
  let sweep = frame.sweep[g]!
  if (mode[g] === CornerMode.branch) {
    sweep -= turnAbout(px[g]! - cx, py[g]! - cy, places.sx[g]! - cx, places.sy[g]! - cy)
  }
  if (mode[n] === CornerMode.branch) {
    sweep += turnAbout(px[n]! - cx, py[n]! - cy, places.ex[g]! - cx, places.ey[g]! - cy)
  }
  return sweep
}

function turnAbout(ax: number, ay: number, bx: number, by: number): number {
  return Math.atan2(ax * by - ay * bx, ax * bx + ay * by)
}
