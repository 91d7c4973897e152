import { edgeName } from '../walls/names.ts'
import type { BodyEvent } from '../events/types.ts'
import type { EdgeRef } from '../walls/types.ts'
import { formatNumber } from '../units/format.ts'
import type { Cure, Finding } from './schema.ts'

/** Findings about the shape of the part. Depths in mm. */

const EVENT_CODES = {
  vanish: 'wall-vanishes',
  split: 'contour-splits',
  'break-through': 'walls-break-through',
} as const

/** The first depth at which the plain walls stop being right. */
export function eventFinding(event: BodyEvent, thickness: number, cure: Cure | undefined): Finding {
  return {
    code: EVENT_CODES[event.kind],
    severity: 'stop',
    loop: event.loop,
    edge: event.edge,
    value: event.depth,
    limit: thickness,
    message: `${eventText(event)} at a depth of ${formatNumber(event.depth)} mm; the plate is ${formatNumber(thickness)} mm thick.`,
    cure: cure ?? { message: 'Use smaller tilts on the walls that meet there, or a thinner plate.' },
  }
}

function eventText({ kind, loop, edge, other }: BodyEvent): string {
  const name = edgeName({ loop, edge })
  const met = other ? edgeName(other) : 'another wall'
  switch (kind) {
    case 'vanish':
      return `Wall ${name} shrinks to nothing between its neighbours`
    case 'split':
      return `A corner of wall ${name} runs into wall ${met} and splits the part`
    case 'break-through':
      return `Walls ${name} and ${met} break through into each other`
  }
}

export function holeSmallerThanKerf(loop: number, width: number, kerf: number): Finding {
  return {
    code: 'hole-smaller-than-kerf',
    severity: 'stop',
    loop,
    value: width,
    limit: kerf,
    message: `Hole h${loop} is ${formatNumber(width)} mm wide at its narrowest; the kerf is ${formatNumber(kerf)} mm. It cannot be cut to size.`,
    cure: { message: 'Leave the hole out, drill it, or use a jet with a narrower kerf.' },
  }
}

export function profileCrosses(edge: EdgeRef, other: EdgeRef | null): Finding {
  const met = other ? edgeName(other) : 'the profile'
  return {
    code: 'profile-crosses-itself',
    severity: 'stop',
    loop: edge.loop,
    edge: edge.edge,
    message: `Edge ${edgeName(edge)} crosses or touches ${met}. The part has no clear inside there.`,
    cure: { message: 'Correct the drawing and read it again.' },
  }
}

export function loopOutside(loop: number): Finding {
  return {
    code: 'loop-outside-part',
    severity: 'stop',
    loop,
    message: `Loop h${loop} does not lie inside the outer loop alone, so it is no hole of this part.`,
    cure: { message: 'Pick the outer loop and its own holes again from the drawing.' },
  }
}
