import { frameOf } from '../contours/frame.ts'
import { soundRange } from '../events/range.ts'
import { visitMeetingPairs } from '../geometry/boxes.ts'
import type { Jet, Passes } from '../passes/types.ts'
import { levelsOf } from '../walls/levels.ts'
import type { Body } from '../walls/types.ts'
import { facetIndexAt } from '../walls/wall.ts'
import { isClear, liesBehind, outsideWall, type Scene } from './clear.ts'
import { deepestBite } from './deepest.ts'
import { groundOf, mayMeet, moveMayMeet, movesByEdge, type MovesByEdge } from './ground.ts'
import { jetCone } from './jet-cone.ts'
import { rimsOf } from './rims.ts'
import { BITE_TOLERANCE, type HeadShape, type Interference, type JetBite } from './types.ts'
import { isPlane, wallBand } from './wall-band.ts'

export interface InterferenceOptions {
  /** The nozzle and head over the plate; left out, the jet alone is looked at. */
  readonly head?: HeadShape | undefined
  /** Look only at pairs in which one of these edges cuts or is cut (numbered through all loops). */
  readonly only?: ReadonlySet<number> | undefined
  /** Most bites that are told in full. */
  readonly most?: number | undefined
}

/** Bites told in full where nothing else is asked: more than a person reads. */
const MOST_BITES = 100

/**
 * Where the jet of a set of passes enters the part beside the cut that it is meant to make, and how near nozzle and
 * head come to the plate. The jet is followed with its width through the depths over which the contour is right
 * (`soundRange`); the part reaches no further, so that there is nothing to meet below the plate.
 */
export function interferencesOf(
  body: Body,
  passes: Pick<Passes, 'path' | 'passes'>,
  jet: Jet,
  options: InterferenceOptions = {},
): Interference {
  const frame = frameOf(body)
  const { path } = passes
  const cone = jetCone(jet.kerf, jet.taper)
  const owners = movesByEdge(path, frame.count)
  const tally = new Tally(frame.count)
  for (const [top, bottom] of bandsOf(body)) {
    const scene = { cone, path, band: wallBand(frame, top, bottom) }
    if (options.only) lookAtSome(scene, owners, options.only, tally)
    else lookAtAll(scene, owners, tally)
  }
  const bites = [...tally.worst.values()].sort((a, b) => b.bite - a.bite || a.edge - b.edge || a.hit - b.hit)
  return {
    bites: bites.slice(0, options.most ?? MOST_BITES),
    pairs: bites.length,
    undecided: tally.undecided.size,
    rims: options.head ? rimsOf(passes, options.head) : [],
  }
}

/** Depths between which every wall is even, within the sound range. */
function bandsOf(body: Body): (readonly [top: number, bottom: number])[] {
  const range = soundRange(body)
  if (range.empty || !(range.to > range.from)) return []
  const inner = levelsOf(body).filter((depth) => depth > range.from && depth < range.to)
  const levels = [range.from, ...inner, range.to]
  return levels.slice(1).map((bottom, i) => [levels[i]!, bottom])
}

/** The worst bite of each pair of cutting and bitten edge. */
class Tally {
  readonly worst = new Map<number, JetBite>()
  readonly undecided = new Set<number>()

  constructor(private readonly edges: number) {}

  /** Looks for a deeper bite of move i, which belongs to edge g, in wall f. */
  look(scene: Scene, i: number, g: number, f: number): void {
    if (isClear(scene, i, f)) return
    const pair = g * this.edges + f
    const before = this.worst.get(pair)
    const result = deepestBite(scene, i, f, before ? before.bite : BITE_TOLERANCE)
    if (result === 'none') return
    if (result === 'undecided') {
      this.undecided.add(pair)
      return
    }
    const { table } = scene.band.frame
    const middle = (scene.band.top + scene.band.bottom) / 2
    const hitFacet = facetIndexAt(table.walls[table.rowOfEdge[f]!]!, middle)
    const { x, y, depth, bite } = result
    this.worst.set(pair, { station: i, edge: g, hit: f, hitFacet, x, y, depth, bite })
  }
}

/** Every edge against itself and its neighbours, which it always touches, then the pairs that a tree of boxes leaves. */
function lookAtAll(scene: Scene, owners: MovesByEdge, tally: Tally): void {
  const { cone, path, band } = scene
  const { frame } = band
  const { previous, next } = frame
  const ground = groundOf(cone, path, owners, band)
  for (let g = 0; g < frame.count; g++) {
    const before = previous[g]!
    const after = next[g]!
    // Beside a convex corner the neighbour lies behind the plane that the edge's own jets keep outside of.
    const isLine = isPlane(band, g)
    const beforeBehind = isLine && liesBehind(band, before, g)
    const afterBehind = isLine && liesBehind(band, after, g)
    for (let k = owners.first[g]!; k < owners.first[g + 1]!; k++) {
      const i = owners.moves[k]!
      const outside = outsideWall(scene, i, g)
      if (!outside) tally.look(scene, i, g, g)
      if (!(outside && beforeBehind)) tally.look(scene, i, g, before)
      if (!(outside && afterBehind) && after !== before) tally.look(scene, i, g, after)
    }
  }
  const pair = (g: number, f: number) => {
    if (!mayMeet(ground, g, f)) return
    for (let k = owners.first[g]!; k < owners.first[g + 1]!; k++) {
      const i = owners.moves[k]!
      if (moveMayMeet(ground, cone, path, i, band, f)) tally.look(scene, i, g, f)
    }
  }
  visitMeetingPairs(
    ground.tree,
    () => 1,
    (a, b) => {
      if (next[a] === b || next[b] === a) return
      pair(a, b)
      pair(b, a)
    },
  )
}

/** The same for the pairs of a few edges with all others: one row of boxes each, no tree. */
function lookAtSome(scene: Scene, owners: MovesByEdge, only: ReadonlySet<number>, tally: Tally): void {
  const { cone, path, band } = scene
  const ground = groundOf(cone, path, owners, band)
  const pair = (g: number, f: number) => {
    if (!mayMeet(ground, g, f)) return
    for (let k = owners.first[g]!; k < owners.first[g + 1]!; k++) {
      const i = owners.moves[k]!
      if (moveMayMeet(ground, cone, path, i, band, f)) tally.look(scene, i, g, f)
    }
  }
  for (const g of only) {
    for (let f = 0; f < band.frame.count; f++) {
      pair(g, f)
      if (!only.has(f)) pair(f, g)
    }
  }
}
