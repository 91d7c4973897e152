import { segmentFromVertices } from '../geometry/bulge.ts'
import { endTangent, pointAt, segmentLength, startTangent } from '../geometry/segment.ts'
import type { Point, Segment } from '../geometry/types.ts'
import { distance, middle, subtract, turnBetween } from '../geometry/vector.ts'
import type { DrawnSegment } from './chain.ts'

/**
 * When a run of lines is read as an arc (our own rule, chosen so that a hexagon, an octagon or any polygon whose
 * flats could be measured stays a polygon):
 * - at least `FEWEST_LINES` lines that all turn the same way, each by at most `WIDEST_TURN`;
 * - no line longer than `LONGEST_SHARE` times the run's mean, so that a tangent flat is not swallowed;
 * - every corner and every line's middle within the tolerance of the arc;
 * - an arc that bows more than twice the tolerance, since otherwise a straight line would serve as well.
 */
const FEWEST_LINES = 5
const WIDEST_TURN = Math.PI / 12
const LONGEST_SHARE = 2
const LEAST_BOW = 2

/** A longer run is read as several arcs: beyond this the ends say little about the centre. */
const WIDEST_SWEEP = (3 * Math.PI) / 2

export interface Recognised {
  readonly segments: readonly DrawnSegment[]
  /** Middle of every arc found. */
  readonly places: readonly Point[]
}

/** The same closed loop with its runs of short lines as arcs; ends of runs stay where they were. */
export function recogniseArcs(loop: readonly DrawnSegment[], tolerance: number): Recognised {
  const turns = loop.map((drawn, i) => turnInto(loop.at(i - 1)?.segment, drawn.segment))
  const circle = wholeCircle(loop, turns, tolerance)
  if (circle) return circle

  const start = firstBreak(loop, turns)
  const ordered = [...loop.slice(start), ...loop.slice(0, start)]
  const into = [...turns.slice(start), ...turns.slice(0, start)]
  const segments: DrawnSegment[] = []
  const places: Point[] = []
  let i = 0
  while (i < ordered.length) {
    const end = runEnd(into, i, ordered.length)
    const found = longestArc(ordered, i, end, tolerance)
    const drawn = ordered[i]
    if (found && drawn) {
      segments.push({ ...drawn, segment: found.arc })
      places.push(pointAt(found.arc, 0.5))
      i += found.lines
    } else {
      if (drawn) segments.push(drawn)
      i += 1
    }
  }
  return { segments, places }
}

/** Turn from the segment before into this one; 0 where it is not one small turn between two lines. */
function turnInto(before: Segment | undefined, segment: Segment): number {
  if (before?.kind !== 'line' || segment.kind !== 'line') return 0
  const turn = turnBetween(endTangent(before), startTangent(segment))
  return Math.abs(turn) <= WIDEST_TURN ? turn : 0
}

/** Where to start going round: at a corner that no arc can contain, else at the longest line. */
function firstBreak(loop: readonly DrawnSegment[], turns: readonly number[]): number {
  const broken = turns.findIndex((turn, i) => turn * (turns.at(i - 1) ?? 0) <= 0)
  if (broken >= 0) return broken
  const lengths = loop.map((drawn) => segmentLength(drawn.segment))
  return lengths.reduce((best, length, i) => (length > (lengths[best] ?? 0) ? i : best), 0)
}

/** End (exclusive) of the lines from `start` on that keep turning the same way. */
function runEnd(into: readonly number[], start: number, length: number): number {
  const way = Math.sign(into[start + 1] ?? 0)
  let end = start + 1
  while (way !== 0 && end < length && Math.sign(into[end] ?? 0) === way) end++
  return end
}

