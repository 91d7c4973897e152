import { chordCount } from '../geometry/sample.ts'
import type { Point } from '../geometry/types.ts'
import { CornerMode, type Frame } from '../contours/frame.ts'
import { blendsAt, makePlaces, place, radiusAt, sweepAt, type Places } from '../contours/places.ts'
import { levelsOf } from '../walls/levels.ts'
import { fillOffsets, makeEdgeEnds, type EdgeEnds } from '../walls/wall-table.ts'

/** The contour placed at one depth of the mesh. */
export interface MeshLevel {
  readonly depth: number
  /** Whether the set-up has it (a facet may end here), or it only follows a curved seam or a step that turns. */
  readonly given: boolean
  readonly offsets: EdgeEnds
  readonly places: Places
  /** Per edge, of arcs. */
  readonly sweep: Float64Array
}

/** Per edge its points at one level, both ends included. */
export type LevelRuns = readonly (readonly Point[])[]

/** Halvings of a band at most, to follow a curved seam. */
const MOST_HALVINGS = 4

/**
 * Depths from which the mesh is built: those of the set-up within the range; where a step changes sides within
 * a band, the depth where it does; and where seams are curved (an arc meeting a neighbour at an angle), halves
 * of the bands until a seam departs from its chords by no more than the tolerance.
 */
export function meshLevels(frame: Frame, from: number, to: number, chordTolerance: number): MeshLevel[] {
  const given = [from, ...levelsOf(frame.body).filter((d) => d > from && d < to), to]
  const out: MeshLevel[] = []
  for (const [i, depth] of given.entries()) {
    const level = levelAt(frame, depth, true)
    const above = out.at(-1)
    if (i > 0 && above) {
      let top = above
      for (const turn of stepTurns(frame, above, level)) {
        const between = levelAt(frame, turn, false)
        out.push(...follow(frame, top, between, chordTolerance, MOST_HALVINGS), between)
        top = between
      }
      out.push(...follow(frame, top, level, chordTolerance, MOST_HALVINGS))
    }
    out.push(level)
  }
  return out
}

/**
 * Chords that stand for each edge, the same at every level: of an arc by its sagitta, of a wall that blends also by its
 * twist. A quad between two levels is a piece of a bilinear surface; cut into two triangles it departs from it by a
 * quarter of its twist (top chord less bottom chord) at most, and n chords share the twist between them (derived).
 */
export function chordsPerEdge(
  frame: Frame,
  levels: readonly MeshLevel[],
  chordTolerance: number,
): Int32Array {
  const count = new Int32Array(frame.count).fill(1)
  for (let g = 0; g < frame.count; g++) {
    const blends = blendsAt(frame, g)
    if (frame.arc[g]) {
      for (const { offsets, sweep } of levels) {
        for (const offset of blends ? [offsets.start[g]!, offsets.end[g]!] : [offsets.start[g]!]) {
          const radius = Math.max(0, radiusAt(frame, g, offset))
          count[g] = Math.max(count[g]!, chordCount(radius, sweep[g]!, chordTolerance))
        }
      }
    }
    if (blends) count[g] = Math.max(count[g]!, Math.ceil(twistOf(levels, g) / (4 * chordTolerance)))
  }
  return count
}

/** The largest change of an edge's run from corner to corner between two neighbouring levels, mm. */
function twistOf(levels: readonly MeshLevel[], g: number): number {
  let most = 0
  for (let i = 1; i < levels.length; i++) {
    const [above, below] = [levels[i - 1]!.places, levels[i]!.places]
    const x = below.ex[g]! - below.sx[g]! - (above.ex[g]! - above.sx[g]!)
    const y = below.ey[g]! - below.sy[g]! - (above.ey[g]! - above.sy[g]!)
    most = Math.max(most, Math.hypot(x, y))
  }
  return most
}

function levelAt(frame: Frame, depth: number, given: boolean): MeshLevel {
  const offsets = makeEdgeEnds(frame.table)
  const places = makePlaces(frame.count)
  fillOffsets(frame.table, depth, offsets)
  place(frame, offsets, places)
  const sweep = Float64Array.from(frame.segments, (_, g) => sweepAt(frame, g, places))
  return { depth, given, offsets, places, sweep }
}

/** Depths strictly between two levels at which the two sides of a step pass each other, rising. */
function stepTurns(frame: Frame, above: MeshLevel, below: MeshLevel): number[] {
  const turns = new Set<number>()
  for (let g = 0; g < frame.count; g++) {
    if (frame.mode[g] !== CornerMode.step) continue
    const p = frame.previous[g]!
    const a = above.offsets.start[g]! - above.offsets.end[p]!
    const b = below.offsets.start[g]! - below.offsets.end[p]!
    if (a * b < 0) turns.add(above.depth + (a / (a - b)) * (below.depth - above.depth))
  }
  return [...turns].filter((d) => d > above.depth && d < below.depth).sort((a, b) => a - b)
}

/** Levels to put between two so that curved seams are followed. */
function follow(
  frame: Frame,
  above: MeshLevel,
  below: MeshLevel,
  tolerance: number,
  halvings: number,
): MeshLevel[] {
  if (frame.branches.size === 0 || halvings === 0) return []
  const middle = levelAt(frame, (above.depth + below.depth) / 2, false)
  let departs = 0
  for (const g of frame.branches.keys()) {
    const x = (above.places.sx[g]! + below.places.sx[g]!) / 2 - middle.places.sx[g]!
    const y = (above.places.sy[g]! + below.places.sy[g]!) / 2 - middle.places.sy[g]!
    departs = Math.max(departs, Math.hypot(x, y))
  }
  if (departs <= tolerance) return []
  return [
    ...follow(frame, above, middle, tolerance, halvings - 1),
    middle,
    ...follow(frame, middle, below, tolerance, halvings - 1),
  ]
}
