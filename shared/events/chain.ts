import type { Branch } from '../contours/branch.ts'
import { CornerMode, type Frame } from '../contours/frame.ts'
import { blendsAt, makePlaces, place, radiusAt, sweepAt } from '../contours/places.ts'
import { chordCount } from '../geometry/sample.ts'
import { startAngle } from '../geometry/segment.ts'
import { levelsOf } from '../walls/levels.ts'
import { fillOffsets, makeEdgeEnds } from '../walls/wall-table.ts'

/**
 * The contour as a closed chain of moving pieces: edges, the steps between them, and the chords that stand for an
 * arc that blends. Piece e runs from point e to point next[e]. Within a band (no wall changes tilt) lines move evenly
 * and radii change evenly; points do so too, except where an arc meets a neighbour at an angle (`uneven` points).
 * A line keeps its direction, unless it blends (`rotates`): then only its ends tell where it lies.
 */
export interface Chain {
  readonly frame: Frame
  readonly count: number
  readonly kind: Uint8Array
  /** The edge, or for a step the edge after it. */
  readonly edge: Int32Array
  readonly next: Int32Array
  readonly previous: Int32Array
  /** Unit direction of a line or step that keeps it. */
  readonly ux: Float64Array
  readonly uy: Float64Array
  /** Branch of a point where an arc meets a neighbour at an angle. */
  readonly bent: readonly (Branch | undefined)[]
  /** 1 for points that do not move evenly: bent ones, and those between chords of an arc with a bent end. */
  readonly uneven: Uint8Array
  readonly hasUneven: boolean
  /** Whether any of the latter are there. */
  readonly hasLoose: boolean
  /** 1 for lines that blend and for chords. */
  readonly rotates: Uint8Array
  /** Of a chord: the share of its arc's sweep at which it starts. */
  readonly share: Float64Array
  /** Per edge its first piece that is not a step. */
  readonly firstOf: Int32Array
}

export const PieceKind = { line: 0, arc: 1, step: 2, chord: 3 } as const

/**
 * How far the chords that stand for a blended arc may depart from it at the levels of the body, mm: events there are
 * told as if the arc stood so much further in. Between smooth corners chords move evenly and cost little: a fiftieth of
 * the finest general tolerance of ISO 2768-1 (f: 0.05 mm, from memory). Where a neighbour is met at an angle every
 * pair of chords is searched through time: two fifths of it.
 */
const EVEN_CHORD_TOLERANCE = 1e-3
const UNEVEN_CHORD_TOLERANCE = 0.02

/** Loops are taken in the given order; pieces of one loop follow one another. */
export function chainOf(frame: Frame, loopOrder: readonly number[]): Chain {
  const steps = frame.hasSteps
    ? frame.mode.reduce((sum, mode) => sum + (mode === CornerMode.step ? 1 : 0), 0)
    : 0
  const chords = chordsOf(frame)
  const count = frame.count + steps + (chords ? chords.reduce((sum, n) => sum + Math.max(0, n - 1), 0) : 0)
  const kind = new Uint8Array(count)
  const edge = new Int32Array(count)
  const next = new Int32Array(count)
  const previous = new Int32Array(count)
  const ux = new Float64Array(count)
  const uy = new Float64Array(count)
  const uneven = new Uint8Array(count)
  const rotates = new Uint8Array(count)
  const share = new Float64Array(chords ? count : 0)
  const firstOf = new Int32Array(frame.count)
  const bent: (Branch | undefined)[] = new Array<Branch | undefined>(count).fill(undefined)
  let hasUneven = false
  let hasLoose = false
  let e = 0
  for (const loop of loopOrder) {
    const first = e
    for (let g = frame.loopStart[loop]!; g < frame.loopStart[loop + 1]!; g++) {
      if (frame.mode[g] === CornerMode.step) {
        const size = Math.hypot(frame.mx[g]!, frame.my[g]!)
        kind[e] = PieceKind.step
        edge[e] = g
        ux[e] = frame.mx[g]! / size
        uy[e] = frame.my[g]! / size
        e++
      }
      edge[e] = g
      firstOf[g] = e
      bent[e] = frame.branches.get(g)
      if (bent[e]) hasUneven = true
      uneven[e] = bent[e] ? 1 : 0
      const pieces = chords?.[g] ?? 0
      if (pieces > 0) {
        const loose = isLoose(frame, g)
        for (let i = 0; i < pieces; i++, e++) {
          kind[e] = PieceKind.chord
          edge[e] = g
          rotates[e] = 1
          share[e] = i / pieces
          if (i > 0 && loose) uneven[e] = 1
          hasLoose ||= loose
        }
        continue
      }
      if (frame.arc[g]) {
        kind[e] = PieceKind.arc
      } else {
        ux[e] = frame.ux[g]!
        uy[e] = frame.uy[g]!
        if (chords && blendsAt(frame, g)) rotates[e] = 1
      }
      e++
    }
    for (let i = first; i < e; i++) {
      next[i] = i === e - 1 ? first : i + 1
      previous[i] = i === first ? e - 1 : i - 1
    }
  }
  return {
    frame,
    count,
    kind,
    edge,
    next,
    previous,
    ux,
    uy,
    bent,
    uneven,
    hasUneven,
    hasLoose,
    rotates,
    share,
    firstOf,
  }
}

