import { meshOf } from '../solid/mesh.ts'
import { soundRange } from '../events/range.ts'
import type { Body } from '../walls/types.ts'
import type { BodyMesh } from '../solid/types.ts'
import type { Contour } from '../contours/types.ts'
import { volumeOf } from '../solid/volume.ts'
import { LIMIT_ROUNDING } from '../findings/place.ts'
import { cornerInDrawing, edgeInDrawing } from '../geometry/orient.ts'
import { contourVertices, soundContours } from './contours.ts'
import { evaluatedCorners } from './corners.ts'
import { evaluatedEdges } from './edges.ts'
import { callersEdge, findingsOf } from './findings.ts'
import { readRequest, type ReadRequest } from './read.ts'
import type { EvaluatedCorner, EvaluatedEdge, Evaluation, EvaluationRequest } from './schema.ts'

/**
 * The front door: a set-up in, everything known about it out. Pure; the browser's worker and the server run
 * the same. Throws `EvaluationError` when the request has no sound meaning. All numbering in the answer is the
 * caller's, also where a loop came in the other way round: edge i is still the edge from the caller's vertex i
 * to its vertex i + 1. Only the vertices of `contours` always run with the material on their left.
 */
export function evaluate(request: EvaluationRequest): Evaluation {
  return evaluationOf(request, readRequest(request))
}

/** Both at once, for a screen that needs both: the request is read and its first event looked for once. */
export function evaluateWithMesh(
  request: EvaluationRequest,
  chordTolerance = CHORD_TOLERANCE,
): { readonly evaluation: Evaluation; readonly mesh: BodyMesh } {
  const read = readRequest(request)
  return { evaluation: evaluationOf(request, read), mesh: callersMesh(read, chordTolerance) }
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

function evaluationOf(request: EvaluationRequest, read: ReadRequest): Evaluation {
  const { body } = read
  const taper = request.jet?.taper ?? 0
  const range = read.problems.length === 0 ? soundRange(body) : null
  const contours = range ? soundContours(body, range) : []
  const edges = evaluatedEdges(read, taper, at(contours, 0), at(contours, body.thickness))
  const cornerFigures = evaluatedCorners(read, taper)
  const neededTilt = largestTilt(edges, cornerFigures.corners)
  const event = range?.event ?? null
  return {
    edges,
    corners: cornerFigures.corners,
    contours: contours.map(contourVertices),
    firstEvent: event && {
      kind: event.kind,
      depth: event.depth,
      ...callersEdge(read, event),
      at: { x: event.at.x, y: event.at.y },
      other: event.other && callersEdge(read, event.other),
    },
    volume: range && !event ? volumeOf(body) : null,
    neededTilt,
    findings: findingsOf({ request, read, range, contours, cornerFigures, neededTilt }),
  }
}

function callersMesh(read: ReadRequest, chordTolerance: number): BodyMesh {
  const mesh = read.problems.length === 0 ? meshOf(read.body, chordTolerance) : null
  if (!mesh) return noMesh()
  return read.reversed.includes(true) ? inCallersNumbering(mesh, read) : mesh
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

function inCallersNumbering(mesh: BodyMesh, read: ReadRequest): BodyMesh {
  const sizeOf = (loop: number) => read.body.loops[loop]?.length ?? 0
  const turned = (loop: number) => read.reversed[loop] ?? false
  const vertexOf = (loop: number, vertex: number) => cornerInDrawing(vertex, sizeOf(loop), turned(loop))
  const edgeOf = (loop: number, edge: number) => edgeInDrawing(edge, sizeOf(loop), turned(loop))
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

function at(contours: readonly Contour[], depth: number): Contour | null {
  return contours.find((contour) => contour.depth === depth) ?? null
}

/** A corner counts only where it asks for more than every edge. */
function largestTilt(
  edges: readonly EvaluatedEdge[],
  corners: readonly EvaluatedCorner[],
): Evaluation['neededTilt'] {
  let most: Evaluation['neededTilt'] = null
  for (const { loop, edge, wholeTilt } of edges) {
    if (!most || wholeTilt > most.tilt) most = { tilt: wholeTilt, at: { loop, edge } }
  }
  for (const { loop, vertex, jetTilt } of corners) {
    if (jetTilt !== null && (!most || jetTilt > most.tilt + LIMIT_ROUNDING)) {
      most = { tilt: jetTilt, at: { loop, vertex } }
    }
  }
  return most
}