/** The longest arc that the run's first lines make, found by doubling and halving. */
function longestArc(
  loop: readonly DrawnSegment[],
  start: number,
  end: number,
  tolerance: number,
): { arc: Segment; lines: number } | null {
  const most = end - start
  if (most < FEWEST_LINES) return null
  const tryOut = (lines: number) => arcThrough(loop, start, lines, tolerance)
  let arc = tryOut(FEWEST_LINES)
  if (!arc) return null
  let [fits, fails] = [FEWEST_LINES, most + 1]
  while (fits + 1 < fails) {
    const doubled = 2 * fits
    const next = doubled < fails ? doubled : Math.floor((fits + fails) / 2)
    const longer = tryOut(next)
    if (longer) [arc, fits] = [longer, next]
    else fails = next
  }
  return { arc, lines: fits }
}

function arcThrough(
  loop: readonly DrawnSegment[],
  start: number,
  lines: number,
  tolerance: number,
): Segment | null {
  const run = loop.slice(start, start + lines).map((drawn) => drawn.segment)
  const [first, last] = [run[0], run.at(-1)]
  if (!first || !last) return null
  if (!chordsAlike(run)) return null
  const corners = run.slice(1).map((line) => line.from)
  const halfSweep = inscribedAngle(first.from, last.to, corners)
  if (Math.abs(2 * halfSweep) > WIDEST_SWEEP) return null
  const arc = segmentFromVertices({ ...first.from, bulge: Math.tan(halfSweep / 2) }, last.to)
  if (arc.kind !== 'arc') return null
  const bow = arc.radius * (1 - Math.cos(halfSweep))
  return bow > LEAST_BOW * tolerance && liesOn(run, arc.centre, arc.radius, tolerance) ? arc : null
}

function chordsAlike(run: readonly Segment[]): boolean {
  const lengths = run.map(segmentLength)
  const mean = lengths.reduce((sum, length) => sum + length, 0) / lengths.length
  return lengths.every((length) => length <= LONGEST_SHARE * mean)
}

function liesOn(run: readonly Segment[], centre: Point, radius: number, tolerance: number): boolean {
  const off = (point: Point) => Math.abs(distance(point, centre) - radius)
  return run.every((line) => off(line.from) <= tolerance && off(middle(line.from, line.to)) <= tolerance)
}

/**
 * Half the sweep of the arc from a to b: seen from any point of it, a and b lie that far from straight on
 * (inscribed angle). The mean over the corners, weighted by how well each one knows it.
 */
function inscribedAngle(a: Point, b: Point, corners: readonly Point[]): number {
  let sum = 0
  let weights = 0
  for (const corner of corners) {
    const weight = Math.min(distance(a, corner), distance(corner, b))
    sum += weight * turnBetween(subtract(corner, a), subtract(b, corner))
    weights += weight
  }
  return weights === 0 ? 0 : sum / weights
}

/** A ring of lines that is one circle, as two halves between corners of it. */
function wholeCircle(
  loop: readonly DrawnSegment[],
  turns: readonly number[],
  tolerance: number,
): Recognised | null {
  const way = Math.sign(turns[0] ?? 0)
  if (way === 0 || turns.some((turn) => Math.sign(turn) !== way)) return null
  const run = loop.map((drawn) => drawn.segment)
  const half = Math.floor(loop.length / 2)
  const [drawn, first, opposite] = [loop[0], run[0], run[half]]
  if (!drawn || !first || !opposite || half < FEWEST_LINES || !chordsAlike(run)) return null
  const halves = [
    { from: first.from, to: opposite.from, lines: run.slice(1, half) },
    { from: opposite.from, to: first.from, lines: run.slice(half + 1) },
  ].map(({ from, to, lines }) => {
    const bulge = Math.tan(
      inscribedAngle(
        from,
        to,
        lines.map((line) => line.from),
      ) / 2,
    )
    return segmentFromVertices({ ...from, bulge }, to)
  })
  const fits = halves.every(
    (arc, i) =>
      arc.kind === 'arc' &&
      liesOn(i === 0 ? run.slice(0, half) : run.slice(half), arc.centre, arc.radius, tolerance) &&
      arc.radius > LEAST_BOW * tolerance,
  )
  if (!fits) return null
  return {
    segments: halves.map((segment) => ({ ...drawn, segment })),
    places: halves.map((arc) => pointAt(arc, 0.5)),
  }
}