/** Chords for every arc that blends, 0 for other edges; null when nothing blends. */
function chordsOf(frame: Frame): Int32Array | null {
  const { table, count, body } = frame
  if (!table.blends) return null
  const chords = new Int32Array(count)
  const offsets = makeEdgeEnds(table)
  const places = makePlaces(count)
  for (const depth of levelsOf(body)) {
    fillOffsets(table, depth, offsets)
    place(frame, offsets, places)
    for (let g = 0; g < count; g++) {
      if (!frame.arc[g] || !blendsAt(frame, g)) continue
      const radius = Math.max(
        frame.radius[g]!,
        radiusAt(frame, g, offsets.start[g]!),
        radiusAt(frame, g, offsets.end[g]!),
      )
      const tolerance = isLoose(frame, g) ? UNEVEN_CHORD_TOLERANCE : EVEN_CHORD_TOLERANCE
      const most = chordCount(radius, sweepAt(frame, g, places), tolerance)
      chords[g] = Math.max(chords[g]!, most)
    }
  }
  return chords
}

/** Whether an end of an arc meets its neighbour at an angle, so that its points move along it as well as out. */
function isLoose({ branches, next }: Frame, g: number): boolean {
  return branches.has(g) || branches.has(next[g]!)
}

/** Whether a corner stands at the piece's first point; the points between chords are none. */
export function startsAtCorner({ kind, share }: Chain, e: number): boolean {
  return kind[e] !== PieceKind.chord || share[e] === 0
}

/** The point at which the edge of a piece ends. */
export function cornerAfter({ kind, edge, next, previous, firstOf, frame }: Chain, e: number): number {
  if (kind[e] !== PieceKind.chord) return next[e]!
  const after = firstOf[frame.next[edge[e]!]!]!
  // A step starts where the arc ends.
  return kind[previous[after]!] === PieceKind.step ? previous[after]! : after
}

/** Whether the piece is told by its two ends: a line, a chord, a step. */
export function isStraight({ kind }: Chain, e: number): boolean {
  return kind[e] !== PieceKind.arc
}

/** Centre of a piece that is an arc or a chord of one. */
export function centreOf(chain: Chain, e: number) {
  const segment = chain.frame.segments[chain.edge[e]!]!
  if (segment.kind !== 'arc') throw new Error('a line has no centre')
  return segment.centre
}

/** Heading of the drawing's arc start: where smooth ends stay. */
export function drawnStart(chain: Chain, e: number): number {
  const segment = chain.frame.segments[chain.edge[e]!]!
  return segment.kind === 'arc' ? startAngle(segment) : 0
}
