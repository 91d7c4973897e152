import { cornerName, edgeName } from '../walls/names.ts'
import type { CornerRef } from '../walls/types.ts'
import { degrees } from '../units/angle.ts'
import { formatAngle, formatNumber } from '../units/format.ts'
import { cureCorner, type CornerWalls } from './corner-cure.ts'
import { blendCure } from '../seams/blend-cure.ts'
import { firstRise } from '../walls/reachability.ts'
import { limitPassed, strictestLimit, type EdgeWall, type Limits } from './place.ts'
import type { Cure, Finding } from './schema.ts'

/** Findings about one corner. */

/** `jetTilt`: the largest angle that the jet needs along the seam, degrees. Null when it is within the limits. */
export function cornerOverLimit(
  corner: CornerRef,
  jetTilt: number,
  walls: CornerWalls,
  limits: Limits,
): Finding | null {
  const passed = limitPassed(jetTilt, limits)
  if (!passed) return null
  const { before, after, interiorAngle } = walls
  return {
    code: passed.kind === 'mechanical' ? 'corner-over-mechanical-limit' : 'corner-over-working-limit',
    severity: passed.kind === 'mechanical' ? 'stop' : 'warning',
    loop: corner.loop,
    vertex: corner.vertex,
    value: jetTilt,
    limit: passed.limit,
    message:
      `Corner ${cornerName(corner)} needs ${formatAngle(jetTilt)}; the ${passed.kind} limit is ${formatAngle(passed.limit)}. ` +
      `Walls ${tiltsText(before)} and ${tiltsText(after)} meet at ${formatAngle(degrees(interiorAngle))}.`,
    cure: cureCorner(walls, strictestLimit(limits), limits.mechanical),
  }
}

function tiltsText(wall: EdgeWall): string {
  return `${edgeName(wall)} ${wall.facets.map(({ tilt }) => formatAngle(tilt)).join('/')}`
}

/** Walls that meet smoothly at the top but differ below. */
export function smoothStep(corner: CornerRef, before: EdgeWall, after: EdgeWall): Finding {
  const [one, two] = [edgeName(before), edgeName(after)]
  return {
    code: 'smooth-step',
    severity: 'warning',
    loop: corner.loop,
    vertex: corner.vertex,
    message: `Edges ${one} and ${two} run smoothly into each other at ${cornerName(corner)}, but their walls differ: a step is left.`,
    cure: stepCure(before, after),
  }
}

/** The longer wall blends, where its length is known and a jet could still cut it; otherwise one wall takes the other's tilt. */
function stepCure(before: EdgeWall, after: EdgeWall): Cure {
  return blendedCure(before, after) ?? likeCure(before, after)
}

function blendedCure(before: EdgeWall, after: EdgeWall): Cure | null {
  if (before.length === undefined || after.length === undefined) return null
  const cure = blendCure({ ...before, length: before.length }, { ...after, length: after.length })
  if (!cure) return null
  const { facet, tilt, endTilt } = cure
  const wall = cure.change === 'before' ? before : after
  const facets = wall.facets.map(({ depth, ...tilts }, i) => ({
    depth,
    ...(i === facet ? { tilt, endTilt } : tilts),
  }))
  if (firstRise(facets) >= 0) return null
  const which = facets.length > 1 ? `facet ${facet + 1} of ${edgeName(wall)}` : edgeName(wall)
  return {
    message: `Blend ${which} from ${formatAngle(tilt, { sign: true })} at its start to ${formatAngle(endTilt, { sign: true })} at its end, or give both edges the same prep.`,
    set: { edges: [{ loop: wall.loop, edge: wall.edge }], facet, tilt, endTilt },
  }
}

function likeCure(before: EdgeWall, after: EdgeWall): Cure {
  const message = `Give ${edgeName(before)} and ${edgeName(after)} the same prep.`
  const [one, two] = [before.facets[0], after.facets[0]]
  if (!one || !two || before.facets.length > 1 || after.facets.length > 1) return { message }
  const [from, to] = Math.abs(one.tilt) >= Math.abs(two.tilt) ? [one, after] : [two, before]
  return {
    message: `Set ${edgeName(to)} to ${formatAngle(from.tilt)} too.`,
    set: { edges: [{ loop: to.loop, edge: to.edge }], facet: 0, tilt: from.tilt },
  }
}

/**
 * How far a fillet must leave the sharp corner to be worth a word, mm. Common practice, no source: finer than a
 * drawing's general tolerance, and it keeps the flat corners of a polygon that stands for a curve quiet.
 */
export const FILLET_WORTH_SAYING = 0.01

/**
 * A maker for one kerf (mm, at the top): a part may have thousands of such corners. It answers null where the
 * corner is so flat that the fillet makes no difference.
 */
export function concaveFillets(kerf: number): (corner: CornerRef, interiorAngle: number) => Finding | null {
  const radius = kerf / 2
  const tail = ` keeps a fillet of ${formatNumber(radius)} mm, half the kerf.`
  return ({ loop, vertex }, interiorAngle) => {
    const left = radius * (1 / Math.abs(Math.sin(interiorAngle / 2)) - 1)
    if (left < FILLET_WORTH_SAYING) return null
    return {
      code: 'concave-fillet',
      severity: 'note',
      loop,
      vertex,
      value: radius,
      message: `Corner ${cornerName({ loop, vertex })}${tail}`,
    }
  }
}
