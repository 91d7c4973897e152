import { meshOf } from '../solid/mesh.ts'
import type { Body } from '../walls/types.ts'
import type { BodyMesh } from '../solid/types.ts'
import { columnsOf, type Columns } from './columns.ts'
import { jetWayOf, type JetWay } from './jet-way.ts'
import { readRequest, type ReadRequest } from './read.ts'
import type { Evaluation, EvaluationRequest } from './schema.ts'
import { evaluationOf } from './views.ts'

/**
 * The front door: a set-up in, everything known about it out. Pure; the browser's worker and the server run
 * the same. Throws `EvaluationError` when the request has no sound meaning. All numbering in the answer is the
 * caller's, also where a loop came in the other way round: edge i is still the edge from the caller's vertex i
 * to its vertex i + 1. Only the vertices of `contours` always run with the material on their left.
 *
 * Read, compiled into a frame, searched for events, worked out in columns; objects and texts are made when read.
 */
export function evaluate(request: EvaluationRequest): Evaluation {
  return evaluationOf(columnsOf(readRequest(request)))
}

/** Everything that an evaluation can be asked for, worked out but not put into objects and texts. */
export interface WorkedOut {
  readonly columns: Columns
  /** Null where there is nothing sound to cut. */
  readonly way: JetWay | null
}

/** The same as `evaluate`, all of it at once: for whoever wants the figures and not their form. Throws `EvaluationError`. */
export function workOut(request: EvaluationRequest): WorkedOut {
  const read = readRequest(request)
  return { columns: columnsOf(read), way: jetWayOf(read) }
}

/** Both at once, for a screen that needs both: the request is read and its first event looked for once. */
export function evaluateWithMesh(
  request: EvaluationRequest,
  chordTolerance = CHORD_TOLERANCE,
): { readonly evaluation: Evaluation; readonly mesh: BodyMesh } {
  const read = readRequest(request)
  return { evaluation: evaluationOf(columnsOf(read)), mesh: callersMesh(read, chordTolerance) }
}

/** The solid alone, in its own numbering (loops put the right way round). Throws `EvaluationError`. */
export function bodyOf(request: EvaluationRequest): Body {
  return readRequest(request).body
}

/** How far chords may stand off arcs in a picture, mm: a fifth of a pixel when a metre fills a screen. */
const CHORD_TOLERANCE = 0.1

/**
 * The mesh of the solid, faces and lines in the caller's numbering; without a triangle when no depth is sound.
 * `chordTolerance`: how far chords may stand off arcs, mm. Throws `EvaluationError`.
 */
export function evaluatedMesh(request: EvaluationRequest, chordTolerance = CHORD_TOLERANCE): BodyMesh {
  return callersMesh(readRequest(request), chordTolerance)
}

function callersMesh(read: ReadRequest, chordTolerance: number): BodyMesh {
  const mesh = read.problems.length === 0 ? meshOf(read.body, chordTolerance) : null
  if (!mesh) return noMesh()
  return read.numbering.edge ? inCallersNumbering(mesh, read) : mesh
}

/** A fresh one each time: its buffers may be handed over to another thread. */
function noMesh(): BodyMesh {
  return {
    positions: new Float64Array(),
    normals: new Float64Array(),
    indices: new Uint32Array(),
    faceOfTriangle: new Uint32Array(),
    faces: [],
    lines: [],
    depth: 0,
  }
}

function inCallersNumbering(mesh: BodyMesh, { numbering }: ReadRequest): BodyMesh {
  const edgeOf = (loop: number, edge: number) => numbering.edgeRef({ loop, edge }).edge
  const vertexOf = (loop: number, vertex: number) => numbering.cornerRef({ loop, vertex }).vertex
  return {
    ...mesh,
    faces: mesh.faces.map((face) =>
      face.kind === 'wall'
        ? { ...face, edge: edgeOf(face.loop, face.edge) }
        : face.kind === 'step'
          ? { ...face, vertex: vertexOf(face.loop, face.vertex) }
          : face,
    ),
    lines: mesh.lines.map((line) => ({
      ...line,
      edge: line.edge === null ? null : edgeOf(line.loop, line.edge),
      vertex: line.vertex === null ? null : vertexOf(line.loop, line.vertex),
    })),
  }
}
