import { evaluate } from '../../shared/evaluate/evaluate.ts'
import type { Evaluation, EvaluationRequest } from '../../shared/evaluate/schema.ts'
import { cornerAfter, edgeAfter, movedVertex, transformed, transforms, type Transform } from './transform.ts'

/** What is recorded of a part. */
export interface Figures {
  readonly volume: number | null
  readonly event: { readonly kind: string; readonly depth: number } | null
  readonly neededTilt: number
  /** How often each code is found. */
  readonly findings: Readonly<Record<string, number>>
}

export interface Recorded extends Figures {
  /** How far the answers may drift when the part is drawn another way: see `worstDrift`. */
  readonly drift: number
}

/**
 * The largest change of any answer over all transforms beyond what it must: lengths in parts of the part's size,
 * angles in degrees, volume in parts of itself. Infinite where an answer comes or goes.
 */
export function worstDrift(request: EvaluationRequest): number {
  const drawn = evaluate(request)
  return transforms.reduce(
    (worst, transform) =>
      Math.max(worst, driftBetween(request, drawn, evaluate(transformed(request, transform)), transform)),
    0,
  )
}

export function figuresOf({ volume, firstEvent, neededTilt, findings }: Evaluation): Figures {
  const counts: Record<string, number> = {}
  for (const { code } of findings) counts[code] = (counts[code] ?? 0) + 1
  return {
    volume,
    event: firstEvent && { kind: firstEvent.kind, depth: firstEvent.depth },
    neededTilt: neededTilt?.tilt ?? 0,
    findings: counts,
  }
}

function driftBetween(
  request: EvaluationRequest,
  drawn: Evaluation,
  other: Evaluation,
  transform: Transform,
): number {
  const { scale } = transform
  const size = Math.max(...request.loops.flat().flatMap(({ x, y }) => [Math.abs(x), Math.abs(y)]))
  const count = (loop: number) => request.loops[loop]!.length
  let drift = 0
  const angle = (a: number | null, b: number | null) => note(a, b, 1)
  const length = (a: number | null, b: number | null) => note(a === null ? null : a * scale, b, size * scale)
  const note = (a: number | null, b: number | null, unit: number) => {
    if ((a === null) !== (b === null)) drift = Infinity
    if (a !== null && b !== null) drift = Math.max(drift, Math.abs(a - b) / unit)
  }
  const edges = new Map(other.edges.map((edge) => [`${edge.loop} ${edge.edge}`, edge]))
  for (const edge of drawn.edges) {
    const same = edges.get(`${edge.loop} ${edgeAfter(edge.edge, count(edge.loop), transform)}`)!
    length(edge.topLength, same.topLength)
    length(edge.bottomLength, same.bottomLength)
    length(edge.bottomOffset, same.bottomOffset)
    angle(edge.wholeTilt, same.wholeTilt)
  }
  const corners = new Map(other.corners.map((corner) => [`${corner.loop} ${corner.vertex}`, corner]))
  for (const corner of drawn.corners) {
    const same = corners.get(`${corner.loop} ${cornerAfter(corner.vertex, count(corner.loop), transform)}`)!
    if (same.kind !== corner.kind) drift = Infinity
    angle(corner.interiorAngle, same.interiorAngle)
    angle(corner.seamTilt, same.seamTilt)
    angle(corner.jetTilt, same.jetTilt)
  }
  if (other.firstEvent?.kind !== drawn.firstEvent?.kind) drift = Infinity
  if (drawn.firstEvent && other.firstEvent) {
    length(drawn.firstEvent.depth, other.firstEvent.depth)
    const at = movedVertex(drawn.firstEvent.at, transform)
    // Of walls that vanish at the same depth any may be named: the place is compared where the edge is the same.
    const { loop, edge } = drawn.firstEvent
    const named =
      loop === other.firstEvent.loop && edgeAfter(edge, count(loop), transform) === other.firstEvent.edge
    if (named) note(Math.hypot(at.x - other.firstEvent.at.x, at.y - other.firstEvent.at.y), 0, size * scale)
  }
  const volume = drawn.volume
  note(volume === null ? null : 1, volume === null ? other.volume : other.volume! / (volume * scale ** 3), 1)
  angle(drawn.neededTilt?.tilt ?? null, other.neededTilt?.tilt ?? null)
  return drift
}
