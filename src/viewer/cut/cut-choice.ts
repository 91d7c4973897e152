import type { EdgeLines, MeshIndex } from '../scene/mesh-index.ts'
import { stationsOf } from '../overlay/stations.ts'
import type { Vec3 } from '../camera/view-state.ts'
import type { CutPlane } from './slice.ts'

/** Which way the part is cut open: square to one of the plate's axes, or across an edge. */
export const cutDirections = ['X', 'Y', 'Z', 'edge'] as const
export type CutDirection = (typeof cutDirections)[number]

export interface CutChoice {
  readonly direction: CutDirection
  /** The other half stays. */
  readonly turned: boolean
  /** mm along the direction; null until it is moved: the middle. */
  readonly at: number | null
}

/** A first choice that takes away the half on the eye's side, so that the cut surface is seen. */
export function firstCut(direction: CutDirection, toward: Vec3, edge: EdgeLines | undefined): CutChoice {
  const normal = wayOf(direction, edge)?.normal ?? toward
  const facing = normal.reduce((sum, value, axis) => sum + value * toward[axis]!, 0)
  return { direction, turned: facing < 0, at: null }
}

/** The plane that a choice means for a part, and the ends of its way. */
export interface ChosenCut {
  readonly plane: CutPlane
  readonly from: number
  readonly to: number
  readonly at: number
}

/** `edge`: lines of the edge that a cut across an edge is square to. Null where there is nothing to cut. */
export function chosenCut(
  choice: CutChoice,
  index: MeshIndex,
  edge: EdgeLines | undefined,
): ChosenCut | null {
  const way = wayOf(choice.direction, edge)
  if (!way) return null
  const { from, to } = spanAlong(index.mesh.positions, way.normal)
  if (!(to > from)) return null
  const at = Math.min(to, Math.max(from, choice.at ?? way.middle ?? (from + to) / 2))
  const normal = choice.turned ? (way.normal.map((value) => 0 - value) as unknown as Vec3) : way.normal
  return { plane: { normal, at: choice.turned ? -at : at }, from, to, at }
}

function wayOf(
  direction: CutDirection,
  edge: EdgeLines | undefined,
): { normal: Vec3; middle?: number } | null {
  if (direction === 'X') return { normal: [1, 0, 0] }
  if (direction === 'Y') return { normal: [0, 1, 0] }
  if (direction === 'Z') return { normal: [0, 0, 1] }
  const station = edge && stationsOf(edge)[0]
  if (!station) return null
  // Along the edge in its middle: the cut shows the wall's true cross-section.
  const [ox, oy] = station.outward
  const normal: Vec3 = [-oy, ox, 0]
  return { normal, middle: station.top[0] * normal[0] + station.top[1] * normal[1] }
}

function spanAlong(positions: Float64Array, normal: Vec3): { from: number; to: number } {
  let from = Infinity
  let to = -Infinity
  for (let i = 0; i < positions.length; i += 3) {
    const along = positions[i]! * normal[0] + positions[i + 1]! * normal[1] + positions[i + 2]! * normal[2]
    if (along < from) from = along
    if (along > to) to = along
  }
  return { from, to }
}
