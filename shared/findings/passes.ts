import type { CornerRef, EdgeRef } from '../walls/types.ts'
import { cornerName, edgeName } from '../walls/names.ts'
import { formatNumber } from '../units/format.ts'
import type { Finding } from './schema.ts'

/** Findings about the way of the jet. mm; the caller's numbering. */

/** The taper closes the cut before the jet is through. `at`: mm of its path; `path`: mm through the plate. */
export function kerfCloses(at: number, path: number): Finding {
  return {
    code: 'kerf-closes',
    severity: 'stop',
    value: at,
    limit: path,
    message: `With this taper the kerf has closed after ${formatNumber(at)} mm; the jet’s way through the plate is ${formatNumber(path)} mm.`,
    cure: { message: 'Measure kerf and taper on a coupon of this thickness, or cut more slowly.' },
  }
}

/** Why no way round a corner works. */
export type CornerHindrance = 'over-limit' | 'edge-too-short' | 'no-jet'

const hindrances: Record<CornerHindrance, string> = {
  'over-limit': 'leaning into it would pass the limit',
  'edge-too-short': 'an edge beside it is too short to lean along',
  'no-jet': 'it is sharper than the jet’s own taper',
}

export function cornerWithoutWay({ loop, vertex }: CornerRef, why: CornerHindrance): Finding {
  return {
    code: 'corner-without-way-round',
    severity: 'warning',
    loop,
    vertex,
    message: `No way round corner ${cornerName({ loop, vertex })} works: ${hindrances[why]}.`,
    cure: { message: 'Bring the tilts of its two walls nearer to each other or to vertical.' },
  }
}

/** A way round that the user chose does not work at this corner. */
export function cornerChoiceRefused({ loop, vertex }: CornerRef): Finding {
  return {
    code: 'corner-choice-refused',
    severity: 'warning',
    loop,
    vertex,
    message: `The way chosen round corner ${cornerName({ loop, vertex })} does not work there; another is taken.`,
    cure: { message: 'Choose another way round this corner, or leave the choice open.' },
  }
}

export function noRoomToPierce(loop: number): Finding {
  const where = loop === 0 ? 'round the part' : `in hole h${loop}`
  return {
    code: 'no-room-to-pierce',
    severity: 'warning',
    loop,
    message: `The waste ${where} has no place from which the jet could lead in clear of every wall.`,
    cure: { message: 'Drill a start hole, or use a jet with a narrower kerf.' },
  }
}

/** `left`: how much is left standing in the hollow, mm. */
export function detailFinerThanJet({ loop, edge }: EdgeRef, left: number | null): Finding {
  const rest = left === null ? 'material' : `${formatNumber(left)} mm`
  return {
    code: 'detail-finer-than-jet',
    severity: 'warning',
    loop,
    edge,
    ...(left === null ? {} : { value: left }),
    message: `Edge ${edgeName({ loop, edge })} lies in a hollow that the jet does not fit into: ${rest} is left standing there.`,
    cure: { message: 'Use a jet with a narrower kerf, or round the hollow to half the kerf.' },
  }
}

/** `diameter`: from which the hole can be cut, mm. */
export function holeTooSmallForTilt(loop: number, diameter: number | null): Finding {
  const from = diameter === null ? '' : ` From ${formatNumber(diameter)} mm across it could be cut.`
  return {
    code: 'hole-too-small-for-tilt',
    severity: 'stop',
    loop,
    ...(diameter === null ? {} : { limit: diameter }),
    message: `The tilted jets of opposite walls of hole h${loop} cross within the plate.${from}`,
    cure: { message: `Give the walls of h${loop} a smaller tilt, or make the hole larger.` },
  }
}

/** `apart`: the most that the straight jet departs from the bent seam, mm. */
export function seamBends({ loop, vertex }: CornerRef, apart: number): Finding {
  return {
    code: 'seam-bends',
    severity: 'note',
    loop,
    vertex,
    value: apart,
    message: `The seam at ${cornerName({ loop, vertex })} is bent beside its arc, and a jet is straight: they part by ${formatNumber(apart)} mm.`,
  }
}

/** A pass is still to be cut when the pass before it has freed the piece. */
export function looseBeforeLastPass(loop: number): Finding {
  const piece = loop === 0 ? 'The part' : `The slug of hole h${loop}`
  return {
    code: 'loose-before-last-pass',
    severity: 'note',
    loop,
    message: `${piece} is free before its last pass is cut, as an earlier one goes all the way round.`,
    cure: { message: 'Fix it down, or leave a tab in the earlier pass.' },
  }
}
