import { largestCornerTilt, seamTiltOf } from '../seams/corners.ts'
import { edgeName } from '../walls/names.ts'
import { seamJetTilt } from '../passes/jet-lines.ts'
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
export function jetSeam(corner: CornerWalls): number {
  const { before, after } = corner
  return Math.max(
    ...facetPairs(before, after).map(([i, j]) => pairSeam(corner, tiltOf(before, i), tiltOf(after, j))),
  )
}

/** Of the jet for two tilts. Where there is none (unlike walls without a turn), as far past any limit as can be. */
function pairSeam({ interiorAngle, taper }: CornerWalls, before: number, after: number): number {
  const turn = Math.PI - interiorAngle
  const [one, two] = [radians(before), radians(after)]
  const seam = taper === 0 ? seamTiltOf(one, two, turn) : seamJetTilt(one, two, turn, radians(taper))
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
  const { before, after, taper } = corner
  const [i, j] = worstPair(corner)
  const [tilt1, tilt2] = [tiltOf(before, i), tiltOf(after, j)]
  const list: (Trial | null)[] = []
  const together = i === j ? bothTrial(corner, i, tilt1, tilt2, limit) : null
  const first = aloneTrial(corner, 'before', i, tilt1, tilt2, limit)
  const second = aloneTrial(corner, 'after', j, tilt2, tilt1, limit)
  if (Math.abs(tilt1 - tilt2) <= LIMIT_ROUNDING) list.push(together)
  const firstLeansMore = Math.abs(tilt1 - taper) >= Math.abs(tilt2 - taper)
  list.push(...(firstLeansMore ? [first, second] : [second, first]), together)
  return list.filter((trial) => trial !== null)
}

function worstPair(corner: CornerWalls): [number, number] {
  const { before, after } = corner
  let worst: [number, number] = [0, 0]
  let most = -1
  for (const pair of facetPairs(before, after)) {
    const seam = pairSeam(corner, tiltOf(before, pair[0]), tiltOf(after, pair[1]))
    if (seam > most) [most, worst] = [seam, pair]
  }
  return worst
}

/** One wall changes, the other keeps its tilt: closed form without taper, else searched from the tilt that needs least. */
function aloneTrial(
  corner: CornerWalls,
  change: 'before' | 'after',
  facet: number,
  tilt: number,
  other: number,
  limit: number,
): Trial | null {
  const { interiorAngle, taper } = corner
  if (taper === 0) {
    const allowed = tiltsAllowedBeside(radians(limit), radians(other), interiorAngle)
    return allowed && toward(change, facet, tilt, degrees(allowed.lowest), degrees(allowed.highest), 0)
  }
  const least = degrees(Math.atan(-Math.tan(radians(other - taper)) * Math.cos(interiorAngle))) + taper
  const seam = (own: number) =>
    change === 'before' ? pairSeam(corner, own, other) : pairSeam(corner, other, own)
  const most = lastWithin(seam, least, tilt, limit)
  return most === null ? null : toward(change, facet, tilt, most, most, taper)
}

/** Both walls take one tilt; without a taper nothing leans at 0, with one at the taper itself. */
function bothTrial(
  corner: CornerWalls,
  facet: number,
  tilt1: number,
  tilt2: number,
  limit: number,
): Trial | null {
  const { interiorAngle, taper } = corner
  const [lean1, lean2] = [tilt1 - taper, tilt2 - taper]
  if (lean1 * lean2 <= 0) return null
  const smaller = Math.abs(lean1) < Math.abs(lean2) ? tilt1 : tilt2
  if (taper === 0) {
    const most = degrees(largestCornerTilt(radians(limit), interiorAngle))
    return Math.abs(smaller) < most ? null : toward('both', facet, smaller, -most, most, 0)
  }
  const most = lastWithin((own) => pairSeam(corner, own, own), taper, smaller, limit)
  return most === null ? null : toward('both', facet, smaller, most, most, taper)
}

/** Where halving ends, degrees. */
const FINEST_TILT = 1e-12

/** The last tilt within a limit on the way from one that keeps it to one that passes it; null where that is not so. */
function lastWithin(seam: (tilt: number) => number, from: number, to: number, limit: number): number | null {
  if (!(seam(from) <= limit) || seam(to) <= limit) return null
  let [within, beyond] = [from, to]
  while (Math.abs(beyond - within) > FINEST_TILT) {
    const middle = (within + beyond) / 2
    if (middle === within || middle === beyond) break
    if (seam(middle) <= limit) within = middle
    else beyond = middle
  }
  return within
}

/** The end of the allowed tilts that lies toward the present one; null if that would turn the jet the other way. */
function toward(
  change: Trial['change'],
  facet: number,
  tilt: number,
  lowest: number,
  highest: number,
  taper: number,
): Trial | null {
  const most = tilt > highest ? highest : tilt < lowest ? lowest : null
  if (most === null || (most - taper) * (tilt - taper) < 0) return null
  return { change, facet, most, tilt: roundTilt(most, tilt > highest ? 'down' : 'up') }
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
