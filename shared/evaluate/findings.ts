import type { SoundRange } from '../events/range.ts'
import type { Contour } from '../contours/types.ts'
import type { EdgeRef } from '../walls/types.ts'
import { concaveFillets, cornerOverLimit, smoothStep } from '../findings/corner.ts'
import { edgeOverLimit, facetsCutIn } from '../findings/edge.ts'
import { narrowestWidth } from '../findings/hole-width.ts'
import { nozzleTouches } from '../findings/nozzle.ts'
import { eventFinding, holeSmallerThanKerf, loopOutside, profileCrosses } from '../findings/part.ts'
import { strictestLimit, type EdgeWall, type Limits } from '../findings/place.ts'
import { findingSeverities, type Finding } from '../findings/schema.ts'
import { edgeInDrawing } from '../geometry/orient.ts'
import { radians } from '../units/angle.ts'
import type { CornerFigures } from './corners.ts'
import { cureEvent } from './event-cure.ts'
import type { ReadRequest } from './read.ts'
import type { Evaluation, EvaluationRequest } from './schema.ts'

/** What the evaluation has found out before its findings. */
export interface Known {
  readonly request: EvaluationRequest
  readonly read: ReadRequest
  /** Null where the profile itself is not sound. */
  readonly range: SoundRange | null
  readonly contours: readonly Contour[]
  readonly cornerFigures: CornerFigures
  readonly neededTilt: Evaluation['neededTilt']
}

/** All findings, the gravest first; those of one severity by kind, then in the caller's order of places. */
export function findingsOf(known: Known): Finding[] {
  const all = [
    ...profileFindings(known),
    ...eventFindings(known),
    ...edgeFindings(known),
    ...cornerFindings(known),
    ...nozzleFindings(known),
    ...holeFindings(known),
  ]
  return findingSeverities.flatMap((severity) => all.filter((finding) => finding.severity === severity))
}

function profileFindings({ read }: Known): Finding[] {
  return read.problems.flatMap(({ code, loop, edge, other }) =>
    code === 'hole-outside' || code === 'hole-in-hole'
      ? [loopOutside(loop)]
      : [profileCrosses({ loop, edge: edge ?? 0 }, other && { loop: other.loop, edge: other.edge ?? 0 })],
  )
}

function eventFindings({ read, range }: Known): Finding[] {
  const event = range?.event
  if (!event) return []
  const nameOf = (ref: EdgeRef): EdgeRef => callersEdge(read, ref)
  const cure = cureEvent(read.body, event, nameOf) ?? undefined
  const named = { ...event, ...nameOf(event), other: event.other && nameOf(event.other) }
  return [eventFinding(named, read.body.thickness, cure)]
}

/** An edge of the body in the caller's numbering. */
export function callersEdge({ body, reversed }: ReadRequest, { loop, edge }: EdgeRef): EdgeRef {
  return { loop, edge: edgeInDrawing(edge, body.loops[loop]?.length ?? 0, reversed[loop] ?? false) }
}

function limitsOf({ head }: EvaluationRequest): Limits | null {
  return head ? { mechanical: head.mechanicalLimit, working: head.workingLimit ?? null } : null
}

function edgeFindings({ request, read }: Known): Finding[] {
  const limits = limitsOf(request)
  const taper = request.jet?.taper ?? 0
  const findings: Finding[] = []
  // Edges share their lists of facets: a list that is within the limits is looked at once.
  const quiet = new Set<unknown>()
  for (const [loop, ofLoop] of read.facets.entries()) {
    for (const [edge, facets] of ofLoop.entries()) {
      if (quiet.has(facets)) continue
      const wall: EdgeWall = { loop, edge, facets }
      const cutIn = facetsCutIn(wall)
      const over = limits && edgeOverLimit(wall, taper, limits)
      if (cutIn) findings.push(cutIn)
      if (over) findings.push(over)
      if (!cutIn && !over) quiet.add(facets)
    }
  }
  return findings
}

function cornerFindings({ request, read, cornerFigures }: Known): Finding[] {
  const limits = limitsOf(request)
  const kerf = request.jet?.kerf
  const fillet = kerf === undefined ? null : concaveFillets(kerf)
  const taper = request.jet?.taper ?? 0
  const lowest = limits && strictestLimit(limits)
  const findings: Finding[] = []
  for (const [i, corner] of cornerFigures.corners.entries()) {
    const { kind, jetTilt } = corner
    const interiorAngle = cornerFigures.interiorAngles[i] ?? 0
    if (kind === 'smooth') {
      if (corner.seamTilt === null) findings.push(smoothStep(corner, ...wallsAt(read, corner)))
      continue
    }
    if (limits && lowest !== null && jetTilt !== null && jetTilt > lowest) {
      const [before, after] = wallsAt(read, corner)
      const over = cornerOverLimit(corner, jetTilt, { before, after, interiorAngle, taper }, limits)
      if (over) findings.push(over)
    }
    const rounded = kind === 'concave' && fillet ? fillet(corner, interiorAngle) : null
    if (rounded) findings.push(rounded)
  }
  return findings
}

/** The walls that end and start at a corner, in the caller's numbering. */
function wallsAt(
  { facets }: ReadRequest,
  { loop, vertex }: { loop: number; vertex: number },
): [EdgeWall, EdgeWall] {
  const ofLoop = facets[loop] ?? []
  const wall = (edge: number): EdgeWall => ({ loop, edge, facets: ofLoop[edge] ?? [] })
  return [wall((vertex + ofLoop.length - 1) % ofLoop.length), wall(vertex)]
}

function nozzleFindings({ request, neededTilt }: Known): Finding[] {
  const { standoff, nozzleDiameter } = request.jet ?? {}
  if (standoff === undefined || nozzleDiameter === undefined || !neededTilt) return []
  const found = nozzleTouches(neededTilt.at, neededTilt.tilt, { diameter: nozzleDiameter, standoff })
  return found ? [found] : []
}

function holeFindings({ request, contours }: Known): Finding[] {
  const { kerf, taper = 0 } = request.jet ?? {}
  if (kerf === undefined) return []
  const findings: Finding[] = []
  for (let loop = 1; loop < request.loops.length; loop++) {
    for (const contour of contours) {
      const kerfThere = kerf - 2 * contour.depth * Math.tan(radians(taper))
      const width = narrowestWidth(contour.loops[loop] ?? [])
      if (width >= kerfThere) continue
      findings.push(holeSmallerThanKerf(loop, width, kerfThere))
      break
    }
  }
  return findings
}
