import type { SoundRange } from '../events/range.ts'
import { rangeOfEvent } from '../events/range.ts'
import { isPlain } from '../events/plain.ts'
import { strictestLimit, type Limits } from '../findings/place.ts'
import { areaRates, plainVolume } from '../solid/plain-volume.ts'
import { volumeOf } from '../solid/volume.ts'
import { cornerColumns, cornerRules, type CornerColumns } from './corner-columns.ts'
import { edgeColumns, type EdgeColumns } from './edge-columns.ts'
import type { ReadRequest } from './read.ts'
import type { Evaluation, EvaluationRequest } from './schema.ts'
import { neededTilt } from './steepest.ts'

/** All that an evaluation works out, before anything is put into words or objects. */
export interface Columns {
  readonly read: ReadRequest
  /** Null where the profile itself is not sound. */
  readonly range: SoundRange | null
  readonly edges: EdgeColumns
  readonly corners: CornerColumns
  readonly volume: number | null
  readonly neededTilt: Evaluation['neededTilt']
}

export function limitsOf({ head }: EvaluationRequest): Limits | null {
  return head ? { mechanical: head.mechanicalLimit, working: head.workingLimit ?? null } : null
}

export function columnsOf(read: ReadRequest): Columns {
  const { request, body, problems, event } = read
  const limits = limitsOf(request)
  const range = problems.length === 0 ? rangeOfEvent(body, event) : null
  const edges = edgeColumns(read, range, limits)
  const corners = cornerColumns(read, cornerRules(read, limits && strictestLimit(limits)))
  return {
    read,
    range,
    edges,
    corners,
    volume: range && !range.event ? volume(read, edges) : null,
    neededTilt: neededTilt(read, edges, corners),
  }
}

function volume({ body, frame, area }: ReadRequest, { lengths }: EdgeColumns): number | null {
  return isPlain(frame) && body.datum === 'top'
    ? plainVolume(frame, area, areaRates(frame, lengths))
    : volumeOf(body)
}
