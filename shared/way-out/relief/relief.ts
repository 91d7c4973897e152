import { contourAt } from '../../contours/contour.ts'
import { frameOf, type Frame } from '../../contours/frame.ts'
import type { Loop, Point } from '../../geometry/types.ts'
import { levelsOf } from '../../walls/levels.ts'
import type { Body } from '../../walls/types.ts'
import type { EdgeEnds } from '../../walls/wall-table.ts'
import { holdsOf } from '../holds.ts'
import { leaveInTurn, type Block, type Leaving } from './leave.ts'
import { offsetsAt, reliefLine, standOf } from './lines.ts'
import { coreOf, exitOf, moatRound, type Core } from './moat.ts'
import { fewestAtLeast, fewestRuns, longestRuns, neededSlope, treesOf, type Trees } from './runs.ts'
import type {
  Relief,
  ReliefLine,
  ReliefPlan,
  ReliefRefusal,
  ReliefRefusalCode,
  ReliefSizes,
} from './types.ts'
import { wallsOf, type Walls } from './walls-met.ts'

/** Lines on an arc may stand at every so many radians: 5°. The count is only called proved where this costs nothing. */
const ARC_ROW = Math.PI / 36

/** How many of the plans with the fewest lines are compared; fewer where they have many (lines, altogether). */
const MOST_PLANS = 24
const LINES_COMPARED = 1000

/** Sides of the polygon that stands for a core's circle. */
const CORE_SIDES = 64

/**
 * Relief cuts for the part (loop 0) or the slug of a hole, in the model told in `types.ts`. Runs of edges that one
 * block can touch are found exactly, and from them the fewest blocks; of the plans with so few, one whose blocks
 * leave in turn and whose lines are clear is taken, the steepest first. Where none leaves in turn, stuck blocks
 * are halved: then the count is a heuristic's. The body must be sound down to its thickness.
 */
export function reliefCuts(body: Body, loop: number, sizes: ReliefSizes): Relief {
  const frame = frameOf(body)
  const { kerf } = sizes
  const holds = holdsOf(frame, loop, -1, kerf, ARC_ROW)
  const depths = levelsOf(body)
  const contours = depths.map((depth): Loop => contourAt(body, depth).loops[loop]!)
  const core = loop === 0 ? null : coreOf(contours)
  const radius = core ? core.radius - sizes.ring : 0
  if (loop > 0 && !(radius > 0)) return refusal(loop, 'slug-too-small')
  const flattest = (loop === 0 ? sizes.moat : radius) / body.thickness
  const trees = treesOf(holds)
  const lengths = longestRuns(trees, flattest)
  if (lengths.includes(0)) return refusal(loop, 'moat-too-narrow', neededSlope(holds) * body.thickness)

  const moat = core ? circleOutline({ ...core, radius }) : moatRound(frame, depths, sizes.ring)
  const hub = core?.centre ?? null
  const reach = (from: Point, along: Point) =>
    hub ? Math.hypot(hub.x - from.x, hub.y - from.y) - radius : exitOf(moat, from, along)
  const ground: Ground = {
    frame,
    holds,
    trees,
    flattest,
    kerf,
    hub,
    offsets: offsetsAt(frame, depths),
    walls: wallsOf(contours),
    reach,
  }
  const { runs, starts } = fewestRuns(lengths)
  const plans = Math.max(2, Math.min(MOST_PLANS, Math.floor(LINES_COMPARED / runs), starts.length))
  let best: Draft | null = null
  for (let k = 0; k < plans; k++) {
    const start = starts[Math.floor((k * starts.length) / plans)]!
    const draft = drafted(ground, runs === 1 ? [] : cutsFrom(lengths, start))
    if (!best || better(draft, best)) best = draft
  }
  // Halving costs lines, so only the best draft is carried on.
  while (best && best.leaving.includes(null)) {
    const halved = halveStuck(best, holds.count)
    if (!halved) return refusal(loop, 'no-order')
    best = drafted(ground, halved)
  }
  return planOf(loop, best!, moat, fewestAtLeast(lengths, holds.round))
}

