import type { Contour } from '../contours/types.ts'
import type { EdgeRef } from '../walls/types.ts'
import { concaveFillets, cornerOverLimit, smoothStep } from '../findings/corner.ts'
import { edgeOverLimit, facetsCutIn } from '../findings/edge.ts'
import { narrowestWidth } from '../findings/hole-width.ts'
import { nozzleTouches } from '../findings/nozzle.ts'
import { eventFinding, holeSmallerThanKerf, loopOutside, profileCrosses } from '../findings/part.ts'
import type { EdgeWall } from '../findings/place.ts'
import { findingSeverities, type Finding } from '../findings/schema.ts'
import { radians } from '../units/angle.ts'
import { limitsOf, type Columns } from './columns.ts'
import { CornerNote, interiorAngle, slopeDegrees } from './corner-columns.ts'
import { cureEvent } from './event-cure.ts'
import { nameOfMove, type JetWay } from './jet-way.ts'
import { wayFindings } from './way-findings.ts'
import type { CornerMove } from '../passes/types.ts'
import type { ReadRequest } from './read.ts'

/**
 * All findings, the gravest first; those of one severity by kind, then in the caller's order of places. What the
 * columns have marked is put into words here.
 */
export function findingsOf(
  columns: Columns,
  contours: () => readonly Contour[],
  way: JetWay | null,
): Finding[] {
  const all = [
    ...profileFindings(columns),
    ...eventFindings(columns),
    ...edgeFindings(columns),
    ...cornerFindings(columns).filter((finding) => !isTurnedElsewhere(columns, way, finding)),
    ...nozzleFindings(columns),
    ...holeFindings(columns, contours),
    ...(way ? wayFindings(columns.read, way) : []),
  ]
  return findingSeverities.flatMap((severity) => all.filter((finding) => finding.severity === severity))
}

/** A seam past the limit is no matter where a person has chosen to turn in the waste or on the corner, and that works. */
function isTurnedElsewhere({ read }: Columns, way: JetWay | null, { code, loop, vertex }: Finding): boolean {
  if (code !== 'corner-over-working-limit' && code !== 'corner-over-mechanical-limit') return false
  const chosen = read.request.passes?.corners?.find(
    (choice) => choice.loop === loop && choice.vertex === vertex,
  )
  if (!chosen || chosen.move === 'lean' || !way?.cut) return false
  const { frame, numbering } = read
  const g = frame.loopStart[chosen.loop]! + numbering.cornerRef(chosen).vertex
  return nameOfMove[way.cut.passes.cornerMoves[g] as CornerMove] === chosen.move
}

function profileFindings({ read }: Columns): Finding[] {
  return read.problems.flatMap(({ code, loop, edge, other }) =>
    code === 'hole-outside' || code === 'hole-in-hole'
      ? [loopOutside(loop)]
      : [profileCrosses({ loop, edge: edge ?? 0 }, other && { loop: other.loop, edge: other.edge ?? 0 })],
  )
}

function eventFindings({ read, range }: Columns): Finding[] {
  const event = range?.event
  if (!event) return []
  const nameOf = (ref: EdgeRef): EdgeRef => read.numbering.edgeRef(ref)
  const cure = cureEvent(read.body, event, nameOf) ?? undefined
  const named = { ...event, ...nameOf(event), other: event.other && nameOf(event.other) }
  return [eventFinding(named, read.body.thickness, cure)]
}

function edgeFindings({ read, edges }: Columns): Finding[] {
  const { request, preps, numbering } = read
  const limits = limitsOf(request)
  const taper = request.jet?.taper ?? 0
  const findings: Finding[] = []
  preps.ofEdge.forEach((prep, e) => {
    if (!edges.preps[prep]!.found) return
    const wall: EdgeWall = { ...numbering.edgeAt(e), facets: preps.list[prep]!.facets }
    const cutIn = facetsCutIn(wall)
    const over = limits && edgeOverLimit(wall, taper, limits)
    if (cutIn) findings.push(cutIn)
    if (over) findings.push(over)
  })
  return findings
}

function cornerFindings({ read, corners }: Columns): Finding[] {
  const { request, frame, numbering } = read
  const limits = limitsOf(request)
  const { kerf, taper = 0 } = request.jet ?? {}
  const fillet = kerf === undefined ? null : concaveFillets(kerf)
  const findings: Finding[] = []
  for (let c = 0; c < frame.count; c++) {
    const g = numbering.corner ? numbering.corner[c]! : c
    const note = corners.notes[g]!
    if (note === 0) continue
    const corner = numbering.cornerAt(c)
    const angle = interiorAngle(frame, g)
    if (note & CornerNote.step) findings.push(smoothStep(corner, ...wallsAt(read, c)))
    if (limits && note & CornerNote.over) {
      const [before, after] = wallsAt(read, c)
      const walls = { before, after, interiorAngle: angle, taper }
      const over = cornerOverLimit(corner, slopeDegrees(corners.jet[g]!) ?? 0, walls, limits)
      if (over) findings.push(over)
    }
    const rounded = note & CornerNote.fillet && fillet ? fillet(corner, angle) : null
    if (rounded) findings.push(rounded)
  }
  return findings
}

/** The walls that end and start at a corner; all in the caller's numbering. */
function wallsAt({ preps, frame, numbering }: ReadRequest, corner: number): [EdgeWall, EdgeWall] {
  const { loop, vertex } = numbering.cornerAt(corner)
  const first = frame.loopStart[loop]!
  const n = frame.loopStart[loop + 1]! - first
  const wall = (edge: number): EdgeWall => ({
    loop,
    edge,
    facets: preps.list[preps.ofEdge[first + edge]!]!.facets,
    length: frame.length[numbering.edge ? numbering.edge[first + edge]! : first + edge]!,
  })
  return [wall((vertex + n - 1) % n), wall(vertex)]
}

function nozzleFindings({ read, neededTilt }: Columns): Finding[] {
  const { standoff, nozzleDiameter } = read.request.jet ?? {}
  if (standoff === undefined || nozzleDiameter === undefined || !neededTilt) return []
  const found = nozzleTouches(neededTilt.at, neededTilt.tilt, { diameter: nozzleDiameter, standoff })
  return found ? [found] : []
}

function holeFindings({ read }: Columns, contours: () => readonly Contour[]): Finding[] {
  const { loops, jet } = read.request
  const { kerf, taper = 0 } = jet ?? {}
  if (kerf === undefined || loops.length < 2) return []
  const findings: Finding[] = []
  for (let loop = 1; loop < loops.length; loop++) {
    for (const contour of contours()) {
      const kerfThere = kerf - 2 * contour.depth * Math.tan(radians(taper))
      const width = narrowestWidth(contour.loops[loop] ?? [])
      if (width >= kerfThere) continue
      findings.push(holeSmallerThanKerf(loop, width, kerfThere))
      break
    }
  }
  return findings
}
