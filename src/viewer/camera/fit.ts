import { along, basisOf, dot, type Frame, type Vec3, type ViewState } from './view-state.ts'

/** What must be seen: runs of xyz, mm. */
export type Runs = readonly ArrayLike<number>[]

/** Air left round a fitted part as a share of the free side; labels and balloons stand in it. */
export const FIT_AIR = 0.12

/** The smallest thing that a fit magnifies to fill the screen, mm. */
const LEAST_EXTENT = 1

/** The view from the same direction that shows every point; null if there is none. */
export function fitView(
  direction: Pick<ViewState, 'azimuth' | 'elevation'>,
  runs: Runs,
  frame: Frame,
  air = FIT_AIR,
): ViewState | null {
  const { right, up, toward } = basisOf(direction)
  const low = [Infinity, Infinity, Infinity]
  const high = [-Infinity, -Infinity, -Infinity]
  for (const run of runs) {
    for (let i = 0; i + 2 < run.length; i += 3) {
      const p: Vec3 = [run[i]!, run[i + 1]!, run[i + 2]!]
      const seen = [dot(p, right), dot(p, up), dot(p, toward)]
      for (let axis = 0; axis < 3; axis++) {
        low[axis] = Math.min(low[axis]!, seen[axis]!)
        high[axis] = Math.max(high[axis]!, seen[axis]!)
      }
    }
  }
  if (low[0] === Infinity) return null
  const width = Math.max(LEAST_EXTENT, high[0]! - low[0]!)
  const height = Math.max(LEAST_EXTENT, high[1]! - low[1]!)
  const room = 1 - 2 * air
  const scale = Math.min((frame.freeWidth * room) / width, (frame.freeHeight * room) / height)
  const middle = [0, 1, 2].map((axis) => (low[axis]! + high[axis]!) / 2)
  const target = along(along(along([0, 0, 0], right, middle[0]!), up, middle[1]!), toward, middle[2]!)
  const { azimuth, elevation } = direction
  return { azimuth, elevation, target, span: Math.min(frame.freeWidth, frame.freeHeight) / scale }
}
