import { jetAt } from '../passes/jet-at.ts'
import type { JetPath, Pass } from '../passes/types.ts'
import { headingOf, lessTurns, nearestTilt, secondTiltOf, tiltOf } from './kinematics.ts'
import { wishedPace, type WishedMotion } from './motion.ts'
import { programColumns, putStation, timesOf, type HeadProgram, type ProgramWriter } from './program.ts'
import { isSteady, makeSlopeRun, slopeRun } from './slope-run.ts'
import {
  DIRECTION_TOLERANCE,
  HOLD_SHARE,
  POSITION_TOLERANCE,
  type HeadAxes,
  type HeadSpec,
  type MotionTolerance,
} from './types.ts'

/**
 * Splits moves until a machine that goes evenly in tip, outer and inner axis from line to line keeps to the jet. An
 * accepted piece is proved, not only sampled: the difference f(u) between commanded and wanted direction is looked at
 * in quarters of the piece, and between two looks it can rise above them by no more than max|f″|·(length/4)²/8. The bound
 * of f″ is taken in the frame that turns with the outer axis, in which a steady tilt round an arc is no change at all.
 * The tip likewise.
 */

/** Looks per piece, and the share of |f″|·length² by which f can rise between two. */
const LOOKS = 4
const BETWEEN_LOOKS = 1 / (8 * LOOKS * LOOKS)
/** Halvings of one move: pieces of 1e-9 of a move. The bound above shrinks fourfold with each, so that more is a mistake. */
const DEEPEST = 30

const within: MotionTolerance = { direction: DIRECTION_TOLERANCE, position: POSITION_TOLERANCE }

/**
 * What a program says, line by line. `axes` must come from the same path, passes, head and direction tolerance. The
 * direction is within `tolerance.direction` of the jet everywhere, the tip within `tolerance.position` of its place.
 */
export function refine(
  path: JetPath,
  passes: readonly Pass[],
  axes: HeadAxes,
  head: HeadSpec,
  standoff: number,
  wish: WishedMotion | null = null,
  tolerance: MotionTolerance = within,
): HeadProgram {
  const w = programColumns(2 * path.count + 16)
  const refiner = makeRefiner(path, axes, head, standoff, tolerance, w)
  for (const [k, { first, last }] of passes.entries()) {
    for (let i = first; i <= last; i++) {
      const [outer, inner, dwell] = [axes.outer[i]!, axes.inner[i]!, axes.dwell[i]!]
      if (dwell !== 0) {
        const arrival = outer - dwell
        put(refiner, i, 0, arrival, heldTilt(refiner, path.p[i]!, path.q[i]!, arrival))
      }
      put(refiner, i, 0, outer, inner)
      if (i < last && !isStill(path, axes, i)) refineMove(refiner, i)
    }
    w.ends[k] = w.count
  }
  return timesOf(head, wishedPace(path, passes, wish), w)
}

/** Goes along a straight line with all angles at rest: exact as it is. */
function isStill(path: JetPath, { outer, inner, dwell }: HeadAxes, i: number): boolean {
  return isSteady(path, i) && outer[i] === outer[i + 1]! - dwell[i + 1]! && inner[i] === inner[i + 1]
}

interface Refiner {
  readonly path: JetPath
  readonly axes: HeadAxes
  readonly head: HeadSpec
  readonly standoff: number
  /** Greatest chord between unit vectors that are the tolerance apart. */
  readonly chord: number
  readonly position: number
  /** Slope up to which C is held. */
  readonly flat: number
  readonly w: ProgramWriter
}

function makeRefiner(
  path: JetPath,
  axes: HeadAxes,
  head: HeadSpec,
  standoff: number,
  { direction, position }: MotionTolerance,
  w: ProgramWriter,
): Refiner {
  const chord = 2 * Math.sin(direction / 2)
  return { path, axes, head, standoff, chord, position, flat: Math.sin(HOLD_SHARE * direction), w }
}

function put({ path, standoff, w }: Refiner, i: number, u: number, outer: number, inner: number) {
  const { x, y, p, q } =
    u === 0 ? { x: path.x[i]!, y: path.y[i]!, p: path.p[i]!, q: path.q[i]! } : jetAt(path, i, u)
  const size = standoff / Math.sqrt(1 + p * p + q * q)
  putStation(w, i, u, x - p * size, y - q * size, size, outer, inner)
}

/** A that comes nearest for a C that is held; at the end of A's travel it stays there, no farther off than the jet is from vertical. */
function heldTilt({ head }: Refiner, p: number, q: number, c: number): number {
  return Math.min(head.inner.to, Math.max(head.inner.from, nearestTilt(p, q, c)))
}

