import { CornerMode, frameWithWalls, type Frame } from '../contours/frame.ts'
import { growEdge } from '../contours/plain-lengths.ts'
import { bandsOf, rerateBands, slideCorner } from '../contours/slides.ts'
import { isPlain } from '../events/plain.ts'
import { PlainSearch } from '../events/plain-search.ts'
import { rangeOfEvent } from '../events/range.ts'
import { strictestLimit, type FacetDegrees } from '../findings/place.ts'
import { blocksOf } from '../geometry/blocks.ts'
import { areaRates, plainVolume, refreshAreaRates, type AreaRates } from '../solid/plain-volume.ts'
import { sameOffsets, tableOf, type WallTable } from '../walls/wall-table.ts'
import { limitsOf, type Columns } from './columns.ts'
import { cornerRules, fillCorner } from './corner-columns.ts'
import { prepFigures, soundLengths, type PrepFigures } from './edge-columns.ts'
import { PrepBook, type Prep } from './preps.ts'
import { lazyBody, type ReadRequest } from './read.ts'
import type { EvaluationRequest } from './schema.ts'
import { needBlocks, neededTilt, refreshCornerNeed, refreshEdgeNeed, type NeedBlocks } from './steepest.ts'

/** Preps that no edge has any more are kept; after so many new ones the set-up is read anew. */
const MOST_NEW_PREPS = 500

/**
 * Edits the columns of a plain set-up in place. One wall touches its edge, the corners at both ends and the edges
 * beyond them; everything else keeps its figures to the last bit. Answers null, without having changed anything, where
 * an edit would change more than that: other levels, a step, a blend.
 */
export class PlainEditor {
  #columns: Columns
  readonly #book: PrepBook
  readonly #figures: PrepFigures[]
  readonly #search: PlainSearch
  readonly #most: number
  /** Summed and searched by blocks, so that an edit costs the blocks that it touches. */
  readonly #rates: readonly AreaRates[]
  readonly #needs: NeedBlocks

  /** Null where the set-up is not of the kind. */
  static of(columns: Columns): PlainEditor | null {
    const { read, range } = columns
    return isPlain(read.frame) && read.body.datum === 'top' && range ? new PlainEditor(columns) : null
  }

  private constructor(columns: Columns) {
    const { read, edges, corners } = columns
    this.#columns = columns
    this.#book = new PrepBook(read.body.thickness)
    for (const { facets } of read.preps.list) this.#book.place(facets)
    this.#figures = [...edges.preps]
    this.#search = new PlainSearch(read.frame)
    this.#most = this.#book.list.length + MOST_NEW_PREPS
    this.#rates = areaRates(read.frame, edges.lengths)
    this.#needs = needBlocks(read, edges, corners)
  }

  /** `edge` in the caller's numbering through all loops. */
  edit(edge: number, facets: readonly FacetDegrees[], request: EvaluationRequest): Columns | null {
    const { read } = this.#columns
    const { numbering, preps, frame } = read
    const place = this.#book.place(facets)
    const before = preps.ofEdge[edge]!
    if (place > this.#most) return null
    if (!sameDepths(this.#book.list[before]!, this.#book.list[place]!)) return null
    const g = numbering.edge ? numbering.edge[edge]! : edge
    const set = (prep: number) => (preps.ofEdge[edge] = frame.table.rowOfEdge[g] = prep)
    set(place)
    const { list } = this.#book
    const { rowOfEdge } = frame.table
    const table =
      place < frame.table.walls.length
        ? frame.table
        : tableOf(
            list.map(({ wall }) => wall),
            rowOfEdge,
            read.body,
          )
    if (table.blends || [g, frame.next[g]!].some((corner) => leavesStep(frame, table, corner))) {
      set(before)
      return null
    }
    const body = lazyBody(frame.outline, table, { thickness: read.body.thickness, datum: read.body.datum })
    const rewalled = frameWithWalls(frame, body, table)
    const edited = { ...read, request, body, frame: rewalled, preps: { ...preps, list } }
    return (this.#columns = this.#rework(edited, edge, g))
  }

  /** Everything that the wall of edge g (the caller's `edge`) touches, in place. */
  #rework(edited: ReadRequest, edge: number, g: number): Columns {
    const { frame, request, preps, numbering, area } = edited
    const { edges, corners } = this.#columns
    const bands = rerateBands(frame, bandsOf(this.#columns.read.frame))
    const [previous, next] = [frame.previous[g]!, frame.next[g]!]
    bands.forEach(({ from, to, rate, slides }, i) => {
      for (const corner of [g, next]) slideCorner(frame, corner, rate, slides)
      const [above, below] = [edges.lengths[i]!, edges.lengths[i + 1]!]
      for (const own of [previous, g, next]) growEdge(frame, own, above, slides, to - from, below)
    })
    refreshAreaRates(frame, edges.lengths, [previous, g, next], this.#rates)
    const event = this.#search.edit(frame, g)
    const read = { ...edited, event }
    const limits = limitsOf(request)
    const taper = request.jet?.taper ?? 0
    for (let prep = this.#figures.length; prep < preps.list.length; prep++)
      this.#figures.push(prepFigures(preps.list[prep]!, request.plate.thickness, taper, limits))
    const rules = cornerRules(read, limits && strictestLimit(limits))
    for (const corner of [g, next]) fillCorner(frame, corner, rules, corners)
    const range = rangeOfEvent(read.body, event)
    const lengths = soundLengths(read, range, edges.lengths)
    const edgesNow = { ...lengths, preps: this.#figures }
    const callers = [g, next].map((corner) => (numbering.corner ? numbering.corner[corner]! : corner))
    for (const block of blocksOf([edge])) refreshEdgeNeed(read, edgesNow, block, this.#needs)
    for (const block of blocksOf(callers)) refreshCornerNeed(read, corners, block, this.#needs)
    return {
      read,
      range,
      edges: edgesNow,
      corners,
      volume: event ? null : plainVolume(frame, area, this.#rates),
      neededTilt: neededTilt(read, edgesNow, corners, this.#needs),
    }
  }
}

/** Neighbours in line whose walls would no longer stand at one offset. */
function leavesStep(frame: Frame, table: WallTable, corner: number): boolean {
  if (frame.mode[corner] !== CornerMode.smooth) return false
  const { rowOfEdge } = table
  return !sameOffsets(table, rowOfEdge[frame.previous[corner]!]!, rowOfEdge[corner]!)
}

/** Then the levels stay as they are. */
function sameDepths({ wall: a }: Prep, { wall: b }: Prep): boolean {
  return a.facets.length === b.facets.length && a.facets.every(({ depth }, i) => depth === b.facets[i]!.depth)
}
