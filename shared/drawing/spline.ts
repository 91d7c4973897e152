import type { Point } from '../geometry/types.ts'
import type { Curve } from './approximate.ts'
import { DrawingError } from './errors.ts'
import type { SplineShape } from './entities.ts'

/** A point times its weight, with the weight. */
interface Weighted {
  readonly x: number
  readonly y: number
  readonly w: number
}

/**
 * A spline as its polynomial pieces, each a (rational) Bézier curve over 0 to 1, in order.
 * Control points and knots are used when there are any, else the fit points.
 *
 * @throws DrawingError drawing-malformed when counts, knots or weights do not belong together
 */
export function splineCurves(shape: SplineShape, weights: readonly number[], line: number): Curve[] {
  const pieces =
    shape.control.length > 0 ? bezierPieces(shape, weights, line) : throughPoints(shape.fit, shape.closed)
  return pieces.map(bezierCurve)
}

function bezierPieces(shape: SplineShape, weights: readonly number[], line: number): Weighted[][] {
  const { degree, knots, control } = shape
  const refuse = (why: string) =>
    new DrawingError('drawing-malformed', `The SPLINE at line ${line} ${why}. Export it as arcs.`, line)
  if (control.length <= degree) throw refuse('has too few control points')
  if (knots.length !== control.length + degree + 1) throw refuse('has the wrong number of knots')
  if (knots.some((knot, i) => knot < (knots[i - 1] ?? -Infinity))) throw refuse('has knots that go back')
  if (weights.length !== 0 && weights.length !== control.length)
    throw refuse('has the wrong number of weights')
  if (weights.some((weight) => weight <= 0)) throw refuse('has a weight that is not positive')
  const points = control.map((point, i) => weigh(point, weights[i] ?? 1))
  const pieces: Weighted[][] = []
  for (let span = degree; span < control.length; span++) {
    const [low, high] = [knots[span] ?? 0, knots[span + 1] ?? 0]
    if (low === high) continue
    pieces.push(
      Array.from({ length: degree + 1 }, (_, j) =>
        blossom(points, knots, degree, span, (r) => (r < degree - j ? low : high)),
      ),
    )
  }
  if (pieces.length === 0) throw refuse('has no length in its knots')
  return pieces
}

/**
 * The polar form of one span, by de Boor's scheme with an argument of its own for every step. With j
 * arguments at the span's end and the others at its start it is the span's Bézier point j.
 */
function blossom(
  points: readonly Weighted[],
  knots: readonly number[],
  degree: number,
  span: number,
  argument: (step: number) => number,
): Weighted {
  const row = points.slice(span - degree, span + 1)
  for (let step = 0; step < degree; step++) {
    for (let j = degree; j > step; j--) {
      const low = knots[span - degree + j] ?? 0
      const high = knots[span + j - step] ?? 1
      row[j] = mix(row[j - 1], row[j], (argument(step) - low) / (high - low))
    }
  }
  return row[degree] ?? { x: 0, y: 0, w: 1 }
}

const ORIGIN: Weighted = { x: 0, y: 0, w: 1 }

function mix(a: Weighted = ORIGIN, b: Weighted = ORIGIN, t: number): Weighted {
  return { x: a.x + t * (b.x - a.x), y: a.y + t * (b.y - a.y), w: a.w + t * (b.w - a.w) }
}

function weigh({ x, y }: Point, w: number): Weighted {
  return { x: x * w, y: y * w, w }
}

function bezierCurve(control: readonly Weighted[]): Curve {
  const at = (t: number): [Weighted, Weighted] => {
    let row = [...control]
    while (row.length > 2) row = row.slice(1).map((point, i) => mix(row[i], point, t))
    return [row[0] ?? ORIGIN, row[1] ?? row[0] ?? ORIGIN]
  }
  return {
    start: 0,
    end: 1,
    point(t) {
      if (t === 0 || t === 1) return flatten(control.at(t === 0 ? 0 : -1) ?? ORIGIN)
      const [a, b] = at(t)
      return flatten(mix(a, b, t))
    },
    velocity(t) {
      // d/dt of a quotient of polynomials, by the last two points of de Casteljau's scheme.
      const [a, b] = at(t)
      const sum = mix(a, b, t)
      const n = control.length - 1
      const factor = (n * a.w * b.w) / (sum.w * sum.w)
      return { x: factor * (b.x / b.w - a.x / a.w), y: factor * (b.y / b.w - a.y / a.w) }
    },
  }
}

