import { branchPoint } from '../contours/branch.ts'
import { CornerMode } from '../contours/frame.ts'
import { makeAxisEdge, readAxisEdge, type AxisEdge } from './axis-edges.ts'
import { turnAt, wallCorner, wallCornerAt, type Level } from './level.ts'
import { CornerMove, LeanRefusal, type PassChoices, type PassLimits, type PassProblem } from './types.ts'

/** How a level goes round each corner, what else would work, and why not. */
export interface CornerMoves {
  readonly move: Uint8Array
  readonly offers: Uint8Array
  readonly refusals: Uint8Array
  readonly problems: readonly PassProblem[]
}

/**
 * How far a seam may seem to pass a limit through rounding alone, radians: thousands of times what double
 * precision loses, millions of times finer than a head can turn (as the findings have it).
 */
const LIMIT_ROUNDING = 1e-11

/**
 * How far a bent seam may stand off the straight jet before a convex corner is rather run out, and a concave one
 * told, mm: a twenty-fifth of a machine's repeatability (0.025 mm, common practice, no source).
 */
const BEND_ALLOWED = 1e-3

/** A bend is told from here, mm: what a set-up without a word about it promises (a millionth of a millimetre). */
const BEND_TOLD = 1e-6

/** Past this turn of an arc's prolongation a run out along it would come back to the part, radians: our choice. */
const WIDEST_ARC_RUN_OUT = Math.PI / 4

/**
 * Chooses a move for every corner: the user's where it works, else the first that works of lean, run out and
 * pivot. A lean beside an edge that is too short for it gives way, which can shorten no other edge's room.
 */
export function cornerMovesOf(level: Level, limits: PassLimits, choices: PassChoices): CornerMoves {
  const { frame, previous, gone, member, mode, turnSin, unfit, p, q } = level
  const { count, arc } = frame
  const move = new Uint8Array(count)
  const offers = new Uint8Array(count)
  const refusals = new Uint8Array(count)
  const problems: PassProblem[] = []
  const steepest = limits.tilt === null ? Infinity : Math.tan(limits.tilt + LIMIT_ROUNDING) ** 2
  let stuck = false
  for (let g = 0; g < count; g++) {
    const e = previous[g]!
    if (gone[g] || !(member[g] || member[e])) continue
    const kind = mode[g]
    if (kind === CornerMode.smooth || kind === CornerMode.step) {
      move[g] = kind === CornerMode.smooth ? CornerMove.none : CornerMove.step
      offers[g] = 1 << move[g]!
      refusals[g] = LeanRefusal.noSeam
      continue
    }
    const convex = turnSin[g]! > 0
    let offer = 0
    if (kind === CornerMode.spike) refusals[g] = LeanRefusal.noSeam
    else if (unfit[g]) refusals[g] = LeanRefusal.noJet
    else if (p[g]! * p[g]! + q[g]! * q[g]! > steepest) refusals[g] = LeanRefusal.overLimit
    else if (kind === CornerMode.branch && convex && seamBend(level, g) > BEND_ALLOWED) {
      refusals[g] = LeanRefusal.bent
    } else offer = 1 << CornerMove.lean
    if (convex && e === frame.previous[g]) {
      offer |= 1 << CornerMove.pivot
      if (!(arc[e] || arc[g]) || canRunOut(level, g)) offer |= 1 << CornerMove.runOut
    }
    offers[g] = offer
    if (offer === 0) stuck = true
    move[g] = convex && member[g] !== member[e] ? CornerMove.runOut : firstOffer(offer)
  }
  for (const [g, wished] of choices.corners ?? []) {
    if (g >= 0 && g < count && !gone[g] && offers[g]! & (1 << wished)) move[g] = wished
  }
  if (yieldLeans(level, move, offers, refusals)) stuck = true
  for (const [g, wished] of choices.corners ?? []) {
    if (level.level === 0 && g >= 0 && g < count && !gone[g] && move[g] !== wished) {
      problems.push(cornerProblem(level, 'choice-refused', g))
    }
  }
  for (const g of frame.branches.keys()) {
    if (move[g] !== CornerMove.lean || gone[g]) continue
    const value = seamBend(level, g)
    if (value > BEND_TOLD) problems.push({ ...cornerProblem(level, 'bent-seam', g), value })
  }
  for (let g = 0; stuck && g < count; g++) {
    const cut = member[g] || member[previous[g]!]
    if (!gone[g] && cut && offers[g] === 0) problems.push(cornerProblem(level, 'no-corner-move', g))
  }
  return { move, offers, refusals, problems }
}

function cornerProblem(level: Level, code: PassProblem['code'], g: number): PassProblem {
  return { code, loop: level.frame.loopOf[g]!, at: g, level: level.level, value: null }
}

/** The first that works; where none does the jet leans past its limit, so that a path stands to be looked at. */
function firstOffer(offers: number): CornerMove {
  if (offers & (1 << CornerMove.lean)) return CornerMove.lean
  if (offers & (1 << CornerMove.runOut)) return CornerMove.runOut
  if (offers & (1 << CornerMove.pivot)) return CornerMove.pivot
  return CornerMove.lean
}

/**
 * Takes back leans beside edges that are too short: where the other end is met square, the jet's bottom must
 * still go forward. Giving one up can only bring the next edge's turn, so each corner changes once. Says whether any
 * was taken back.
 */