function refusal(loop: number, code: ReliefRefusalCode, needed: number | null = null): ReliefRefusal {
  return { ok: false, loop, code, needed }
}

interface Ground {
  readonly frame: Frame
  readonly holds: ReturnType<typeof holdsOf>
  readonly trees: Trees
  readonly flattest: number
  readonly kerf: number
  readonly hub: Point | null
  readonly offsets: readonly EdgeEnds[]
  readonly walls: Walls
  readonly reach: (from: Point, along: Point) => number
}

/** Rows at whose start a line stands, what follows from them, and how the blocks leave (null: stuck). */
interface Draft {
  readonly cuts: readonly number[]
  readonly lines: readonly ReliefLine[]
  readonly blocks: readonly Block[]
  readonly leaving: readonly (Leaving | null)[]
}

/** The longest runs one after another, from a row whence they go round. */
function cutsFrom(lengths: Int32Array, start: number): number[] {
  const cuts: number[] = []
  for (let at = start; at < start + lengths.length; at += lengths[at % lengths.length]!) {
    cuts.push(at % lengths.length)
  }
  return cuts.sort((a, b) => a - b)
}

function drafted(ground: Ground, cuts: readonly number[]): Draft {
  const { frame, holds, trees, kerf, offsets, walls, reach } = ground
  const stands = cuts.map((row) => standOf(frame, holds, row, ground.hub))
  const lines = stands.map((stand) =>
    reliefLine(frame, stand, offsets, walls, kerf, (from) => reach(from, stand.along)),
  )
  const none = { x: 0, y: 0 }
  const blocks: Block[] = cuts.map((first, b) => {
    const next = (b + 1) % cuts.length
    const length = ((cuts[next]! - first + holds.count - 1) % holds.count) + 1
    // Left of a line's direction lies what follows it round the loop.
    const [a, z] = [stands[b]!.along, stands[next]!.along]
    return { first, length, startFace: { x: a.y, y: -a.x }, endFace: { x: -z.y, y: z.x } }
  })
  if (cuts.length === 0) blocks.push({ first: 0, length: holds.count, startFace: none, endFace: none })
  const leaving = leaveInTurn(trees, blocks, ground.flattest, kerf / frame.body.thickness)
  return { cuts, lines, blocks, leaving }
}

/** Blocks that leave count most, then lines that are clear, then how steeply the flattest block leaves. */
function better(a: Draft, b: Draft): boolean {
  const stuck = (draft: Draft) => draft.leaving.filter((way) => !way).length
  const blocked = (draft: Draft) => draft.lines.filter((line) => !line.clear).length
  const flattest = (draft: Draft) => Math.max(...draft.leaving.map((way) => way?.direction.angle ?? 0))
  return (stuck(a) - stuck(b) || blocked(a) - blocked(b) || flattest(a) - flattest(b)) < 0
}

/** A line more in the middle of every stuck block; null where none can be divided any further. */
function halveStuck({ cuts, blocks, leaving }: Draft, count: number): number[] | null {
  const more = blocks
    .filter((block, b) => !leaving[b] && block.length > 1)
    .map((block) => (block.first + Math.floor(block.length / 2)) % count)
  return more.length === 0 ? null : [...cuts, ...more].sort((a, b) => a - b)
}

function planOf(loop: number, draft: Draft, moat: readonly Point[], atLeast: number): ReliefPlan {
  const { lines, leaving } = draft
  const lowest = atLeast === 1 ? 0 : atLeast
  return {
    ok: true,
    loop,
    lines,
    blocks: leaving.map((way, line) => ({ line, direction: way!.direction, order: way!.order })),
    moat,
    atLeast: lowest,
    proved: lines.length === lowest,
  }
}

function circleOutline({ centre, radius }: Core): Point[] {
  return Array.from({ length: CORE_SIDES }, (_, k) => {
    const heading = (2 * Math.PI * k) / CORE_SIDES
    return { x: centre.x + radius * Math.cos(heading), y: centre.y + radius * Math.sin(heading) }
  })
}
