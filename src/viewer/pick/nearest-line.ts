import type { EdgeRef } from '../../../shared/walls/types.ts'
import type { ScreenPoint, Vec3 } from '../camera/view-state.ts'
import type { MeshIndex } from '../scene/mesh-index.ts'

/** Which rims may be meant: a face hides the other one. */
export type Rim = 'top' | 'bottom' | 'either'

/**
 * The edge whose rim passes nearest a pixel, within `reach` px. A wall that is seen on its edge has no
 * area to click, so the lines count too. Of two equally near, the one closer to the eye is meant.
 */
export function nearestLine(
  index: MeshIndex,
  project: (p: Vec3) => ScreenPoint,
  x: number,
  y: number,
  reach: number,
  rim: Rim,
): EdgeRef | null {
  let best: { edge: EdgeRef; distance: number; nearness: number } | null = null
  for (const lines of index.edges.values()) {
    const runs = rim === 'either' ? [...lines.top, ...lines.bottom] : lines[rim]
    for (const run of runs) {
      let from = project([run[0]!, run[1]!, run[2]!])
      for (let i = 3; i + 2 < run.length; i += 3) {
        const to = project([run[i]!, run[i + 1]!, run[i + 2]!])
        const distance = distanceToSegment(x, y, from, to)
        const nearness = Math.max(from.nearness, to.nearness)
        const tie = best !== null && Math.abs(distance - best.distance) < SAME
        if (distance <= reach && (!best || (tie ? nearness > best.nearness : distance < best.distance))) {
          best = { edge: lines.edge, distance, nearness }
        }
        from = to
      }
    }
  }
  return best?.edge ?? null
}

/** Distances that no hand can tell apart, px. */
const SAME = 0.5

export function distanceToSegment(
  x: number,
  y: number,
  from: { x: number; y: number },
  to: { x: number; y: number },
): number {
  const dx = to.x - from.x
  const dy = to.y - from.y
  const square = dx * dx + dy * dy
  const share = square === 0 ? 0 : ((x - from.x) * dx + (y - from.y) * dy) / square
  const held = Math.min(1, Math.max(0, share))
  return Math.hypot(x - from.x - dx * held, y - from.y - dy * held)
}
