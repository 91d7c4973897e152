import { meetingOf, meetingsAtRest, type ProfileProblem } from '../geometry/problems.ts'
import type { Frame } from '../contours/frame.ts'
import { firstEvent } from './event.ts'
import { isPlain } from './plain.ts'
import { plainEvent } from './plain-event.ts'
import type { BodyEvent } from './types.ts'

/** Where edges of the drawing meet that must not, and the first event; the event means nothing where they do. */
export interface Survey {
  readonly meetings: readonly ProfileProblem[]
  readonly event: BodyEvent | null
}

/** Both in one spatial pass for plain bodies: pairs that touch at rest are among those that may meet on the way. */
export function surveyOf(frame: Frame): Survey {
  if (frame.count === 0) return { meetings: [], event: null }
  if (!isPlain(frame))
    return { meetings: meetingsAtRest(frame.outline, frame.near), event: firstEvent(frame.body) }
  const meetings: ProfileProblem[] = []
  const touching = (a: number, b: number) => {
    const problem = meetingOf(frame.outline, a, b, frame.near)
    if (problem) meetings.push(problem)
  }
  return { meetings, event: plainEvent(frame, touching) }
}
