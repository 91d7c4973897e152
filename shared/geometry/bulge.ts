import type { Loop, Point, Segment, Vertex, VertexLoop } from './types.ts'

/**
 * Vertices with bulges (as files and requests write them) to segments and back.
 * With chord c and bulge b = tan(sweep / 4): radius = c(1 + b²) / 4|b|, and the centre lies c(1 − b²) / 4b to
 * the left of the chord's middle.
 */

/**
 * A bulge below this is read as a straight edge. It departs from its chord by less than 5e-8 of the chord
 * (50 nm on a metre), while its centre would lie 2.5 million chords away and cost as many digits.
 */
export const STRAIGHT_BULGE = 1e-7

/** Segments of a closed loop of vertices; segment i starts at vertex i. */
export function loopFromVertices(vertices: VertexLoop): Loop {
  return vertices.map((vertex, i) =>
    segmentFromVertices(vertex, vertices[(i + 1) % vertices.length] ?? vertex),
  )
}

/** The edge from one vertex to the next; its ends are plain points. */
export function segmentFromVertices(vertex: Vertex, next: Point): Segment {
  const from = { x: vertex.x, y: vertex.y }
  const to = { x: next.x, y: next.y }
  const bulge = vertex.bulge ?? 0
  if (!(Math.abs(bulge) >= STRAIGHT_BULGE)) return { kind: 'line', from, to }
  const dx = to.x - from.x
  const dy = to.y - from.y
  const lift = (1 - bulge * bulge) / (4 * bulge)
  return {
    kind: 'arc',
    from,
    to,
    centre: { x: (from.x + to.x) / 2 - dy * lift, y: (from.y + to.y) / 2 + dx * lift },
    radius: (Math.hypot(dx, dy) * (1 + bulge * bulge)) / (4 * Math.abs(bulge)),
    sweep: 4 * Math.atan(bulge),
  }
}

/** Vertices of a loop, a bulge only where an arc starts. */
export function verticesFromLoop(loop: Loop): VertexLoop {
  return loop.map((segment) =>
    segment.kind === 'line'
      ? { x: segment.from.x, y: segment.from.y }
      : { x: segment.from.x, y: segment.from.y, bulge: Math.tan(segment.sweep / 4) },
  )
}
