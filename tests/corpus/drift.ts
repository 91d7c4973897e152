import { evaluate } from '../../shared/evaluate/evaluate.ts'
import type { Evaluation, EvaluationRequest } from '../../shared/evaluate/schema.ts'
import { cornerAfter, edgeAfter, movedVertex, transformed, transforms, type Transform } from './transform.ts'

/** What is recorded of a part. */
export interface Figures {
  readonly volume: number | null
  readonly event: { readonly kind: string; readonly depth: number } | null
  readonly neededTilt: number
  /** How many passes there are, and how long they are together at the top face, mm; null where nothing can be cut. */
  readonly passes: { readonly count: number; readonly length: number } | null
  /** How the part leaves and each slug, with the room of the kerf. */
  readonly wayOut: readonly string[] | null
  /** How often each code is found. */
  readonly findings: Readonly<Record<string, number>>
}

/** How far answers move when the part is drawn another way: see `worstDrift`. */
export interface Drift {
  /** Of walls, corners, contours, the event and the way out. */
  walls: number
  /** Of the passes. */
  passes: number
}

export interface Recorded extends Figures {
  /** The most that the answers may drift. */
  readonly drift: Readonly<Drift>
}

/**
 * The largest change of any answer over all transforms beyond what it must: lengths in parts of the part's size,
 * angles in degrees, volume in parts of itself. Infinite where an answer comes or goes.
 */
export function worstDrift(request: EvaluationRequest): Drift {
  const drawn = evaluate(request)
  const worst: Drift = { walls: 0, passes: 0 }
  for (const transform of transforms) {
    const own = driftBetween(request, drawn, evaluate(transformed(request, transform)), transform)
    worst.walls = Math.max(worst.walls, own.walls)
    worst.passes = Math.max(worst.passes, own.passes)
  }
  return worst
}

export function figuresOf({ volume, firstEvent, neededTilt, passes, wayOut, findings }: Evaluation): Figures {
  const counts: Record<string, number> = {}
  for (const { code } of findings) counts[code] = (counts[code] ?? 0) + 1
  return {
    volume,
    event: firstEvent && { kind: firstEvent.kind, depth: firstEvent.depth },
    neededTilt: neededTilt?.tilt ?? 0,
    passes: passes && { count: passes.length, length: lengthOf(passes) },
    wayOut: wayOut && wayOut.map(({ withinKerf }) => withinKerf.verdict),
    findings: counts,
  }
}

function lengthOf(passes: NonNullable<Evaluation['passes']>): number {
  return passes.reduce((sum, pass) => sum + pass.length, 0)
}