/** A piece of a move: parts, and axes at both ends. */
interface Piece {
  readonly from: number
  readonly to: number
  readonly outer: readonly [number, number]
  readonly inner: readonly [number, number]
}

function refineMove(refiner: Refiner, i: number) {
  const { path, axes, flat } = refiner
  const { outer, inner, dwell, held } = axes
  const turn = path.sweep[i]!
  const [from, to] = [outer[i]!, outer[i + 1]! - dwell[i + 1]!]
  const arriving = dwell[i + 1] === 0 ? inner[i + 1]! : heldTilt(refiner, path.p[i + 1]!, path.q[i + 1]!, to)
  const bounds = moveBounds(refiner, i)
  const part = axes.crossing[i]!
  if (part === 0) {
    const free = axes.kind === 'C-A' && (held[i] !== 0 || held[i + 1] !== 0)
    split(refiner, i, free, bounds, { from: 0, to: 1, outer: [from, to], inner: [inner[i]!, arriving] }, 0)
    return
  }
  // Past the vertical C keeps one heading up to it and the other one after it.
  const { p, q } = jetAt(path, i, part)
  const jump = to - from - turn
  const steepest = Math.max(Math.hypot(path.p[i]!, path.q[i]!), Math.hypot(path.p[i + 1]!, path.q[i + 1]!))
  // A jump that stays inside the tolerance even where the jet is steepest is spread over the move; others are made standing.
  const spread = Math.abs(jump) * steepest <= flat
  const [before, after] = [
    from + turn * part + (spread ? jump / 2 : 0),
    to - turn * (1 - part) - (spread ? jump / 2 : 0),
  ]
  const [tiltBefore, tiltAfter] = [heldTilt(refiner, p, q, before), heldTilt(refiner, p, q, after)]
  split(
    refiner,
    i,
    true,
    bounds,
    { from: 0, to: part, outer: [from, before], inner: [inner[i]!, tiltBefore] },
    0,
  )
  put(refiner, i, part, before, tiltBefore)
  if (!spread) put(refiner, i, part, after, tiltAfter)
  split(refiner, i, true, bounds, { from: part, to: 1, outer: [after, to], inner: [tiltAfter, arriving] }, 0)
}

/** Bounds over a whole move, per part u of it and its square. */
interface MoveBounds {
  readonly turn: number
  readonly steepest: number
  /** Least length of (p, q, 1). */
  readonly least: number
  readonly change: number
  /** Second derivative of the top point. */
  readonly top: number
}

const shape = makeSlopeRun()

function moveBounds({ path }: Refiner, i: number): MoveBounds {
  const { x, y, p, q, sweep, cx, cy } = path
  slopeRun(path, i, shape)
  const turn = sweep[i]!
  const steepest = Math.max(Math.hypot(p[i]!, q[i]!), Math.hypot(p[i + 1]!, q[i + 1]!))
  const radius = (k: number) => (turn === 0 ? 0 : Math.hypot(x[k]! - cx[i]!, y[k]! - cy[i]!))
  const [from, to] = [radius(i), radius(i + 1)]
  const top = turn * turn * Math.max(from, to) + 2 * Math.abs(turn) * Math.abs(to - from)
  return { turn, steepest, least: Math.hypot(1, shape.flattest), change: shape.change, top }
}

function split(refiner: Refiner, i: number, free: boolean, bounds: MoveBounds, piece: Piece, depth: number) {
  if (keepsTo(refiner, i, bounds, piece)) return
  if (depth === DEEPEST) throw new Error(`move ${i} cannot be split finely enough`)
  const { from, to, outer, inner } = piece
  const middle = (from + to) / 2
  const { p, q } = jetAt(refiner.path, i, middle)
  const [o, n] = anglesAt(refiner, i, free, p, q, (outer[0] + outer[1]) / 2)
  split(refiner, i, free, bounds, { from, to: middle, outer: [outer[0], o], inner: [inner[0], n] }, depth + 1)
  put(refiner, i, middle, o, n)
  split(refiner, i, free, bounds, { from: middle, to, outer: [o, outer[1]], inner: [n, inner[1]] }, depth + 1)
}

/** Exact angles, on the move's own branch and nearest to where the outer axis would be on an even way; where C is free it keeps that way. */
function anglesAt(
  refiner: Refiner,
  i: number,
  free: boolean,
  p: number,
  q: number,
  even: number,
): readonly [outer: number, inner: number] {
  const { kind, inner } = refiner.axes
  if (kind === 'A-B') return [Math.atan(q), secondTiltOf(p, q)]
  if (free) return [even, heldTilt(refiner, p, q, even)]
  const other = inner[i]! < 0
  const heading = headingOf(p, q) + (other ? Math.PI : 0)
  const tilt = tiltOf(p, q)
  return [even + lessTurns(heading - even), other ? -tilt : tilt]
}

