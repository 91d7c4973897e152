import { largestCornerTilt, seamTiltOf } from '../seams/corners.ts'
import { edgeName } from '../walls/names.ts'
import { tiltsAllowedBeside } from '../seams/limits.ts'
import { degrees, radians } from '../units/angle.ts'
import { formatAngle } from '../units/format.ts'
import { LIMIT_ROUNDING, roundTilt, withTilt, type EdgeWall } from './place.ts'
import type { Cure } from './schema.ts'

/** The tilts that bring a corner's seam within a limit. Degrees; the interior angle in radians. */

export interface CornerWalls {
  readonly before: EdgeWall
  readonly after: EdgeWall
  readonly interiorAngle: number
  /** Degrees per side; the jet leans by tilt − taper. */
  readonly taper: number
}

interface Trial {
  readonly change: 'before' | 'after' | 'both'
  readonly facet: number
  /** Largest tilt allowed, and the same rounded to the safe side. */
  readonly most: number
  readonly tilt: number
}

/** One number where one number is enough, words otherwise. `headLimit` is told too when it allows more. */
export function cureCorner(corner: CornerWalls, limit: number, headLimit: number): Cure {
  const { before, after } = corner
  const names = {
    before: edgeName(before),
    after: edgeName(after),
    both: `${edgeName(before)} and ${edgeName(after)}`,
  }
  const trial = trials(corner, limit).find((candidate) => cures(corner, candidate, limit))
  if (!trial) {
    return {
      message: `Bring the tilts of ${names.both} nearer to vertical, until the corner is within ${formatAngle(limit)}.`,
    }
  }
  const chosen = trial.change === 'both' ? [before, after] : [corner[trial.change]]
  const facet = chosen.some(({ facets }) => facets.length > 1) ? `facet ${trial.facet + 1} of ` : ''
  const byHead = headLimit > limit ? mostAllowed(corner, trial, headLimit) : null
  const beyond = byHead === null ? '' : `; the head itself allows ${formatAngle(byHead)}`
  return {
    message: `Set ${facet}${names[trial.change]} to ${formatAngle(trial.tilt)} (at most ${formatAngle(trial.most)}${beyond}).`,
    set: {
      edges: chosen.map(({ loop, edge }) => ({ loop, edge })),
      facet: trial.facet,
      tilt: trial.tilt,
      most: trial.most,
    },
  }
}

/** Largest seam of the jet over all depths, degrees. */
export function jetSeam({ before, after, interiorAngle, taper }: CornerWalls): number {
  return Math.max(
    ...facetPairs(before, after).map(([i, j]) =>
      pairSeam(tiltOf(before, i) - taper, tiltOf(after, j) - taper, interiorAngle),
    ),
  )
}

/** Unlike walls without a turn have no seam: as far past any limit as can be. */
function pairSeam(jet1: number, jet2: number, interiorAngle: number): number {
  const seam = seamTiltOf(radians(jet1), radians(jet2), Math.PI - interiorAngle)
  return seam === null ? 90 : degrees(seam)
}

function tiltOf(wall: EdgeWall, facet: number): number {
  return wall.facets[facet]?.tilt ?? 0
}

/** Facets of both walls that face each other at some depth, from the top down. */
function facetPairs(before: EdgeWall, after: EdgeWall): [number, number][] {
  const pairs: [number, number][] = []
  let [i, j] = [0, 0]
  while (i < before.facets.length && j < after.facets.length) {
    pairs.push([i, j])
    const [endBefore, endAfter] = [before.facets[i]?.depth ?? 0, after.facets[j]?.depth ?? 0]
    if (endBefore <= endAfter) i++
    if (endAfter <= endBefore) j++
  }
  return pairs
}

/** What to try, best first: equal walls together, else the wall that leans more, else the other, else both. */
function trials(corner: CornerWalls, limit: number): Trial[] {
  const { before, after, interiorAngle, taper } = corner
  const [i, j] = worstPair(corner)
  const [jet1, jet2] = [tiltOf(before, i) - taper, tiltOf(after, j) - taper]
  const list: (Trial | null)[] = []
  const together = i === j ? bothTrial(corner, i, jet1, jet2, limit) : null
  const alone = (change: 'before' | 'after', facet: number, jet: number, other: number): Trial | null => {
    const allowed = tiltsAllowedBeside(radians(limit), radians(other), interiorAngle)
    return allowed && toward(change, facet, jet, degrees(allowed.lowest), degrees(allowed.highest), taper)
  }
  const first = alone('before', i, jet1, jet2)
  const second = alone('after', j, jet2, jet1)
  if (Math.abs(jet1 - jet2) <= LIMIT_ROUNDING) list.push(together)
  list.push(...(Math.abs(jet1) >= Math.abs(jet2) ? [first, second] : [second, first]), together)
  return list.filter((trial) => trial !== null)
}

function worstPair(corner: CornerWalls): [number, number] {
  const { before, after, interiorAngle, taper } = corner
  let worst: [number, number] = [0, 0]
  let most = -1
  for (const pair of facetPairs(before, after)) {
    const seam = pairSeam(tiltOf(before, pair[0]) - taper, tiltOf(after, pair[1]) - taper, interiorAngle)
    if (seam > most) [most, worst] = [seam, pair]
  }
  return worst
}

function bothTrial(
  corner: CornerWalls,
  facet: number,
  jet1: number,
  jet2: number,
  limit: number,
): Trial | null {
  if (jet1 * jet2 <= 0) return null
  const most = degrees(largestCornerTilt(radians(limit), corner.interiorAngle))
  const smaller = Math.abs(jet1) < Math.abs(jet2) ? jet1 : jet2
  return Math.abs(smaller) < most ? null : toward('both', facet, smaller, -most, most, corner.taper)
}

/** The end of the allowed jet tilts that lies toward the present one; null if that would turn the wall the other way. */
function toward(
  change: Trial['change'],
  facet: number,
  jet: number,
  lowest: number,
  highest: number,
  taper: number,
): Trial | null {
  const most = jet > highest ? highest : jet < lowest ? lowest : null
  if (most === null || most * jet < 0) return null
  const tilt = roundTilt(most + taper, jet > highest ? 'down' : 'up')
  return { change, facet, most: most + taper, tilt }
}

function cures(corner: CornerWalls, trial: Trial, limit: number): boolean {
  const changed = (side: 'before' | 'after') =>
    trial.change === side || trial.change === 'both'
      ? withTilt(corner[side], trial.facet, trial.tilt)
      : corner[side]
  const [before, after] = [changed('before'), changed('after')]
  return before !== null && after !== null && jetSeam({ ...corner, before, after }) <= limit + LIMIT_ROUNDING
}

/** The largest tilt of the same change under another limit; null when it has none. */
function mostAllowed(corner: CornerWalls, trial: Trial, limit: number): number | null {
  const same = trials(corner, limit).find(
    ({ change, facet }) => change === trial.change && facet === trial.facet,
  )
  return same && cures(corner, same, limit) ? same.most : null
}
