import { jetClearanceUnknown, jetCutsWall, jetMayGraze } from '../findings/clearance.ts'
import { axisOutOfTravel } from '../findings/head.ts'
import {
  cornerChoiceRefused,
  cornerWithoutWay,
  detailFinerThanJet,
  holeTooSmallForTilt,
  kerfCloses,
  looseBeforeLastPass,
  noRoomToPierce,
  seamBends,
  type CornerHindrance,
} from '../findings/passes.ts'
import type { Finding } from '../findings/schema.ts'
import { pieceTrapped } from '../findings/way-out.ts'
import { GRAZE } from '../interference/types.ts'
import { LeanRefusal, type PassProblem, type Passes } from '../passes/types.ts'
import { degrees } from '../units/angle.ts'
import type { CornerRef, EdgeRef } from '../walls/types.ts'
import type { PieceWayOut } from '../way-out/types.ts'
import { kerfClosesAt, type JetWay } from './jet-way.ts'
import type { ReadRequest } from './read.ts'

/** Findings about the jet's way and the way out, in the caller's numbering. */
export function wayFindings(read: ReadRequest, { cut, ways }: JetWay): Finding[] {
  const findings: Finding[] = []
  const closes = kerfClosesAt(read)
  if (closes !== null) findings.push(kerfCloses(closes, read.body.thickness))
  if (cut) {
    const { passes, interference, axes } = cut
    findings.push(...passFindings(read, passes))
    for (const { edge, hit, depth, bite } of interference.bites) {
      const cutting = edgeRef(read, edge)
      findings.push(jetCutsWall({ cutting, hit: edgeRef(read, hit), depth, bite }, GRAZE))
    }
    if (interference.grazing > 0) findings.push(jetMayGraze(interference.grazing, GRAZE))
    if (interference.undecided > 0) findings.push(jetClearanceUnknown(interference.undecided))
    for (const { code, axis, edge, value, limit, unwindAt } of axes?.problems ?? []) {
      if (code !== 'travel-exceeded' || axis === null) continue
      const at = edge < 0 ? null : edgeRef(read, edge)
      findings.push(axisOutOfTravel(axis, at, degrees(value), degrees(limit), unwindAt >= 0))
    }
  }
  for (const piece of [ways.part, ...ways.slugs]) {
    if (piece.withinKerf.verdict === 'trapped') {
      findings.push(pieceTrapped(piece.loop, holdsOf(read, piece)))
    }
  }
  return findings
}

function passFindings(read: ReadRequest, { problems, passes, leanRefusals }: Passes): Finding[] {
  const findings = problems.flatMap((problem) => passFinding(read, problem, leanRefusals))
  const loose = new Set(passes.filter(({ reasons }) => reasons.includes('loose-when-cut')).map((p) => p.loop))
  for (const loop of loose) findings.push(looseBeforeLastPass(loop))
  return findings
}

function passFinding(
  read: ReadRequest,
  { code, loop, at, value }: PassProblem,
  leanRefusals: Uint8Array,
): Finding[] {
  switch (code) {
    case 'no-corner-move': {
      const why = hindranceOf(leanRefusals[at]!)
      // A seam past the limit is told as that, with its cure.
      return why === 'over-limit' ? [] : [cornerWithoutWay(cornerRef(read, at), why)]
    }
    case 'choice-refused':
      return [cornerChoiceRefused(cornerRef(read, at))]
    case 'no-room-to-pierce':
      return [noRoomToPierce(loop)]
    case 'detail-finer-than-jet':
      return [detailFinerThanJet(edgeRef(read, at), value)]
    case 'hole-too-small-for-tilt':
      return [holeTooSmallForTilt(loop, value)]
    case 'bent-seam':
      return value === null ? [] : [seamBends(cornerRef(read, at), value)]
  }
}

function hindranceOf(refusal: number): CornerHindrance {
  if (refusal === LeanRefusal.edgeTooShort) return 'edge-too-short'
  return refusal === LeanRefusal.noJet ? 'no-jet' : 'over-limit'
}

function holdsOf(read: ReadRequest, { withinKerf: { trap } }: PieceWayOut): EdgeRef[] {
  return [...(trap?.up ?? []), ...(trap?.down ?? [])].map((hold) => read.numbering.edgeRef(hold))
}

/** By the body's number through all loops. */
export function edgeRef({ frame, numbering }: ReadRequest, g: number): EdgeRef {
  return numbering.edgeRef({ loop: frame.loopOf[g]!, edge: frame.edgeOf[g]! })
}

export function cornerRef({ frame, numbering }: ReadRequest, g: number): CornerRef {
  return numbering.cornerRef({ loop: frame.loopOf[g]!, vertex: frame.edgeOf[g]! })
}
