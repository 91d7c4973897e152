import type { FacetDegrees } from '../findings/place.ts'
import { edgeName } from '../walls/names.ts'
import type { FacetSpec, WallSpec } from '../walls/schema.ts'
import type { Wall } from '../walls/types.ts'
import { squareWall } from '../walls/wall.ts'
import { radians } from '../units/angle.ts'
import { formatNumber } from '../units/format.ts'
import { EvaluationError } from './error.ts'

/** The distinct preps of a request, and which edge has which: what follows from a prep is worked out once. */
export interface Preps {
  readonly list: readonly Prep[]
  /** Place in `list` by edge through all loops, the caller's numbering. */
  readonly ofEdge: Int32Array
}

export interface Prep {
  /** As the caller gave it, degrees. */
  readonly facets: readonly FacetDegrees[]
  /** The same in radians; one facet where it is square from top to bottom. */
  readonly wall: Wall
}

/** How far the last facet may end from the plate's bottom and still mean it, mm: rounding of inches to text. */
const THICKNESS_ROUNDING = 1e-6

/** `loopStart`: first edge of every loop through all loops, then the count. Throws `EvaluationError`. */
export function readPreps(walls: readonly WallSpec[], loopStart: Int32Array, thickness: number): Preps {
  const ofEdge = new Int32Array(loopStart.at(-1)!).fill(-1)
  const book = new PrepBook(thickness)
  for (let i = 0; i < walls.length; i++) {
    const wall = walls[i]!
    const at = edgeNamed(wall, loopStart)
    if (ofEdge[at] !== -1) {
      const { loop, edge } = wall
      throw new EvaluationError(
        'wall-named-twice',
        `Edge ${edgeName(wall)} (loop ${loop}, edge ${edge}) is given two walls. Keep one.`,
        wall,
      )
    }
    ofEdge[at] = book.place(soundFacets(wall, thickness))
  }
  for (let e = 0; e < ofEdge.length; e++) if (ofEdge[e] === -1) ofEdge[e] = SQUARE
  return { list: book.list, ofEdge }
}

/** The edge that a wall is given for, through all loops. Throws `EvaluationError` where the profile has none. */
export function edgeNamed(wall: WallSpec, loopStart: Int32Array): number {
  const { loop, edge } = wall
  const at = loop < loopStart.length - 1 ? loopStart[loop]! + edge : Infinity
  if (at < (loopStart[loop + 1] ?? 0)) return at
  throw new EvaluationError(
    'wall-names-no-edge',
    `A wall is given for edge ${edge} of loop ${loop}, which the profile does not have. Count loops and edges from 0.`,
    wall,
  )
}

/** The prep of edges that no wall is given for. */
const SQUARE = 0

/** Throws `EvaluationError` unless the facets go down to the thickness one after the other. */
export function soundFacets(wall: WallSpec, thickness: number): readonly FacetSpec[] {
  const { facets } = wall
  let above = 0
  for (let i = 0; i < facets.length; i++) {
    const { depth } = facets[i]!
    if (!(depth > above)) {
      throw new EvaluationError(
        'facets-out-of-order',
        `The facets of edge ${edgeName(wall)} must end deeper one after the other; ${formatNumber(depth)} mm follows ${formatNumber(above)} mm.`,
        wall,
      )
    }
    above = depth
  }
  if (above === thickness) return facets
  if (!(Math.abs(above - thickness) <= THICKNESS_ROUNDING)) {
    throw new EvaluationError(
      'facets-miss-thickness',
      `The last facet of edge ${edgeName(wall)} ends at ${formatNumber(above, { decimals: 6 })} mm; ` +
        `it must end at the plate's thickness, ${formatNumber(thickness, { decimals: 6 })} mm.`,
      wall,
    )
  }
  return facets.map((facet, i) => (i === facets.length - 1 ? { ...facet, depth: thickness } : facet))
}

/** Gives equal lists of facets one place, found again by a hash of their numbers. */
export class PrepBook {
  readonly list: Prep[] = []
  readonly #square: Wall
  /** Places in `list` plus one, 0 where free; a power of two, at most half full. */
  #slots = new Int32Array(64)

  constructor(thickness: number) {
    this.#square = squareWall(thickness)
    this.place([{ depth: thickness, tilt: 0 }])
  }

  place(facets: readonly FacetDegrees[]): number {
    const mask = this.#slots.length - 1
    let slot = hashOf(facets) & mask
    for (let place = this.#slots[slot]!; place !== 0; place = this.#slots[slot]!) {
      if (sameFacets(this.list[place - 1]!.facets, facets)) return place - 1
      slot = (slot + 1) & mask
    }
    this.#slots[slot] = this.list.push({ facets, wall: wallOf(facets, this.#square) })
    if (this.list.length * 2 > this.#slots.length) this.#grow()
    return this.list.length - 1
  }

  #grow(): void {
    const slots = new Int32Array(this.#slots.length * 2)
    const mask = slots.length - 1
    this.list.forEach(({ facets }, place) => {
      let slot = hashOf(facets) & mask
      while (slots[slot] !== 0) slot = (slot + 1) & mask
      slots[slot] = place + 1
    })
    this.#slots = slots
  }
}

const number = new Float64Array(1)
const bits = new Int32Array(number.buffer)

/** Bits of every number stirred by odd factors (the golden ratio's, as is common; no source needed). */
function hashOf(facets: readonly FacetDegrees[]): number {
  let hash = facets.length
  for (let i = 0; i < facets.length; i++) {
    const { depth, tilt, endTilt } = facets[i]!
    hash = stir(hash, depth)
    hash = stir(hash, tilt)
    if (endTilt !== undefined && endTilt !== tilt) hash = stir(hash, endTilt)
  }
  return hash ^ (hash >>> 15)
}

function stir(hash: number, value: number): number {
  number[0] = value + 0 // −0 is 0
  const mixed = Math.imul(hash ^ bits[0]! ^ Math.imul(bits[1]!, 0x85ebca6b), 0x9e3779b1)
  return mixed ^ (mixed >>> 16)
}

export function sameFacets(a: readonly FacetDegrees[], b: readonly FacetDegrees[]): boolean {
  if (a.length !== b.length) return false
  for (let i = 0; i < a.length; i++) {
    const [p, q] = [a[i]!, b[i]!]
    if (p.depth !== q.depth || p.tilt !== q.tilt) return false
    if ((p.endTilt ?? p.tilt) !== (q.endTilt ?? q.tilt)) return false
  }
  return true
}

function wallOf(facets: readonly FacetDegrees[], square: Wall): Wall {
  if (facets.every(({ tilt, endTilt }) => tilt === 0 && (endTilt ?? 0) === 0)) return square
  return {
    facets: facets.map(({ depth, tilt, endTilt }) =>
      endTilt === undefined
        ? { depth, tilt: radians(tilt) }
        : { depth, tilt: radians(tilt), endTilt: radians(endTilt) },
    ),
  }
}
