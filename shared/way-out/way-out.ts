import { frameOf, type Frame } from '../contours/frame.ts'
import type { Body } from '../walls/types.ts'
import { allowancesOf, holdsOf, type Holds } from './holds.ts'
import { FLATTEST, nearest, TOUCH, type Contradiction, type MostBroken, type Nearest } from './nearest.ts'
import type { Direction, Hold, PieceWayOut, WayOut, WaysOut } from './types.ts'

/**
 * How the part leaves the sheet and each slug leaves the part, without touching (`free`) and with the room of
 * the kerf. Straight up is taken first, then straight down, then the steepest slide (up where both are
 * equal). The part is held by its outer loop only: slugs still in it travel along. `kerf` ≥ 0, mm, the
 * narrowest width of the cut. Linear in edges; the body must be sound (`bodyProblems`).
 */
export function wayOut(body: Body, kerf: number): WaysOut {
  const frame = frameOf(body)
  const [part, ...slugs] = body.loops.map((_, loop) => pieceWayOut(frame, loop, kerf))
  if (!part) throw new RangeError('a body without an outline')
  return { part, slugs }
}

function pieceWayOut(frame: Frame, loop: number, kerf: number): PieceWayOut {
  const free = wayFor(frame, loop, 0)
  // More room changes nothing for a piece that already leaves straight up.
  const withinKerf = kerf > 0 && free.verdict !== 'lifts' ? wayFor(frame, loop, kerf) : free
  return { loop, free, withinKerf }
}

function wayFor(frame: Frame, loop: number, kerf: number): WayOut {
  const side = loop === 0 ? 1 : -1
  const holds = holdsOf(frame, loop, side, kerf)
  const up = nearest(mostBrokenOf(holds, holds.up), FLATTEST)
  if (up.out && up.x === 0 && up.y === 0) return leaves(up, 1)
  const down = nearest(mostBrokenOf(holds, holds.down), FLATTEST)
  if (!up.out && !down.out) {
    const allowances = allowancesOf(frame, side, kerf)
    const facetOf = (g: number, way: 'upFacet' | 'downFacet') => allowances[frame.table.rowOfEdge[g]!]![way]
    const hold = (held: Contradiction, way: 'upFacet' | 'downFacet') =>
      held.map(({ rule, weight }): Hold => {
        const g = holds.edge[rule.row]!
        const edge = frame.edgeOf[g]!
        return { loop, edge, facet: facetOf(g, way), heading: Math.atan2(rule.ny, rule.nx), weight }
      })
    const trap = { up: hold(up.held, 'upFacet'), down: hold(down.held, 'downFacet') }
    return { verdict: 'trapped', direction: null, trap }
  }
  return steeper(up, down)
}

/** The steeper of two ways; the one up where they are equal to within what counts as touching. */
function steeper(up: Nearest, down: Nearest): WayOut {
  if (!up.out) return leaves(down, -1)
  if (!down.out) return leaves(up, 1)
  const flatter = Math.hypot(up.x, up.y) - Math.hypot(down.x, down.y)
  return flatter > TOUCH ? leaves(down, -1) : leaves(up, 1)
}

function leaves(way: Nearest, z: 1 | -1): WayOut {
  if (!way.out) throw new Error('no way out to tell')
  const direction = directionOf(way.x, way.y, z)
  const verdict = direction.heading !== null ? 'slides' : z > 0 ? 'lifts' : 'drops'
  return { verdict, direction, trap: null }
}

/** The move (x, y, ±1) as a direction. */
export function directionOf(x: number, y: number, z: 1 | -1): Direction {
  const along = Math.hypot(x, y)
  const length = Math.hypot(along, 1)
  return {
    x: x / length,
    y: y / length,
    z: z / length,
    angle: Math.atan(along),
    heading: along === 0 ? null : Math.atan2(y, x),
  }
}

/** A look over every row. */
export function mostBrokenOf(holds: Holds, bounds: Float64Array): MostBroken {
  const { count, ax, ay, bx, by, round } = holds
  return (x, y, arcs, over) => {
    let most = over
    let row = -1
    let end = 0
    const far = Math.hypot(x, y)
    for (let i = 0; i < count; i++) {
      const bound = bounds[i]!
      const a = ax[i]! * x + ay[i]! * y - bound
      if (a > most) [most, row, end] = [a, i, 0]
      if (round[i] === 0) continue
      const b = bx[i]! * x + by[i]! * y - bound
      if (b > most) [most, row, end] = [b, i, 1]
      if (arcs && far - bound > most && between(holds, i, x, y)) [most, row, end] = [far - bound, i, 2]
    }
    return row < 0 ? null : ruleOf(holds, bounds, row, end, x, y, most)
  }
}

/** The rule at an end (0, 1) of a row, or at the heading of (x, y) within it (2). */
export function ruleOf(
  holds: Holds,
  bounds: Float64Array,
  row: number,
  end: number,
  x: number,
  y: number,
  excess: number,
) {
  const far = Math.hypot(x, y)
  const [nx, ny] =
    end === 0
      ? [holds.ax[row]!, holds.ay[row]!]
      : end === 1
        ? [holds.bx[row]!, holds.by[row]!]
        : [x / far, y / far]
  return { row, nx, ny, bound: bounds[row]!, excess }
}

/** Whether a point's heading lies within a row's range (at most `WIDEST_ROW`, so both turns decide). */
export function between({ ax, ay, bx, by }: Holds, i: number, x: number, y: number): boolean {
  return ax[i]! * y - ay[i]! * x > 0 && x * by[i]! - y * bx[i]! > 0
}
