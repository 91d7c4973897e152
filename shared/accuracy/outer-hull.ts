import { reachOf, type Spots } from './spots.ts'

/** Corners of a convex polygon, counter-clockwise, no three in line. */
export interface Hull {
  readonly x: Float64Array
  readonly y: Float64Array
}

/**
 * Convex hull of spots, each taken as the polygon of its tangents in `sides` directions (a power of two, at least 4; the
 * first along x): it holds every spot and stands outside the true hull nowhere by more than ρ(1/cos(π/sides) − 1), ρ the
 * flattest spot's radius of curvature. Between two directions one corner of each polygon matters, and only if no other
 * spot reaches further in both. What is beaten over a quarter is beaten over every part of it, so quarters are halved
 * with ever fewer spots: near-linear, and n log n in what is left to sort.
 */
export function outerHull(spots: Spots, sides: number): Hull {
  const xs: number[] = []
  const ys: number[] = []
  const all = Uint32Array.from({ length: spots.count }, (_, i) => i)
  for (let k = 0; k < 4; k++) {
    putSector(spots, sides, (k * sides) / 4, ((k + 1) * sides) / 4, all, xs, ys)
  }
  return hullOfPoints(xs, ys)
}

/** Corners that matter between directions number `from` and `to`, among the given spots. */
function putSector(
  spots: Spots,
  sides: number,
  from: number,
  to: number,
  among: Uint32Array,
  xs: number[],
  ys: number[],
): void {
  const count = among.length
  if (count === 0) return
  const [c0, s0] = direction(from, sides)
  const [c1, s1] = direction(to, sides)
  const here = reachOf(spots, among, c0, s0)
  const there = reachOf(spots, among, c1, s1)
  let best = 0
  for (let k = 1; k < count; k++) if (here[k]! + there[k]! > here[best]! + there[best]!) best = k
  const left = new Uint32Array(count)
  let kept = 0
  const [most, mostThere] = [here[best]!, there[best]!]
  for (let k = 0; k < count; k++) {
    if (k !== best && here[k]! <= most && there[k]! <= mostThere) continue
    here[kept] = here[k]!
    there[kept] = there[k]!
    left[kept++] = among[k]!
  }
  if (to - from > 1) {
    const middle = (from + to) / 2
    putSector(spots, sides, from, middle, left.subarray(0, kept), xs, ys)
    putSector(spots, sides, middle, to, left.subarray(0, kept), xs, ys)
    return
  }
  const det = c0 * s1 - s0 * c1
  for (let k = 0; k < kept; k++) {
    const i = left[k]!
    // A point is its own polygon: no rounding then tells one corner five ways.
    const isPoint = spots.width[i] === 0 && spots.pad[i] === 0
    xs.push(isPoint ? spots.x[i]! : (here[k]! * s1 - there[k]! * s0) / det)
    ys.push(isPoint ? spots.y[i]! : (there[k]! * c0 - here[k]! * c1) / det)
  }
}

function direction(k: number, sides: number): readonly [number, number] {
  const heading = (2 * Math.PI * k) / sides
  return [Math.cos(heading), Math.sin(heading)]
}

/** Lower chain, then upper (Andrew's, a textbook method): points in order of x, right turns taken out. */
export function hullOfPoints(xs: ArrayLike<number>, ys: ArrayLike<number>): Hull {
  const order = Uint32Array.from({ length: xs.length }, (_, i) => i).sort(
    (a, b) => xs[a]! - xs[b]! || ys[a]! - ys[b]!,
  )
  const chain: number[] = []
  const add = (i: number, floor: number) => {
    while (chain.length >= floor + 2 && !turnsLeft(xs, ys, chain.at(-2)!, chain.at(-1)!, i)) chain.pop()
    chain.push(i)
  }
  for (const i of order) add(i, 0)
  const floor = chain.length - 1
  for (let k = order.length - 2; k >= 0; k--) add(order[k]!, floor)
  // The first point came round again.
  if (chain.length > 1) chain.pop()
  return { x: Float64Array.from(chain, (i) => xs[i]!), y: Float64Array.from(chain, (i) => ys[i]!) }
}

function turnsLeft(xs: ArrayLike<number>, ys: ArrayLike<number>, a: number, b: number, c: number): boolean {
  return (xs[b]! - xs[a]!) * (ys[c]! - ys[a]!) - (ys[b]! - ys[a]!) * (xs[c]! - xs[a]!) > 0
}

/**
 * The furthest that a point of one convex polygon stands outside another: the greatest difference of their reaches over
 * all directions. Walks both rounds of corners once; between two normals the difference of corners v has its greatest
 * reach, |v|, where v itself points there.
 */
export function furthestOutside(outer: Hull, inner: Hull): number {
  const [n, m] = [outer.x.length, inner.x.length]
  if (n === 0 || m === 0) return 0
  // Both start at the lowest point (the last of several, going round): extreme from the heading −π/2 on.
  let i = lowest(outer)
  let j = lowest(inner)
  let heading = -Math.PI / 2
  let furthest = 0
  for (let steps = 0; steps <= n + m; steps++) {
    const nextOuter = normalAfter(outer, i, heading)
    const nextInner = normalAfter(inner, j, heading)
    const until = Math.min(nextOuter, nextInner, 1.5 * Math.PI)
    const vx = outer.x[i]! - inner.x[j]!
    const vy = outer.y[i]! - inner.y[j]!
    furthest = Math.max(
      furthest,
      vx * Math.cos(heading) + vy * Math.sin(heading),
      vx * Math.cos(until) + vy * Math.sin(until),
      isBetween(Math.atan2(vy, vx), heading, until) ? Math.hypot(vx, vy) : 0,
    )
    if (until >= 1.5 * Math.PI) break
    if (nextOuter === until) i = (i + 1) % n
    if (nextInner === until) j = (j + 1) % m
    heading = until
  }
  return furthest
}

function lowest({ x, y }: Hull): number {
  let best = 0
  for (let i = 1; i < x.length; i++) if (y[i]! < y[best]! || (y[i] === y[best] && x[i]! > x[best]!)) best = i
  return best
}

/** Heading, not before `from`, of the outward normal of the side that leaves corner i. */
function normalAfter({ x, y }: Hull, i: number, from: number): number {
  const j = (i + 1) % x.length
  if (j === i) return Infinity
  let heading = Math.atan2(-(x[j]! - x[i]!), y[j]! - y[i]!)
  while (heading < from - SAME_HEADING) heading += 2 * Math.PI
  return Math.max(heading, from)
}

/** Rounding of a heading, radians: sides of a convex round that seem to turn back by this are parallel. */
const SAME_HEADING = 1e-9

function isBetween(heading: number, from: number, to: number): boolean {
  let at = heading
  while (at < from) at += 2 * Math.PI
  return at <= to
}