/** Where a piece is looked at, in quarters: first where an even way is farthest off as a rule. */
const order = [2, 1, 3, 0, 4]

/** Is an even way over the piece within both tolerances everywhere? */
function keepsTo(
  { path, axes, standoff, chord, position }: Refiner,
  i: number,
  bounds: MoveBounds,
  piece: Piece,
) {
  const { from, to, outer, inner } = piece
  const { rise, tipRise } = risesBetweenLooks(axes, standoff, bounds, piece)
  if (!(rise <= chord && tipRise <= position)) return false
  tipAt(path, i, from, standoff, start)
  tipAt(path, i, to, standoff, end)
  const turning = axes.kind === 'C-A'
  for (const k of order) {
    const v = k / LOOKS
    tipAt(path, i, from + v * (to - from), standoff, tip)
    const o = outer[0] + v * (outer[1] - outer[0])
    const n = inner[0] + v * (inner[1] - inner[0])
    const sn = Math.sin(n)
    const cn = Math.cos(n)
    const ux = (turning ? Math.sin(o) * sn : sn) - tip.ux
    const uy = -(turning ? Math.cos(o) * sn : Math.sin(o) * cn) - tip.uy
    const uz = (turning ? cn : Math.cos(o) * cn) - tip.uz
    if (!(Math.sqrt(ux * ux + uy * uy + uz * uz) + rise <= chord)) return false
    const x = tip.x - start.x - v * (end.x - start.x)
    const y = tip.y - start.y - v * (end.y - start.y)
    const z = tip.z - start.z - v * (end.z - start.z)
    if (!(Math.sqrt(x * x + y * y + z * z) + tipRise <= position)) return false
  }
  return true
}

/** A wanted tip and the unit vector up the nozzle. */
interface Tip {
  x: number
  y: number
  z: number
  ux: number
  uy: number
  uz: number
}

const makeTip = (): Tip => ({ x: 0, y: 0, z: 0, ux: 0, uy: 0, uz: 0 })
const start = makeTip()
const end = makeTip()
const tip = makeTip()

function tipAt(path: JetPath, i: number, u: number, standoff: number, out: Tip) {
  const { x, y, p, q } = jetAt(path, i, u)
  const size = Math.sqrt(1 + p * p + q * q)
  out.ux = -p / size
  out.uy = -q / size
  out.uz = 1 / size
  out.x = x + standoff * out.ux
  out.y = y + standoff * out.uy
  out.z = standoff * out.uz
}

/**
 * How far the direction's difference, and the tip's, can rise between two looks. With v = (p, q, 1) the wanted direction v/|v| has a
 * second derivative of at most |v″|/|v| + 2(|v′|/|v|)² (derived); the commanded one, in the frame that turns with the
 * outer axis, turns evenly in a plane: the inner axis' rate squared.
 */
function risesBetweenLooks(
  { kind }: HeadAxes,
  standoff: number,
  bounds: MoveBounds,
  { from, to, outer, inner }: Piece,
) {
  const length = to - from
  const rate = (outer[1] - outer[0]) / length
  const tilting = (inner[1] - inner[0]) / length
  const { turn, steepest, least, change, top } = bounds
  const still = curvature(Math.abs(turn), steepest, change, least)
  const round = Math.abs(turn - rate)
  const bent =
    kind === 'C-A'
      ? curvature(round, steepest, change, least)
      : crossedCurvature(
          Math.abs(turn) * steepest + change,
          turn * turn * steepest + 2 * Math.abs(turn) * change,
          rate,
          steepest,
        )
  const share = BETWEEN_LOOKS * length * length
  return { rise: share * (tilting * tilting + bent), tipRise: share * (top + standoff * still) }
}

/** Bound of the second derivative of v/|v| when v turns about Z at a rate while its slope goes evenly by `change`. */
function curvature(rate: number, steepest: number, change: number, least: number): number {
  const first = rate * steepest + change
  const second = rate * rate * steepest + 2 * rate * change
  return second / least + 2 * (first / least) ** 2
}

/** The same seen from a frame that turns about X, for a v of which the first and second derivative are bounded. */
function crossedCurvature(first: number, second: number, rate: number, steepest: number): number {
  const across = Math.abs(rate) * Math.hypot(1, steepest)
  return second + 2 * Math.abs(rate) * first + Math.abs(rate) * across + 2 * (first + across) ** 2
}
