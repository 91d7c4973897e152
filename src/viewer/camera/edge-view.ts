import type { EdgeLines } from '../scene/mesh-index.ts'
import { stationsOf } from '../overlay/stations.ts'
import { fitView } from './fit.ts'
import type { Frame, ViewState } from './view-state.ts'

/** Off square to the edge, so that its wall, its ends and the top face are seen together. Radians. */
const ASIDE = (24 * Math.PI) / 180
const ABOVE = (28 * Math.PI) / 180
/** An edge is never magnified past this share of the part: it must be seen where it belongs. */
const LEAST_SHARE = 0.35

/** The view in which an edge faces the eye; null for an edge without a line. */
export function edgeView(lines: EdgeLines, radius: number, frame: Frame): ViewState | null {
  const station = stationsOf(lines)[0]
  if (!station) return null
  const [x, y] = station.outward
  const direction = { azimuth: Math.atan2(x, -y) + ASIDE, elevation: ABOVE }
  const fitted = fitView(direction, [...lines.top, ...lines.bottom], frame)
  return fitted && { ...fitted, span: Math.max(fitted.span, radius * 2 * LEAST_SHARE) }
}
