import { edgeName } from '../../../../shared/walls/names.ts'
import type { EdgeRef } from '../../../../shared/walls/types.ts'
import { describeWall } from '../../../../shared/setup/describe.ts'
import { formatAngle } from '../../../../shared/units/format.ts'
import type { DisplayUnit } from '../../../../shared/units/length.ts'
import type { Facets } from './walls.ts'

/** Which way a wall leans, in words that leave no room for the sign to be misread. */
export function senseOf(tilt: number): 'opens downward' | 'undercut' | 'square' {
  return tilt > 0 ? 'opens downward' : tilt < 0 ? 'undercut' : 'square'
}

/** `+30° opens downward`. */
export function tiltWords(tilt: number): string {
  return tilt === 0 ? 'square' : `${formatAngle(tilt, { sign: true })} ${senseOf(tilt)}`
}

/** The short label that stands at an edge in 3D: `e1 +30° / 0°`. */
export function edgeLabel(edge: EdgeRef, facets: Facets): string {
  return `${edgeName(edge)} ${tiltsText(facets)}`
}

/** `+30° / 0°`, from the top face down. */
export function tiltsText(facets: Facets): string {
  return facets.map(({ tilt }) => formatAngle(tilt, { decimals: 1, sign: true })).join(' / ')
}

/** A wall in words with its sense, for the table and for screen readers. */
export function wallWords(facets: Facets, unit: DisplayUnit): string {
  const senses = new Set(facets.filter(({ tilt }) => tilt !== 0).map(({ tilt }) => senseOf(tilt)))
  const words = describeWall(facets, unit)
  return senses.size === 0 ? words : `${words}, ${[...senses].join(' then ')}`
}
