import { contourAt } from '../contours/contour.ts'
import { levelsOf } from '../walls/levels.ts'
import type { SoundRange } from '../events/range.ts'
import type { Body } from '../walls/types.ts'
import type { Contour, ContourSegment } from '../contours/types.ts'
import type { EvaluatedContour } from './schema.ts'

/** Contours at the top, at every facet end and at the bottom, as far as they are sound. */
export function soundContours(body: Body, range: SoundRange): Contour[] {
  if (range.empty) return []
  return levelsOf(body)
    .filter((depth) => depth >= range.from && depth <= range.to)
    .map((depth) => contourAt(body, depth))
}

/**
 * As vertices with bulges. Outer loop counter-clockwise, holes clockwise, each from the caller's vertex 0; a
 * step between smooth walls adds a vertex.
 */
export function contourVertices({ depth, loops }: Contour): EvaluatedContour {
  return { depth, loops: loops.map((loop) => loop.map(vertexOf)) }
}

function vertexOf(segment: ContourSegment): { x: number; y: number; bulge?: number } {
  const { x, y } = segment.from
  return segment.kind === 'line' ? { x, y } : { x, y, bulge: Math.tan(segment.sweep / 4) }
}
