import { cornersOf, seamTiltOf } from '../body/corners.ts'
import type { Corner } from '../body/types.ts'
import { cornerInDrawing } from '../geometry/orient.ts'
import { degrees, radians } from '../units/angle.ts'
import type { ReadRequest } from './read.ts'
import type { EvaluatedCorner } from './schema.ts'

/** A corner with what the findings need besides: the angle as computed. */
export interface CornerFigures {
  readonly out: EvaluatedCorner
  /** Radians. */
  readonly interiorAngle: number
}

/** Every corner in the caller's order. `taper` in degrees per side. */
export function evaluatedCorners({ body, reversed }: ReadRequest, taper: number): CornerFigures[] {
  const starts: number[] = []
  let total = 0
  for (const loop of body.loops) {
    starts.push(total)
    total += loop.length
  }
  const corners = new Array<CornerFigures>(total)
  const lean = radians(taper)
  for (const corner of cornersOf(body)) {
    const n = body.loops[corner.loop]?.length ?? 0
    const vertex = cornerInDrawing(corner.vertex, n, reversed[corner.loop] ?? false)
    const seam = largestSeam(corner, 0)
    corners[(starts[corner.loop] ?? 0) + vertex] = {
      interiorAngle: corner.interiorAngle,
      out: {
        loop: corner.loop,
        vertex,
        kind: corner.kind,
        interiorAngle: degrees(corner.interiorAngle),
        seamTilt: degreesOrNull(seam),
        jetTilt: degreesOrNull(taper === 0 ? seam : largestSeam(corner, lean)),
      },
    }
  }
  return corners
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
