import { frameFrom, type Frame } from '../contours/frame.ts'
import { edgeProblems, shapeProblems, type ProfileProblem } from '../geometry/problems.ts'
import { loopsOf, readOutline, type Outline, type ReadOutline } from '../geometry/outline.ts'
import type { Loop } from '../geometry/types.ts'
import { surveyOf } from '../events/survey.ts'
import type { BodyEvent } from '../events/types.ts'
import { edgeName } from '../walls/names.ts'
import type { Body, EdgeRef, Wall } from '../walls/types.ts'
import { blends, reversedWall } from '../walls/wall.ts'
import { tableOf, type WallTable } from '../walls/wall-table.ts'
import { EvaluationError, type EvaluationErrorCode } from './error.ts'
import { numberingOf, type Numbering } from './numbering.ts'
import { readPreps, type Preps } from './preps.ts'
import type { EvaluationRequest } from './schema.ts'

/**
 * A request made sound, in columns. The body runs each loop with the material on its left; where the caller's loop ran
 * the other way the numbering tells which edge and corner is which.
 */
export interface ReadRequest {
  readonly request: EvaluationRequest
  /** Its loops and walls become objects only when someone asks for them. */
  readonly body: Body
  readonly frame: Frame
  readonly numbering: Numbering
  /** The caller's preps, the caller's numbering. */
  readonly preps: Preps
  /** Of the drawing, holes taken off, mm². */
  readonly area: number
  /** What is wrong with the profile but can still be shown: crossings and stray loops, the caller's numbering. */
  readonly problems: readonly ProfileProblem[]
  /** The first event; null too where the profile has problems. */
  readonly event: BodyEvent | null
}

/** Throws `EvaluationError`. */
export function readRequest(request: EvaluationRequest): ReadRequest {
  const { thickness } = request.plate
  const read = readOutline(request.loops)
  const { outline } = read
  const numbering = numberingOf(outline, read.reversed)
  const preps = readPreps(request.walls, outline.loopStart, thickness)
  const datum = request.datum ?? 'top'
  const table = bodyTable(preps, outline, numbering, { thickness, datum })
  const body = lazyBody(outline, table, { thickness, datum })
  refuse(edgeProblems(outline), numbering)
  const frame = frameFrom(body, outline, table)
  const { problems, event } = surveyed(read, frame, numbering)
  const area = read.areas.reduce((sum, own) => sum + own, 0)
  return { request, body, frame, numbering, preps, area, problems, event }
}

function surveyed(
  { outline, areas }: ReadOutline,
  frame: Frame,
  numbering: Numbering,
): Pick<ReadRequest, 'problems' | 'event'> {
  const { meetings, event } = surveyOf(frame)
  const found = shapeProblems(outline, areas, frame.near, meetings)
  refuse(found, numbering)
  const problems = found.map((problem) => renumbered(problem, numbering))
  return { problems, event: problems.length === 0 ? event : null }
}

/** Rows of the body's table are the preps; walls that blend need another row in loops that are turned round. */
function bodyTable(
  { list, ofEdge }: Preps,
  outline: Outline,
  numbering: Numbering,
  plate: Pick<Body, 'thickness' | 'datum'>,
): WallTable {
  const walls: Wall[] = list.map(({ wall }) => wall)
  const { edge: callersEdge, reversed } = numbering
  if (!callersEdge) return tableOf(walls, ofEdge, plate)
  const rowOfEdge = Int32Array.from(callersEdge, (caller) => ofEdge[caller]!)
  const turned = new Map<number, number>()
  for (let l = 0; l < reversed.length; l++) {
    if (!reversed[l]) continue
    for (let g = outline.loopStart[l]!; g < outline.loopStart[l + 1]!; g++) {
      const prep = rowOfEdge[g]!
      if (!blends(list[prep]!.wall)) continue
      const row = turned.get(prep) ?? walls.push(reversedWall(list[prep]!.wall)) - 1
      turned.set(prep, row)
      rowOfEdge[g] = row
    }
  }
  return tableOf(walls, rowOfEdge, plate)
}

/** A body whose loops and walls become objects when first asked for. */
export function lazyBody(
  outline: Outline,
  { walls: rows, rowOfEdge }: WallTable,
  plate: Pick<Body, 'thickness' | 'datum'>,
): Body {
  let loops: readonly Loop[] | null = null
  let walls: readonly (readonly Wall[])[] | null = null
  const { loopStart } = outline
  return {
    ...plate,
    get loops() {
      return (loops ??= loopsOf(outline))
    },
    get walls() {
      return (walls ??= Array.from({ length: loopStart.length - 1 }, (_, l) =>
        Array.from(rowOfEdge.subarray(loopStart[l]!, loopStart[l + 1]!), (row) => rows[row]!),
      ))
    },
  }
}

function renumbered(problem: ProfileProblem, numbering: Numbering): ProfileProblem {
  const named = (ref: { loop: number; edge: number | null }) =>
    ref.edge === null ? ref : numbering.edgeRef(ref as EdgeRef)
  return { ...problem, ...named(problem), other: problem.other && named(problem.other) }
}

/** Profiles that have no meaning at all are errors; those that merely cross are findings. */
function refuse(problems: readonly ProfileProblem[], numbering: Numbering): void {
  for (const problem of problems) refuseOne(renumbered(problem, numbering))
}

function refuseOne(problem: ProfileProblem): void {
  const { loop, edge } = problem
  const place = { loop, edge: edge ?? undefined }
  const name = edge === null ? `loop ${loop}` : `edge ${edgeName({ loop, edge })}`
  const fail = (code: EvaluationErrorCode, message: string) => {
    throw new EvaluationError(code, message, place)
  }
  switch (problem.code) {
    case 'zero-edge':
      return fail('edge-of-no-length', `The ${name} has no length. Remove the repeated vertex.`)
    case 'too-few-edges':
    case 'no-area':
      return fail(
        'loop-of-no-area',
        `Loop ${loop} encloses no area. Draw it with at least two vertices and an arc, or three.`,
      )
    case 'not-finite':
      return fail('not-finite', `The ${name} has a coordinate that is no finite number. Correct it.`)
    case 'open':
    case 'wrong-orientation':
      throw new Error(`a loop of vertices cannot be ${problem.code} once it is put right`)
    case 'crosses-itself':
    case 'loops-cross':
    case 'hole-outside':
    case 'hole-in-hole':
      return
  }
}
