import { axisOffset } from '../jet/axis.ts'
import { datumReach } from '../walls/datum.ts'
import type { Body, Facet, Wall } from '../walls/types.ts'
import { reachAt } from '../walls/wall.ts'
import type { WallTable } from '../walls/wall-table.ts'
import { sideSlope } from './jet-lines.ts'
import type { Jet } from './types.ts'

/**
 * What the jet needs to know about each facet of each distinct wall, once; the facets of row r are
 * `firstFacet[r]` up to `firstFacet[r + 1]`, as in the wall table. Figures at the edge's start and at its end:
 * the same arrays where no wall blends.
 */
export interface AxisTable {
  readonly firstFacet: Int32Array
  /** Per row: the facet that the level-0 pass follows, counted from the wall's first. */
  readonly root: Int32Array
  readonly start: FacetFigures
  readonly end: FacetFigures
}

export interface FacetFigures {
  readonly tilt: Float64Array
  readonly tan: Float64Array
  readonly sec: Float64Array
  readonly sin: Float64Array
  /** How far the facet, prolonged to the top face, stands outside the drawing's outline, mm. */
  readonly wall: Float64Array
  /** The same of the jet's axis. */
  readonly axis: Float64Array
  /** Outward slope of the jet that is square to the edge, and 1 more than its square. */
  readonly slope: Float64Array
  readonly square: Float64Array
  /** sin of the tilt less slope times its cosine: sin τ per length of that jet. */
  readonly facing: Float64Array
  /** cos² of the tilt less sin² of the taper. */
  readonly narrow: Float64Array
}

export function axisTable(body: Body, table: WallTable, jet: Jet): AxisTable {
  const { walls, firstFacet } = table
  const root = Int32Array.from(walls, rootFacet)
  const start = figuresOf(body, walls, firstFacet, jet)
  const blends = walls.some((wall) => wall.facets.some((facet) => endTilt(facet) !== facet.tilt))
  const end = blends ? figuresOf(body, walls.map(wallAtEnd), firstFacet, jet) : start
  return { firstFacet, root, start, end }
}

/** The root facet stands nearest to vertical; of two alike the lower one, so that what lies above it goes first. */
export function rootFacet({ facets }: Wall): number {
  let root = 0
  facets.forEach((facet, k) => {
    if (steepest(facet) <= steepest(facets[root]!)) root = k
  })
  return root
}

/** A blend counts by its steeper end. */
function steepest(facet: Facet): number {
  return Math.max(Math.abs(facet.tilt), Math.abs(endTilt(facet)))
}

function endTilt(facet: Facet): number {
  return facet.endTilt ?? facet.tilt
}

/** The wall as it stands where its edge ends. */
function wallAtEnd({ facets }: Wall): Wall {
  return { facets: facets.map((facet) => ({ depth: facet.depth, tilt: endTilt(facet) })) }
}

function figuresOf(body: Body, walls: readonly Wall[], firstFacet: Int32Array, jet: Jet): FacetFigures {
  const count = firstFacet[walls.length]!
  const numbers = () => new Float64Array(count)
  const out = {
    tilt: numbers(),
    tan: numbers(),
    sec: numbers(),
    sin: numbers(),
    wall: numbers(),
    axis: numbers(),
    slope: numbers(),
    square: numbers(),
    facing: numbers(),
    narrow: numbers(),
  }
  let f = 0
  for (const given of walls) {
    const wall: Wall = { facets: given.facets.map(({ depth, tilt }) => ({ depth, tilt })) }
    const datum = datumReach(wall, body.datum, body.thickness)
    let top = 0
    for (const { depth, tilt } of wall.facets) {
      out.tilt[f] = tilt
      out.tan[f] = Math.tan(tilt)
      out.sec[f] = 1 / Math.cos(tilt)
      out.sin[f] = Math.sin(tilt)
      out.wall[f] = reachAt(wall, top) - top * out.tan[f]! - datum
      out.axis[f] = out.wall[f]! + axisOffset(jet.kerf, tilt, jet.taper)
      out.slope[f] = sideSlope(tilt, jet.taper, 0)
      out.square[f] = 1 + out.slope[f]! * out.slope[f]!
      out.facing[f] = Math.sin(jet.taper) * Math.sqrt(out.square[f]!)
      out.narrow[f] = Math.cos(tilt) ** 2 - Math.sin(jet.taper) ** 2
      top = depth
      f++
    }
  }
  return out
}
