/**
 * The steepest way out: the point (x, y) nearest to 0 that keeps every rule n·(x, y) ≤ bound. Rules are found
 * one at a time: from 0, the rule most broken is added, the nearest point for the rules found so far is
 * worked out, and so on until none is broken. The distance only grows, so it ends; a handful of rounds is
 * usual, each one look over the rows. Plane geometry only, no units beyond mm per mm.
 */

/** One rule, with the row that it comes from. `excess`: by how much the point asked about breaks it. */
export interface Rule {
  readonly row: number
  readonly nx: number
  readonly ny: number
  readonly bound: number
  readonly excess: number
}

/**
 * The rule that a point breaks most, by more than `over`; null where it breaks none. `arcs` false looks at the
 * ends of every range of headings, true at everything between as well.
 */
export type MostBroken = (x: number, y: number, arcs: boolean, over: number) => Rule | null

/** Rules that contradict each other, with weights as in `Trap`. */
export type Contradiction = readonly { readonly rule: Rule; readonly weight: number }[]

export type Nearest =
  | { readonly out: true; readonly x: number; readonly y: number }
  | { readonly out: false; readonly held: Contradiction }

/**
 * By how much a move may lean into a wall and still count as clear, mm per mm: in the thickest plate (450 mm)
 * less than 0.5 µm, below what any drawing says. Without it a sheared block, whose walls leave one single way
 * out, would be trapped by rounding.
 */
export const TOUCH = 1e-9

/** Rules are taken this much wider, so that a single way out becomes a narrow fan of them ... */
const WIDENED = TOUCH / 2

/** ... and are broken only past this, well above the rounding of n·(x, y) at the flattest slope (2e-12). */
const BROKEN = TOUCH / 10

/**
 * Flattest way out, mm along per mm of rise: 0.006° off the plate. Flatter ones are nonsense on any table,
 * and the bound keeps rounding a thousand times below `TOUCH`.
 */
export const FLATTEST = 1e4

/**
 * `flattest`: slopes above this count as no way out. Exact for arcs: a row with bound c > 0 allows the disc
 * |(x, y)| ≤ c within its headings. The nearest point p of all straight rules is kept first; every other
 * point q that keeps them has q·p ≥ |p|² (p is a projection of 0), so if p breaks an arc, |p| > c at its own
 * heading, then q breaks the arc there too: no way out.
 */
export function nearest(mostBroken: MostBroken, flattest: number): Nearest {
  const found: Rule[] = []
  let basis: readonly Rule[] = []
  let x = 0
  let y = 0
  for (;;) {
    const broken = mostBroken(x, y, false, WIDENED + BROKEN)
    if (!broken || found.some((rule) => sameRule(rule, broken))) break
    const step = onto(broken, found)
    if ('held' in step) return { out: false, held: step.held }
    found.push(broken)
    ;({ x, y, basis } = step)
    if (Math.hypot(x, y) > flattest) return { out: false, held: weighted(pull(x, y, basis), basis) }
  }
  const arc = mostBroken(x, y, true, WIDENED + BROKEN)
  if (arc) {
    // The straight rules say (x, y)·q ≥ |(x, y)|² for every q that keeps them; the arc says less than that.
    const length = Math.hypot(x, y)
    const weights = pull(x, y, basis).map((weight) => weight / length)
    return { out: false, held: weighted([...weights, 1], [...basis, arc]) }
  }
  return { out: true, ...sharpened(x, y, basis, mostBroken) }
}

function sameRule(a: Rule, b: Rule): boolean {
  return a.row === b.row && a.nx === b.nx && a.ny === b.ny
}

type Step =
  | { readonly x: number; readonly y: number; readonly basis: readonly Rule[] }
  | { readonly held: Contradiction }

/**
 * Nearest point once a rule is added that the nearest point so far breaks: it lies on the new rule's line
 * (Seidel's step, in one dimension). Where the rules leave nothing of the line, the new one and the two (or
 * one) that close it contradict each other: the old point lies beyond the line between those two.
 */
function onto(rule: Rule, found: readonly Rule[]): Step {
  const reach = rule.bound + WIDENED
  // Points of the line: reach·n + s·(−ny, nx).
  let low = -Infinity
  let high = Infinity
  let lowRule: Rule | null = null
  let highRule: Rule | null = null
  for (const other of found) {
    const along = rule.nx * other.ny - rule.ny * other.nx
    const left = other.bound + WIDENED - reach * (rule.nx * other.nx + rule.ny * other.ny)
    if (along === 0) {
      if (left < 0) return { held: contradiction([rule, other]) }
    } else if (along > 0) {
      if (left / along < high) [high, highRule] = [left / along, other]
    } else if (left / along > low) [low, lowRule] = [left / along, other]
  }
  if (low > high) return { held: contradiction([rule, lowRule!, highRule!]) }
  const s = Math.min(high, Math.max(low, 0))
  const stop = s > 0 ? lowRule : s < 0 ? highRule : null
  return {
    x: reach * rule.nx - s * rule.ny,
    y: reach * rule.ny + s * rule.nx,
    basis: stop ? [rule, stop] : [rule],
  }
}

/** The same point with the rules as they are, not widened, where that breaks nothing else. */
function sharpened(x: number, y: number, basis: readonly Rule[], mostBroken: MostBroken) {
  const [a, b] = basis
  if (!a) return { x: 0, y: 0 }
  const det = b ? a.nx * b.ny - a.ny * b.nx : 1
  const sharp = b
    ? { x: (a.bound * b.ny - b.bound * a.ny) / det, y: (b.bound * a.nx - a.bound * b.nx) / det }
    : { x: a.bound * a.nx, y: a.bound * a.ny }
  const keeps = Number.isFinite(sharp.x + sharp.y) && !mostBroken(sharp.x, sharp.y, true, TOUCH - BROKEN)
  return keeps ? sharp : { x, y }
}

/** Weights of three rules (two, when they face each other) whose normals cancel. */
function contradiction(rules: readonly Rule[]): Contradiction {
  const [a, b, c] = rules
  if (!c) return weighted([1, 1], [a!, b!])
  const turn = (p: Rule, q: Rule) => p.nx * q.ny - p.ny * q.nx
  // a·(b×c) + b·(c×a) + c·(a×b) = 0 for any three plane vectors; here the three turns have one sign.
  const turns = [turn(b!, c), turn(c, a!), turn(a!, b!)]
  const sign = Math.sign(turns.reduce((sum, t) => sum + t, 0))
  return weighted(
    turns.map((t) => sign * t),
    [a!, b!, c],
  )
}

/** −(x, y) as a sum of the normals that hold the point there; the weights are never negative. */
function pull(x: number, y: number, basis: readonly Rule[]): readonly number[] {
  const [a, b] = basis
  if (!a) return []
  if (!b) return [Math.hypot(x, y)]
  const det = a.nx * b.ny - a.ny * b.nx
  return [-(x * b.ny - y * b.nx) / det, -(a.nx * y - a.ny * x) / det]
}

function weighted(weights: readonly number[], rules: readonly Rule[]): Contradiction {
  const sum = weights.reduce((total, weight) => total + Math.max(0, weight), 0)
  return rules
    .map((rule, i) => ({ rule, weight: Math.max(0, weights[i]!) / sum }))
    .filter(({ weight }) => weight > 0)
}
