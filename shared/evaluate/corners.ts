import { cornersOf, seamTiltOf } from '../seams/corners.ts'
import type { Corner } from '../seams/types.ts'
import { cornerInDrawing } from '../geometry/orient.ts'
import { degrees, radians } from '../units/angle.ts'
import type { ReadRequest } from './read.ts'
import type { EvaluatedCorner } from './schema.ts'

/** The corners with what the findings need besides: their angles as computed. */
export interface CornerFigures {
  readonly corners: EvaluatedCorner[]
  /** By place in `corners`, radians. */
  readonly interiorAngles: Float64Array
}

/** Every corner in the caller's order. `taper` in degrees per side. */
export function evaluatedCorners({ body, reversed }: ReadRequest, taper: number): CornerFigures {
  const starts: number[] = []
  let total = 0
  for (const loop of body.loops) {
    starts.push(total)
    total += loop.length
  }
  const corners = new Array<EvaluatedCorner>(total)
  const interiorAngles = new Float64Array(total)
  const lean = radians(taper)
  for (const corner of cornersOf(body)) {
    const { loop, kind, interiorAngle } = corner
    const n = body.loops[loop]?.length ?? 0
    const vertex = cornerInDrawing(corner.vertex, n, reversed[loop] ?? false)
    const seamTilt = degreesOrNull(largestSeam(corner, 0))
    const jetTilt = taper === 0 ? seamTilt : degreesOrNull(largestSeam(corner, lean))
    const at = (starts[loop] ?? 0) + vertex
    interiorAngles[at] = interiorAngle
    corners[at] = { loop, vertex, kind, interiorAngle: degrees(interiorAngle), seamTilt, jetTilt }
  }
  return { corners, interiorAngles }
}

function degreesOrNull(angle: number | null): number | null {
  return angle === null ? null : degrees(angle)
}

/** Over all bands of depth, with `lean` taken from both tilts; null where the walls leave a step. Radians. */
function largestSeam({ bands, kind, interiorAngle }: Corner, lean: number): number | null {
  let most = 0
  for (const { seamTilt, tilts } of bands) {
    if (seamTilt === null) return null
    const [before, after] = tilts
    const own =
      lean === 0
        ? seamTilt
        : kind === 'smooth'
          ? Math.max(Math.abs(before - lean), Math.abs(after - lean))
          : seamTiltOf(before - lean, after - lean, Math.PI - interiorAngle)
    if (own === null) return null
    if (own > most) most = own
  }
  return most
}