function driftBetween(
  request: EvaluationRequest,
  drawn: Evaluation,
  other: Evaluation,
  transform: Transform,
): Drift {
  const { scale } = transform
  const size = Math.max(...request.loops.flat().flatMap(({ x, y }) => [Math.abs(x), Math.abs(y)]))
  const count = (loop: number) => request.loops[loop]!.length
  const drift: Drift = { walls: 0, passes: 0 }
  const angle = (a: number | null, b: number | null) => note(a, b, 1)
  const length = (a: number | null, b: number | null) => note(a === null ? null : a * scale, b, size * scale)
  const note = (a: number | null, b: number | null, unit: number) => {
    if ((a === null) !== (b === null)) drift.walls = Infinity
    if (a !== null && b !== null) drift.walls = Math.max(drift.walls, Math.abs(a - b) / unit)
  }
  const blends = request.walls.filter(({ facets }) => facets.some(({ endTilt }) => endTilt !== undefined))
  const blended = new Set(blends.map(({ loop, edge }) => `${loop} ${edge}`))
  const edges = new Map(other.edges.map((edge) => [`${edge.loop} ${edge.edge}`, edge]))
  for (const edge of drawn.edges) {
    const same = edges.get(`${edge.loop} ${edgeAfter(edge.edge, count(edge.loop), transform)}`)!
    length(edge.topLength, same.topLength)
    length(edge.bottomLength, same.bottomLength)
    // Along a blend the offset is told at the edge's start, which is the other end of an edge told the other way round.
    if (!(transform.reverse && blended.has(`${edge.loop} ${edge.edge}`)))
      length(edge.bottomOffset, same.bottomOffset)
    angle(edge.wholeTilt, same.wholeTilt)
  }
  const corners = new Map(other.corners.map((corner) => [`${corner.loop} ${corner.vertex}`, corner]))
  for (const corner of drawn.corners) {
    const same = corners.get(`${corner.loop} ${cornerAfter(corner.vertex, count(corner.loop), transform)}`)!
    if (same.kind !== corner.kind) drift.walls = Infinity
    angle(corner.interiorAngle, same.interiorAngle)
    angle(corner.seamTilt, same.seamTilt)
    angle(corner.jetTilt, same.jetTilt)
  }
  if (other.firstEvent?.kind !== drawn.firstEvent?.kind) drift.walls = Infinity
  if (drawn.firstEvent && other.firstEvent) {
    length(drawn.firstEvent.depth, other.firstEvent.depth)
    const at = movedVertex(drawn.firstEvent.at, transform)
    // Of walls that vanish at the same depth any may be named: the place is compared where the edge is the same.
    const { loop, edge } = drawn.firstEvent
    const named =
      loop === other.firstEvent.loop && edgeAfter(edge, count(loop), transform) === other.firstEvent.edge
    if (named) note(Math.hypot(at.x - other.firstEvent.at.x, at.y - other.firstEvent.at.y), 0, size * scale)
  }
  if ((other.passes === null) !== (drawn.passes === null)) drift.passes = Infinity
  if (drawn.passes && other.passes) comparePasses(drawn.passes, other.passes, transform, size, drift)
  if (movesOf(other) !== movesOf(drawn)) drift.passes = Infinity
  for (const [i, { free, withinKerf }] of (drawn.wayOut ?? []).entries()) {
    for (const [way, same] of [
      [free, other.wayOut![i]!.free],
      [withinKerf, other.wayOut![i]!.withinKerf],
    ] as const) {
      if (way.verdict !== same.verdict || way.upward !== same.upward) drift.walls = Infinity
      angle(way.angle, same.angle)
      if (way.heading === null || same.heading === null) {
        angle(way.heading, same.heading)
        continue
      }
      const heading = (transform.mirror ? -way.heading : way.heading) + (transform.turn * 180) / Math.PI
      const off = Math.abs(heading - same.heading) % 360
      angle(Math.min(off, 360 - off), 0)
    }
  }
  const volume = drawn.volume
  note(volume === null ? null : 1, volume === null ? other.volume : other.volume! / (volume * scale ** 3), 1)
  angle(drawn.neededTilt?.tilt ?? null, other.neededTilt?.tilt ?? null)
  return drift
}

type EvaluatedPasses = NonNullable<Evaluation['passes']>

/**
 * Passes are told apart by loop and level. Where the drawing only turns or grows each pierces at the same place; told
 * the other way round another of equally good starts may be taken, and then tilt and length are its own.
 */
function comparePasses(
  drawn: EvaluatedPasses,
  other: EvaluatedPasses,
  transform: Transform,
  size: number,
  drift: Drift,
): void {
  const { scale, mirror, reverse } = transform
  const note = (off: number) => (drift.passes = Math.max(drift.passes, Math.abs(off)))
  if (other.length !== drawn.length) drift.passes = Infinity
  const left = [...other]
  for (const pass of drawn) {
    const at = movedVertex(pass.pierce, transform)
    const away = (candidate: EvaluatedPasses[number]) =>
      Math.hypot(candidate.pierce.x - at.x, candidate.pierce.y - at.y) / (size * scale)
    const alike = left
      .filter(
        ({ loop, level, closed }) => loop === pass.loop && level === pass.level && closed === pass.closed,
      )
      .sort((a, b) => away(a) - away(b))
    const same = alike[0]
    if (!same) {
      drift.passes = Infinity
      continue
    }
    left.splice(left.indexOf(same), 1)
    const elsewhere = away(same) > SAME_PLACE
    if (elsewhere && (mirror || reverse)) continue
    note(away(same))
    note(pass.largestTilt - same.largestTilt)
    note((pass.length * scale - same.length) / (size * scale))
  }
}

/** Pierces nearer than this part of the drawing's size are at one place. */
const SAME_PLACE = 1e-6

/** How often each way round a corner is gone, in one word. */
function movesOf({ corners }: Evaluation): string {
  const moves = corners.map(({ loop, move }) => `${loop} ${move}`)
  return moves.sort().join(',')
}
