import { CornerMode, frameOf, type Frame } from '../contours/frame.ts'
import { soundRange } from '../events/range.ts'
import { visitMeetingPairs } from '../geometry/boxes.ts'
import { MoveKind, type Jet, type Passes } from '../passes/types.ts'
import { levelsOf } from '../walls/levels.ts'
import type { Body } from '../walls/types.ts'
import { blends, facetIndexAt } from '../walls/wall.ts'
import { isClear, liesBehind, outsideWall, type Scene } from './clear.ts'
import { deepestBite, type Deepest } from './deepest.ts'
import { groundOf, mayMeet, moveMayMeet, movesByEdge, type MovesByEdge } from './ground.ts'
import { jetCone } from './jet-cone.ts'
import { rimsOf } from './rims.ts'
import { BITE_TOLERANCE, GRAZE, type HeadShape, type Interference, type JetBite } from './types.ts'
import { isPlane, radiusOf, wallBand } from './wall-band.ts'

export interface InterferenceOptions {
  /** The nozzle and head over the plate; left out, the jet alone is looked at. */
  readonly head?: HeadShape | undefined
  /** Look only at pairs in which one of these edges cuts or is cut (numbered through all loops). */
  readonly only?: ReadonlySet<number> | undefined
  /**
   * The passes are those of `passesOf`, which tells of bent seams and steps itself and keeps to smooth walls: there the
   * two walls are not looked at against each other's jets.
   */
  readonly seamsTold?: boolean | undefined
  /** Looks that all searches together may take; more settle more places, and take longer. */
  readonly looks?: number | undefined
  /** Most bites that are told in full. */
  readonly most?: number | undefined
}

/**
 * Looks that all searches together may take: a tenth of a second. What is left then is told as undecided, so that a
 * person who types never waits for a hopeless place.
 */
const LOOKS_IN_ALL = 8_000

/** One search may take the share of one in so many. */
const SEARCHES = 12

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
  const looks = options.looks ?? LOOKS_IN_ALL
  const budget = { left: looks, each: looks / SEARCHES }
  for (const [top, bottom] of bandsOf(body)) {
    const scene = { cone, path, band: wallBand(frame, top, bottom), budget }
    if (options.only) lookAtSome(scene, owners, options.only, tally)
    else lookAtAll(scene, owners, tally, options.seamsTold ?? false)
  }
  const bites = [...tally.worst.values()].sort((a, b) => b.bite - a.bite || a.edge - b.edge || a.hit - b.hit)
  return {
    bites: bites.slice(0, options.most ?? MOST_BITES),
    pairs: bites.length,
    undecided: tally.undecided.size,
    grazing: tally.grazing.size,
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
  readonly grazing = new Set<number>()

  constructor(private readonly edges: number) {}

  /** Looks for a deeper bite of move i, which belongs to edge g, in wall f. */
  look(scene: Scene, i: number, g: number, f: number): void {
    if (isClear(scene, i, f)) return
    const pair = g * this.edges + f
    const before = this.worst.get(pair)
    const result = deepestBite(scene, i, f, before ? before.bite : BITE_TOLERANCE)
    if (result === 'none') return
    if (result === 'undecided') {
      const worse = before && before.bite > GRAZE ? 'none' : deepestBite(scene, i, f, GRAZE)
      if (worse === 'undecided') this.undecided.add(pair)
      else if (worse === 'none') this.grazing.add(pair)
      else this.keep(scene, i, g, f, worse)
      return
    }
    this.keep(scene, i, g, f, result)
  }

  private keep(scene: Scene, i: number, g: number, f: number, deepest: Deepest): void {
    const { table } = scene.band.frame
    const middle = (scene.band.top + scene.band.bottom) / 2
    const hitFacet = facetIndexAt(table.walls[table.rowOfEdge[f]!]!, middle)
    const { x, y, depth, bite } = deepest
    this.worst.set(g * this.edges + f, { station: i, edge: g, hit: f, hitFacet, x, y, depth, bite })
  }
}

/** Every edge against itself and its neighbours, which it always touches, then the pairs that a tree of boxes leaves. */
function lookAtAll(scene: Scene, owners: MovesByEdge, tally: Tally, seamsTold: boolean): void {
  const { cone, path, band } = scene
  const { frame } = band
  const { previous, next } = frame
  const ground = groundOf(cone, path, owners, band)
  const spiral = spiralsOf(frame)
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
      const onWall = seamsTold && (path.move[i] === MoveKind.cut || path.move[i] === MoveKind.lean)
      // What the jet takes or leaves beside a bent seam or a step is told of that corner, and the walls of a spiral are
      // followed by round jets only nearly: none of it is another wall.
      const bentStart = onWall && (told(scene, g) || spiral[g] === 1 || spiral[before] === 1)
      const bentEnd = onWall && (told(scene, after) || spiral[g] === 1 || spiral[after] === 1)
      const smoothStart = onWall && runsOn(scene, before, g)
      const smoothEnd = onWall && runsOn(scene, g, after)
      if (!outside && !(bentStart || bentEnd)) tally.look(scene, i, g, g)
      if (!(outside && beforeBehind) && !bentStart && !smoothStart) tally.look(scene, i, g, before)
      if (!(outside && afterBehind) && !bentEnd && !smoothEnd && after !== before)
        tally.look(scene, i, g, after)
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

/** Whether the corner where edge g starts has a curved seam (an arc at an angle) or none (a step between smooth walls). */
function told({ band: { frame } }: Scene, g: number): boolean {
  return frame.mode[g] === CornerMode.branch || frame.mode[g] === CornerMode.step
}

/**
 * Whether two walls run smoothly into each other in such a way that neither's jet can reach the other (derived): the
 * jet of one stands r off the common tangent, and its distance from the other grows along it, where that is a line, or
 * an arc of a quarter turn at most that bends away or is no narrower than the jet.
 */
function runsOn({ cone, band }: Scene, before: number, after: number): boolean {
  const { frame } = band
  if (frame.mode[after] !== CornerMode.smooth) return false
  // A jet's flat section is up to twice its half-width long at 60°.
  const widest = 2 * cone.radius
  return [before, after].every(
    (f) =>
      !frame.arc[f] ||
      (Math.abs(frame.sweep[f]!) <= Math.PI / 2 &&
        (frame.sweep[f]! > 0 || Math.min(radiusOf(band, f, 0), radiusOf(band, f, 1)) >= widest)),
  )
}

/** 1 for every arc whose wall blends: its outline is a spiral. */
function spiralsOf({ arc, count, table }: Frame): Uint8Array {
  const blending = table.walls.map(blends)
  const out = new Uint8Array(count)
  if (blending.includes(true)) {
    for (let g = 0; g < count; g++) out[g] = arc[g] && blending[table.rowOfEdge[g]!] ? 1 : 0
  }
  return out
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
