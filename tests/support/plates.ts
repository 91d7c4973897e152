import { loopFromVertices } from '../../shared/geometry/bulge.ts'
import type { Vertex } from '../../shared/geometry/types.ts'
import type { Body, Datum, Wall } from '../../shared/walls/types.ts'

/** Plates for tests of the geometry; everything is seeded, nothing is random between runs. */

export const DEGREE = Math.PI / 180

/** Numbers in [0, 1) from a seed (mulberry32, a public-domain generator, from memory). */
export function seeded(seed: number): () => number {
  let state = seed >>> 0
  return () => {
    state = (state + 0x6d2b79f5) >>> 0
    let mixed = Math.imul(state ^ (state >>> 15), state | 1)
    mixed ^= mixed + Math.imul(mixed ^ (mixed >>> 7), mixed | 61)
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 2 ** 32
  }
}

export function facets(...pairs: readonly (readonly [depth: number, degrees: number])[]): Wall {
  return { facets: pairs.map(([depth, degrees]) => ({ depth, tilt: degrees * DEGREE })) }
}

export function plate(
  thickness: number,
  loops: readonly (readonly Vertex[])[],
  wallFor: (loop: number, edge: number) => Wall,
  datum: Datum = 'top',
): Body {
  return {
    thickness,
    datum,
    loops: loops.map(loopFromVertices),
    walls: loops.map((loop, l) => loop.map((_, e) => wallFor(l, e))),
  }
}

/** Outer corners on rays at rising headings: a simple polygon with convex and concave corners. */
export function star(random: () => number, n: number, inner: number, outer: number): Vertex[] {
  return Array.from({ length: n }, (_, i) => {
    const heading = ((i + 0.6 * random()) / n) * 2 * Math.PI
    const r = inner + (outer - inner) * random()
    return { x: r * Math.cos(heading), y: r * Math.sin(heading) }
  })
}

export function rectangle(x: number, y: number, width: number, height: number): Vertex[] {
  return [
    { x, y },
    { x: x + width, y },
    { x: x + width, y: y + height },
    { x, y: y + height },
  ]
}

/** A circle of two half arcs: counter-clockwise, or clockwise as a hole. */
export function circle(x: number, y: number, radius: number, hole = false): Vertex[] {
  const bulge = hole ? -1 : 1
  return [
    { x: x - radius, y, bulge },
    { x: x + radius, y, bulge },
  ]
}

export function reversed(vertices: readonly Vertex[]): Vertex[] {
  return vertices.map((_, i) => {
    const at = vertices[(vertices.length - i) % vertices.length]!
    const bulge = vertices[(vertices.length - i - 1) % vertices.length]!.bulge
    return bulge === undefined ? { x: at.x, y: at.y } : { x: at.x, y: at.y, bulge: -bulge }
  })
}

/** Regular polygon of the given circumradius. */
export function regular(n: number, radius: number): Vertex[] {
  return Array.from({ length: n }, (_, i) => ({
    x: radius * Math.cos((2 * Math.PI * i) / n),
    y: radius * Math.sin((2 * Math.PI * i) / n),
  }))
}
