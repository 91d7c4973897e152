import type { JointBands } from '../prep/starting-values.ts'
import { judge, type Judgement } from './judge.ts'

/** The three figures of a joint that a gauge reads: groove angle in degrees, the others in mm. */
export interface JointFigures {
  readonly angle: number
  readonly rootOpening: number
  readonly rootFace: number
}

/** Null where the band is not given: then nothing is judged. */
export type JointJudgement = { readonly [figure in keyof JointFigures]: Judgement | null }

/** The lowest and highest that each figure may be; lengths and angles below nothing are nothing. */
export type JointRanges = {
  readonly [figure in keyof JointFigures]: { readonly from: number; readonly to: number } | null
}

/**
 * What the bands allow about the joint's own figures. As detailed the nominal is the row's figure, as fit up it is
 * the detail's: the same sum, said twice with different bands.
 */
export function jointRanges(nominal: JointFigures, bands: JointBands): JointRanges {
  const judged = judgeJoint(nominal, nominal, bands)
  const range = (own: Judgement | null) =>
    own && { from: Math.max(0, own.lowest), to: Math.max(0, own.highest) }
  return {
    angle: range(judged.angle),
    rootOpening: range(judged.rootOpening),
    rootFace: range(judged.rootFace),
  }
}

/** A measured joint against its figures. */
export function judgeJoint(measured: JointFigures, nominal: JointFigures, bands: JointBands): JointJudgement {
  const one = (figure: keyof JointFigures) => {
    const band = bands[figure]
    return band && judge(measured[figure], nominal[figure], band)
  }
  return { angle: one('angle'), rootOpening: one('rootOpening'), rootFace: one('rootFace') }
}
