import { CornerMode, frameOf, type Frame } from '../contours/frame.ts'
import type { Body, Wall } from '../walls/types.ts'
import type { Corner, CornerKind, SeamBand } from './types.ts'
import { tiltAt } from '../walls/wall.ts'

/** Largest tilt for two equal walls at an interior angle so that their seam keeps within a limit (derived), radians. */
export function largestCornerTilt(limit: number, interiorAngle: number): number {
  return Math.atan(Math.tan(limit) * Math.sin(interiorAngle / 2))
}

/**
 * Angle from vertical of the seam between two walls whose edges turn by `turn` (derived): the corner moves
 * v = w₁n₁ + s₁u₁ per unit of depth, s₁ = (w₂ − w₁cos φ)/sin φ = (w₂ − w₁)/sin φ + w₁tan(φ/2), which does
 * not cancel for small turns. Null where unlike walls meet without a turn: there is no seam.
 */
export function seamTiltOf(tiltBefore: number, tiltAfter: number, turn: number): number | null {
  const w1 = Math.tan(tiltBefore)
  const sin = Math.sin(turn)
  let along = w1 * Math.tan(turn / 2)
  if (tiltAfter !== tiltBefore) {
    if (sin === 0) return null
    along += (Math.tan(tiltAfter) - w1) / sin
  }
  return Math.atan(Math.hypot(w1, along))
}

/** Every corner of the body, in order of loop and vertex; on arcs the tangent at the drawing's corner counts. */
export function cornersOf(body: Body): Corner[] {
  const frame = frameOf(body)
  const corners: Corner[] = []
  for (let g = 0; g < frame.count; g++) corners.push(cornerAt(frame, g))
  return corners
}

function cornerAt(frame: Frame, g: number): Corner {
  const { table, body } = frame
  const loop = frame.loopOf[g]!
  const turn = frame.turn[g]!
  const kind = kindOf(frame, g)
  const before = table.walls[table.rowOfEdge[frame.previous[g]!]!]!
  const after = table.walls[table.rowOfEdge[g]!]!
  return {
    loop,
    vertex: frame.edgeOf[g]!,
    at: { x: frame.px[g]!, y: frame.py[g]! },
    kind,
    interiorAngle: Math.PI - turn,
    bands: bandsOf(before, after, body.thickness, kind, turn),
    step: frame.mode[g] === CornerMode.step,
  }
}

function kindOf(frame: Frame, g: number): CornerKind {
  const mode = frame.mode[g]
  if (mode === CornerMode.smooth || mode === CornerMode.step) return 'smooth'
  return frame.turn[g]! > 0 ? 'convex' : 'concave'
}

function bandsOf(before: Wall, after: Wall, thickness: number, kind: CornerKind, turn: number): SeamBand[] {
  const bands: SeamBand[] = []
  let fromDepth = 0
  while (fromDepth < thickness) {
    const toDepth = Math.min(nextEnd(before, fromDepth), nextEnd(after, fromDepth), thickness)
    const tilts = [tiltAt(before, fromDepth, 'end'), tiltAt(after, fromDepth, 'start')] as const
    const stepped = kind === 'smooth' && tilts[0] !== tilts[1]
    bands.push({ fromDepth, toDepth, tilts, seamTilt: stepped ? null : seamTiltOf(tilts[0], tilts[1], turn) })
    fromDepth = toDepth
  }
  return bands
}

function nextEnd(wall: Wall, depth: number): number {
  for (const facet of wall.facets) if (facet.depth > depth) return facet.depth
  return Infinity
}
