import { contourAt } from '../../shared/contours/contour.ts'
import { contourVertices } from '../../shared/evaluate/contours.ts'
import { bodyOf, evaluate } from '../../shared/evaluate/evaluate.ts'
import type { EvaluatedContour, Evaluation } from '../../shared/evaluate/schema.ts'
import { soundRange, type SoundRange } from '../../shared/events/range.ts'
import { interferencesOf } from '../../shared/interference/interference.ts'
import type { Interference } from '../../shared/interference/types.ts'
import { passesOf } from '../../shared/passes/passes.ts'
import type { Jet, Passes } from '../../shared/passes/types.ts'
import { levelsOf } from '../../shared/walls/levels.ts'
import type { Body } from '../../shared/walls/types.ts'
import { wayOut } from '../../shared/way-out/way-out.ts'
import type { WaysOut } from '../../shared/way-out/types.ts'
import type { CorpusPart } from '../corpus/parts.ts'
import { DEGREE } from '../support/plates.ts'

/** All that a picture of a part is made of. */
export interface Scene {
  readonly part: CorpusPart
  readonly body: Body
  readonly range: SoundRange
  readonly evaluation: Evaluation
  /** At many depths, rising: those of the evaluation and some between. */
  readonly contours: readonly EvaluatedContour[]
  readonly jet: Jet
  readonly passes: Passes
  readonly interference: Interference
  readonly waysOut: WaysOut
}

/** Depths drawn between two levels of a part. */
const BETWEEN = 3

export function sceneOf(part: CorpusPart): Scene {
  const { request } = part
  const body = bodyOf(request)
  const range = soundRange(body)
  const { kerf, taper } = { kerf: 1, taper: 0, ...request.jet }
  const jet = { kerf, taper: taper * DEGREE }
  const limit = request.head && Math.min(request.head.mechanicalLimit, request.head.workingLimit ?? 90)
  const passes = passesOf(body, jet, { tilt: limit === undefined ? null : limit * DEGREE })
  return {
    part,
    body,
    range,
    evaluation: evaluate(request),
    contours: drawnDepths(body, range).map((depth) => contourVertices(contourAt(body, depth))),
    jet,
    passes,
    interference: interferencesOf(body, passes, jet),
    waysOut: wayOut(body, kerf),
  }
}

function drawnDepths(body: Body, { from, to, empty }: SoundRange): number[] {
  if (empty) return []
  const ends = [...new Set([from, ...levelsOf(body).filter((depth) => depth > from && depth < to), to])]
  return ends.flatMap((depth, i) => {
    const next = ends[i + 1]
    if (next === undefined) return [depth]
    return Array.from({ length: BETWEEN + 1 }, (_, k) => depth + (k / (BETWEEN + 1)) * (next - depth))
  })
}
