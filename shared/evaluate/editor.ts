import type { EdgeRef } from '../walls/types.ts'
import type { FacetSpec, WallSpec } from '../walls/schema.ts'
import { columnsOf, type Columns } from './columns.ts'
import { soundFacets } from './preps.ts'
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
  /** Place in the request's walls by edge through all loops, −1 for edges that no wall is given for. */
  readonly #wallOf: Int32Array
  readonly #loopStart: Int32Array

  constructor(request: EvaluationRequest) {
    const columns = columnsOf(readRequest(request))
    const { loopStart, count } = columns.read.frame
    this.request = request
    this.#loopStart = loopStart
    this.#wallOf = new Int32Array(count).fill(-1)
    request.walls.forEach(({ loop, edge }, i) => (this.#wallOf[loopStart[loop]! + edge] = i))
    this.#plain = PlainEditor.of(columns)
    this.evaluation = this.#answer(columns)
  }

  setWall(ref: EdgeRef, facets: readonly FacetSpec[]): Evaluation {
    const wall: WallSpec = { loop: ref.loop, edge: ref.edge, facets: [...facets] }
    const edge = (this.#loopStart[ref.loop] ?? NaN) + ref.edge
    const request = this.#withWall(edge, wall)
    const patched = this.#wallOf[edge] === undefined ? null : this.#patched(edge, wall, request)
    const columns = patched ?? columnsOf(readRequest(request))
    // From here nothing fails any more.
    this.request = request
    if (this.#wallOf[edge] === -1) this.#wallOf[edge] = request.walls.length - 1
    if (!patched) this.#plain = PlainEditor.of(columns)
    return (this.evaluation = this.#answer(columns))
  }

  #patched(edge: number, wall: WallSpec, request: EvaluationRequest): Columns | null {
    return this.#plain && this.#plain.edit(edge, soundFacets(wall, request.plate.thickness), request)
  }

  #withWall(edge: number, wall: WallSpec): EvaluationRequest {
    const walls = this.request.walls.slice()
    const at = this.#wallOf[edge] ?? -1
    if (at < 0) walls.push(wall)
    else walls[at] = wall
    return { ...this.request, walls }
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