function yieldLeans(level: Level, move: Uint8Array, offers: Uint8Array, refusals: Uint8Array): boolean {
  const { previous, next, gone, member, frame } = level
  const edge = makeAxisEdge()
  let any = false
  for (let from = 0; from < frame.count; from++) {
    const leans = move[from] === CornerMove.lean
    if (leans === (move[next[from]!] === CornerMove.lean) || gone[from]) continue
    // On to the edges on the far side, as long as one lean after another is given up.
    for (let g = from; member[g];) {
      const h = next[g]!
      const leansAtStart = move[g] === CornerMove.lean
      if (leansAtStart === (move[h] === CornerMove.lean) || hasRoom(level, g, leansAtStart, edge)) break
      const corner = leansAtStart ? g : h
      any = true
      if (refusals[corner] === LeanRefusal.none) refusals[corner] = LeanRefusal.edgeTooShort
      offers[corner]! &= ~(1 << CornerMove.lean)
      const instead = firstOffer(offers[corner]!)
      if (instead === CornerMove.lean) break
      move[corner] = instead
      g = leansAtStart ? previous[g]! : h
    }
  }
  return any
}

/** Whether the jet's bottom goes forward along an edge with a lean at one of its ends. */
function hasRoom(level: Level, g: number, leansAtStart: boolean, edge: AxisEdge): boolean {
  const t = level.frame.body.thickness
  const { length, alongStart, alongEnd } = readAxisEdge(level, g, edge)
  return (leansAtStart ? length - t * alongStart : length + t * alongEnd) > 0
}

/** How far the straight jet at a corner beside an arc stands off the bent seam of the axes, half way down, mm. */
function seamBend(level: Level, g: number): number {
  const { frame, axis, figure, previous, x, y, p, q } = level
  const branch = level.mode[g] === CornerMode.branch && frame.branches.get(g)
  if (!branch) return 0
  const t = frame.body.thickness / 2
  const [before, after] = [figure[previous[g]!]!, figure[g]!]
  const seam = branchPoint(
    branch,
    axis.end.axis[before]! + t * axis.end.slope[before]!,
    axis.start.axis[after]! + t * axis.start.slope[after]!,
  )
  return Math.hypot(seam.x - x[g]! - t * p[g]!, seam.y - y[g]! - t * q[g]!)
}

/** How far the jet runs on past the axis' corner before its wall is finished at every depth, and how far it starts before the next. */
export function runOutLengths(level: Level, g: number): { readonly before: number; readonly after: number } {
  const { frame, axis, figure, previous, x, y, p, q } = level
  const t = frame.body.thickness
  const f1 = figure[previous[g]!]!
  const f2 = figure[g]!
  const top = wallCorner(level, g)
  const bottom = wallCornerAt(level, g, t)
  const u1 = directionBefore(level, g)
  const u2 = directionAfter(level, g)
  let before = 0
  let after = 0
  for (const [dx, dy] of [
    [top.x - x[g]!, top.y - y[g]!],
    [bottom.x - x[g]!, bottom.y - y[g]!],
    [t * p[g]!, t * q[g]!],
  ] as const) {
    before = Math.max(before, dx * u1.x + dy * u1.y)
    after = Math.max(after, -dx * u2.x - dy * u2.y)
  }
  return {
    before: before + halfWidth(level, axis.end.slope[f1]!),
    after: after + halfWidth(level, axis.start.slope[f2]!),
  }
}

/** Half the jet's width across a level plane along its lean, where it is widest within the plate, mm. */
export function halfWidth({ jet, frame }: Level, slope: number): number {
  const length = Math.sqrt(1 + slope * slope)
  const widening = Math.max(0, -Math.tan(jet.taper)) * frame.body.thickness * length
  return (jet.kerf / 2 + widening) * length
}

/** Directions of travel at the axis' corner g, along the edge before it and along its own. */
export function directionBefore(level: Level, g: number): { readonly x: number; readonly y: number } {
  return directionAt(level, level.previous[g]!, g)
}

export function directionAfter(level: Level, g: number): { readonly x: number; readonly y: number } {
  return directionAt(level, g, g)
}

function directionAt({ frame, x, y }: Level, edge: number, g: number) {
  if (!frame.arc[edge]) return { x: frame.ux[edge]!, y: frame.uy[edge]! }
  const dx = x[g]! - frame.cx[edge]!
  const dy = y[g]! - frame.cy[edge]!
  const scale = Math.sign(frame.sweep[edge]!) / Math.hypot(dx, dy)
  return { x: -dy * scale, y: dx * scale }
}

/** A run out along an arc's circle must end before it turns back to the part. */
function canRunOut(level: Level, g: number): boolean {
  const { frame, previous, x, y } = level
  const p = previous[g]!
  if (!frame.arc[p] && !frame.arc[g]) return true
  const { before, after } = runOutLengths(level, g)
  const widest = Math.min(turnAt(level, g), WIDEST_ARC_RUN_OUT)
  const fits = (edge: number, length: number) =>
    !frame.arc[edge] || length <= widest * Math.hypot(x[g]! - frame.cx[edge]!, y[g]! - frame.cy[edge]!)
  return fits(p, before) && fits(g, after)
}
