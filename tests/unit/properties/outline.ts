import type { EvaluatedContour } from '../../../shared/evaluate/schema.ts'

/**
 * A contour as the properties see it: where a point lies, worked out from vertices and bulges alone, arcs exact.
 */

type Point = readonly [x: number, y: number]

/** One edge: a chord, and where it bulges the circle of which it is a chord (its arc on the side told by `left`). */
interface Edge {
  readonly a: Point
  readonly b: Point
  readonly arc: { readonly centre: Point; readonly radius: number; readonly left: boolean } | null
}

export type Outline = readonly Edge[]

export function outlineOf({ loops }: EvaluatedContour): Outline {
  return loops.flatMap((loop) =>
    loop.map(({ x, y, bulge = 0 }, i): Edge => {
      const to = loop[(i + 1) % loop.length]!
      const [a, b]: [Point, Point] = [
        [x, y],
        [to.x, to.y],
      ]
      if (bulge === 0) return { a, b, arc: null }
      // The arc's middle stands bulge·(chord/2) off the chord's middle: to the right of travel when counter-clockwise.
      const lift = (1 - bulge * bulge) / (4 * bulge)
      const centre: Point = [(x + to.x) / 2 - lift * (to.y - y), (y + to.y) / 2 + lift * (to.x - x)]
      const radius = (Math.hypot(to.x - x, to.y - y) * (1 + bulge * bulge)) / (4 * Math.abs(bulge))
      return { a, b, arc: { centre, radius, left: bulge < 0 } }
    }),
  )
}

/** Points are moved by this much, mm, so that none lies level with a corner or on a chord: a thousandth of what is asked. */
const NUDGE = 1e-9

/** How deep a point lies inside, mm: its distance from the outline by the even-odd rule; 0 outside. */
export function depthInside(outline: Outline, [x, y]: Point, notLess = 0): number {
  const at: Point = [x + NUDGE, y + 0.7 * NUDGE]
  let inside = false
  for (const edge of outline) if (crosses(edge, at) !== bitten(edge, at)) inside = !inside
  if (!inside) return 0
  let nearest = Infinity
  for (const edge of outline) {
    nearest = Math.min(nearest, distanceFrom(edge, at))
    if (nearest <= notLess) return nearest
  }
  return nearest
}

/** Whether a ray from the point toward +x meets the chord. */
function crosses({ a, b }: Edge, [x, y]: Point): boolean {
  if (a[1] > y === b[1] > y) return false
  return x < a[0] + ((y - a[1]) / (b[1] - a[1])) * (b[0] - a[0])
}

/** Whether the point lies between chord and arc, where the chord alone would tell it wrong. */
function bitten({ a, b, arc }: Edge, [x, y]: Point): boolean {
  if (!arc) return false
  if (Math.hypot(x - arc.centre[0], y - arc.centre[1]) >= arc.radius) return false
  const side = (b[0] - a[0]) * (y - a[1]) - (b[1] - a[1]) * (x - a[0])
  return side > 0 === arc.left
}

function distanceFrom({ a, b, arc }: Edge, [x, y]: Point): number {
  const ends = () => Math.min(Math.hypot(x - a[0], y - a[1]), Math.hypot(x - b[0], y - b[1]))
  if (!arc) {
    const [dx, dy] = [b[0] - a[0], b[1] - a[1]]
    const part = ((x - a[0]) * dx + (y - a[1]) * dy) / (dx * dx + dy * dy)
    if (!(part > 0 && part < 1)) return ends()
    return Math.hypot(x - a[0] - part * dx, y - a[1] - part * dy)
  }
  const [rx, ry] = [x - arc.centre[0], y - arc.centre[1]]
  const from = Math.hypot(rx, ry)
  // The foot on the circle belongs to the arc when it lies on the arc's side of the chord.
  const foot: Point = [arc.centre[0] + (rx / from) * arc.radius, arc.centre[1] + (ry / from) * arc.radius]
  const side = (b[0] - a[0]) * (foot[1] - a[1]) - (b[1] - a[1]) * (foot[0] - a[0])
  return side > 0 === arc.left ? Math.abs(from - arc.radius) : ends()
}
