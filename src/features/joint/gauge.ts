import { formatAngle } from '../../../shared/units/format.ts'
import type { AngleRow } from './joint-model.ts'

/**
 * Which of the three angles a gauge reads. Common practice, no source: a protractor's stock lies on the face,
 * and its blade may stand on either side of it, so the supplement is named too.
 */
export function gaugeSentence({ fromPlateFace, included }: AngleRow): string {
  const face = `A protractor laid on the plate's face reads ${formatAngle(fromPlateFace)} (or ${formatAngle(180 - fromPlateFace)} from its other side)`
  const groove =
    included === null ? '' : `; a gauge set into the fitted groove reads ${formatAngle(included)}`
  return `${face}${groove}.`
}