function flatten({ x, y, w }: Weighted): Point {
  return { x: x / w, y: y / w }
}

/**
 * The cubic through given points with continuous curvature, parameter by chord length; free ends (no
 * curvature there), or joined smoothly when closed. The format leaves the curve to the reader when only fit
 * points are given, so this one is reported as approximated.
 */
function throughPoints(fit: readonly Point[], closed: boolean): Weighted[][] {
  const distinct = fit.filter((point, i) => i === 0 || point.x !== fit[i - 1]?.x || point.y !== fit[i - 1]?.y)
  const [first, last] = [distinct[0], distinct.at(-1)]
  if (!first || !last || distinct.length < 2) return []
  const ring = closed && distinct.length > 2
  if (ring && (first.x !== last.x || first.y !== last.y)) distinct.push(first)
  const steps = distinct.slice(1).map((point, i) => {
    const before = distinct[i] ?? point
    return Math.hypot(point.x - before.x, point.y - before.y)
  })
  const slopes = {
    x: nodeSlopes(
      distinct.map((p) => p.x),
      steps,
      ring,
    ),
    y: nodeSlopes(
      distinct.map((p) => p.y),
      steps,
      ring,
    ),
  }
  return steps.map((step, i) => {
    const [a, b] = [distinct[i] ?? first, distinct[i + 1] ?? last]
    const third = step / 3
    return [
      weigh(a, 1),
      weigh({ x: a.x + third * (slopes.x[i] ?? 0), y: a.y + third * (slopes.y[i] ?? 0) }, 1),
      weigh({ x: b.x - third * (slopes.x[i + 1] ?? 0), y: b.y - third * (slopes.y[i + 1] ?? 0) }, 1),
      weigh(b, 1),
    ]
  })
}

/** Turns of the ring laid end to end on each side, so that its seam lies inside: errors fade by 0.27 a step. */
const RING_OVERLAP = 40

/** First derivatives at the nodes of a cubic spline with the given steps between them. */
function nodeSlopes(values: readonly number[], steps: readonly number[], ring: boolean): number[] {
  if (!ring) return naturalSlopes(values, steps)
  const n = steps.length
  const wrapped = (i: number) => ((i % n) + n) % n
  const before = Math.max(RING_OVERLAP, 1)
  const count = n + 2 * before
  const longSteps = Array.from({ length: count }, (_, i) => steps[wrapped(i - before)] ?? 1)
  const longValues = Array.from({ length: count + 1 }, (_, i) => values[wrapped(i - before)] ?? 0)
  return naturalSlopes(longValues, longSteps).slice(before, before + n + 1)
}

/** Tridiagonal system of the natural cubic spline, solved by elimination. */
function naturalSlopes(values: readonly number[], steps: readonly number[]): number[] {
  const last = values.length - 1
  const chord = (i: number) => ((values[i + 1] ?? 0) - (values[i] ?? 0)) / (steps[i] ?? 1)
  const upper: number[] = []
  const right: number[] = []
  for (let i = 0; i <= last; i++) {
    const [l, r] = [i > 0 ? 1 / (steps[i - 1] ?? 1) : 0, i < last ? 1 / (steps[i] ?? 1) : 0]
    const value = 3 * ((i > 0 ? l * chord(i - 1) : 0) + (i < last ? r * chord(i) : 0))
    const pivot = 2 * (l + r) - l * (upper[i - 1] ?? 0)
    upper.push(r / pivot)
    right.push((value - l * (right[i - 1] ?? 0)) / pivot)
  }
  for (let i = last - 1; i >= 0; i--) right[i] = (right[i] ?? 0) - (upper[i] ?? 0) * (right[i + 1] ?? 0)
  return right
}
