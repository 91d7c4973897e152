import { degrees } from '../units/angle.ts'
import type { Columns } from './columns.ts'
import { contourVertices, soundContours } from './contours.ts'
import { cornerKind, interiorAngle, slopeDegrees } from './corner-columns.ts'
import { findingsOf } from './findings.ts'
import { jetWayOf, movesIn, nameOfMove, type JetWay } from './jet-way.ts'
import { passViews, wayOutViews } from './way-views.ts'
import type { CornerMove } from '../passes/types.ts'
import type { EvaluatedCorner, EvaluatedEdge, Evaluation } from './schema.ts'

/**
 * The answer as its schema has it. What is long is made into objects when it is first read, and kept; to everyone else
 * (JSON, copying, spreading) the properties look like any other. `late`: the columns as they stand when read, for an
 * editor that changes them in place.
 */
export function evaluationOf(columns: Columns, late: () => Columns = () => columns): Evaluation {
  const { read, range, volume, neededTilt } = columns
  const event = range?.event ?? null
  const edges = once(() => edgesOf(late()))
  const corners = once(() => cornersOf(late(), way()))
  const contours = once(() => (range ? soundContours(late().read.body, range) : []))
  const contourViews = once(() => contours().map(contourVertices))
  const way = once(() => jetWayOf(late().read))
  const findings = once(() => findingsOf(late(), contours, way()))
  const passes = once(() => passViewsOf(way()))
  const ways = once(() => waysViewOf(way()))
  return {
    get edges() {
      return edges()
    },
    get corners() {
      return corners()
    },
    get contours() {
      return contourViews()
    },
    firstEvent: event && {
      kind: event.kind,
      depth: event.depth,
      ...read.numbering.edgeRef(event),
      at: { x: event.at.x, y: event.at.y },
      other: event.other && read.numbering.edgeRef(event.other),
    },
    volume,
    neededTilt,
    get passes() {
      return passes()
    },
    get wayOut() {
      return ways()
    },
    get findings() {
      return findings()
    },
  }
}

function passViewsOf(way: JetWay | null) {
  return way?.cut ? passViews(way.cut.passes) : null
}

function waysViewOf(way: JetWay | null) {
  return way ? wayOutViews(way.ways) : null
}

function once<T>(make: () => T): () => T {
  let made: { readonly value: T } | null = null
  return () => (made ??= { value: make() }).value
}

/** Every edge in the caller's order. */
function edgesOf({ read, edges }: Columns): EvaluatedEdge[] {
  const { numbering, preps, frame } = read
  return Array.from(preps.ofEdge, (prep, e) => {
    const g = numbering.edge ? numbering.edge[e]! : e
    const { bottomOffset, jetTilts, wholeTilt, metalPath } = edges.preps[prep]!
    return {
      loop: frame.loopOf[g]!,
      edge: e - frame.loopStart[frame.loopOf[g]!]!,
      topLength: edges.top && edges.top[g]!,
      bottomLength: edges.bottom && edges.bottom[g]!,
      bottomOffset,
      jetTilts,
      wholeTilt,
      metalPath,
    }
  })
}

/** Every corner in the caller's order. */
function cornersOf({ read, corners }: Columns, way: JetWay | null): EvaluatedCorner[] {
  const moves = way?.cut?.passes
  const { numbering, frame } = read
  return Array.from({ length: frame.count }, (_, c) => {
    const g = numbering.corner ? numbering.corner[c]! : c
    return {
      loop: frame.loopOf[g]!,
      vertex: c - frame.loopStart[frame.loopOf[g]!]!,
      kind: cornerKind(frame, g),
      interiorAngle: degrees(interiorAngle(frame, g)),
      seamTilt: slopeDegrees(corners.seam[g]!),
      jetTilt: slopeDegrees(corners.jet[g]!),
      move: moves ? nameOfMove[moves.cornerMoves[g] as CornerMove] : null,
      offers: moves ? movesIn(moves.cornerOffers[g]!) : [],
    }
  })
}
