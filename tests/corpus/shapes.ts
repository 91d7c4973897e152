import type { Vertex } from '../../shared/geometry/types.ts'

/** Outlines of the corpus. */

/** A rectangle with round corners, counter-clockwise from the start of its lower side. */
export function rounded(width: number, height: number, radius: number): Vertex[] {
  const bulge = Math.tan(Math.PI / 8)
  return [
    { x: radius, y: 0 },
    { x: width - radius, y: 0, bulge },
    { x: width, y: radius },
    { x: width, y: height - radius, bulge },
    { x: width - radius, y: height },
    { x: radius, y: height, bulge },
    { x: 0, y: height - radius },
    { x: 0, y: radius, bulge },
  ]
}

/** A slot as a hole: two straight sides and two half circles, clockwise. */
export function slot(x: number, y: number, length: number, width: number): Vertex[] {
  const r = width / 2
  return [
    { x, y: y - r },
    { x, y: y + r, bulge: 0 },
    { x: x + length, y: y + r, bulge: -1 },
    { x: x + length, y: y - r },
  ].map((vertex, i) => (i === 0 ? { ...vertex, bulge: -1 } : vertex))
}

/** Teeth round a circle: four corners each. */
export function toothed(teeth: number, inner: number, outer: number): Vertex[] {
  return Array.from({ length: 4 * teeth }, (_, i) => {
    const radius = i % 4 === 1 || i % 4 === 2 ? outer : inner
    const heading = (2 * Math.PI * (i + 0.15 * (i % 2))) / (4 * teeth)
    return { x: radius * Math.cos(heading), y: radius * Math.sin(heading) }
  })
}

/** Points and hollows in turn. */
export function spiky(pointsRound: number, inner: number, outer: number): Vertex[] {
  return Array.from({ length: 2 * pointsRound }, (_, i) => {
    const radius = i % 2 === 0 ? outer : inner
    const heading = (Math.PI * i) / pointsRound
    return { x: radius * Math.cos(heading), y: radius * Math.sin(heading) }
  })
}
