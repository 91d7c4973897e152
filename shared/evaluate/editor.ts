import type { EdgeRef } from '../walls/types.ts'
import type { FacetSpec, WallSpec } from '../walls/schema.ts'
import { columnsOf, type Columns } from './columns.ts'
import { edgeNamed, soundFacets } from './preps.ts'
import { readRequest } from './read.ts'
import { PlainEditor } from './plain-editor.ts'
import type { Evaluation, EvaluationRequest } from './schema.ts'
import { evaluationOf } from './views.ts'

/**
 * A set-up under somebody's hands. Each edit of one wall answers exactly what a fresh `evaluate` of the edited request
 * would; on plates of straight edges only what the wall touches is worked out again.
 */
export interface Editor {
  readonly request: EvaluationRequest
  readonly evaluation: Evaluation
  /** Gives one edge other facets. Throws `EvaluationError`, and then nothing has changed. */
  setWall(edge: EdgeRef, facets: readonly FacetSpec[]): Evaluation
}

/** Throws `EvaluationError`. */
export function openEditor(request: EvaluationRequest): Editor {
  return new SetupEditor(request)
}

class SetupEditor implements Editor {
  request: EvaluationRequest
  evaluation: Evaluation
  /** Null where edits of this set-up are worked out from the start. */
  #plain: PlainEditor | null
  readonly #walls: WallLog
  readonly #loopStart: Int32Array

  constructor(request: EvaluationRequest) {
    const columns = columnsOf(readRequest(request))
    this.request = request
    this.#loopStart = columns.read.frame.loopStart
    this.#walls = new WallLog(request.walls, this.#loopStart)
    this.#plain = PlainEditor.of(columns)
    this.evaluation = this.#answer(columns)
  }

  setWall(ref: EdgeRef, facets: readonly FacetSpec[]): Evaluation {
    const wall: WallSpec = { loop: ref.loop, edge: ref.edge, facets: [...facets] }
    const { thickness } = this.request.plate
    const sound = soundFacets(wall, thickness)
    const edge = edgeNamed(wall, this.#loopStart)
    // From here nothing fails any more.
    const walls = this.#walls.set(edge, wall)
    let made: WallSpec[] | null = null
    const request = {
      ...this.#plateAlone(),
      get walls() {
        return (made ??= walls())
      },
    }
    this.request = request
    let columns = this.#plain && this.#plain.edit(edge, sound, request)
    if (!columns) {
      columns = columnsOf(readRequest(request))
      this.#plain = PlainEditor.of(columns)
    }
    return (this.evaluation = this.#answer(columns))
  }

  #plateAlone(): Omit<EvaluationRequest, 'walls'> {
    const { plate, loops, datum, jet, head, passes } = this.request
    return { plate, loops, datum, jet, head, passes }
  }

  /** Columns are edited in place: an answer that is read only after a later edit is worked out anew. */
  #answer(columns: Columns): Evaluation {
    const { request } = this
    let late: Columns | null = null
    return evaluationOf(columns, () =>
      this.request === request ? columns : (late ??= columnsOf(readRequest(request))),
    )
  }
}

/** The walls of a set-up and what has been set since: a list of them is made only for those who ask for one. */
class WallLog {
  readonly #first: readonly WallSpec[]
  readonly #set: { readonly at: number; readonly wall: WallSpec }[] = []
  /** Place in the list by edge through all loops, −1 for edges that no wall is given for. */
  readonly #placeOf: Int32Array
  #length: number

  constructor(walls: readonly WallSpec[], loopStart: Int32Array) {
    this.#first = walls
    this.#length = walls.length
    this.#placeOf = new Int32Array(loopStart.at(-1)!).fill(-1)
    walls.forEach(({ loop, edge }, i) => (this.#placeOf[loopStart[loop]! + edge] = i))
  }

  /** Answers the list as it stands now, for whenever it is wanted. */
  set(edge: number, wall: WallSpec): () => WallSpec[] {
    if (this.#placeOf[edge] === -1) this.#placeOf[edge] = this.#length++
    const count = this.#set.push({ at: this.#placeOf[edge]!, wall })
    return () => {
      const walls = [...this.#first]
      for (let i = 0; i < count; i++) walls[this.#set[i]!.at] = this.#set[i]!.wall
      return walls
    }
  }
}
