import type { Point } from '../../shared/geometry/types.ts'
import type { Wall } from '../../shared/walls/types.ts'
import { DEGREE, reversed } from '../support/plates.ts'

/**
 * Random plates as sums and differences of convex pieces: a convex outline with notches (of two or three edges) and
 * tabs on its sides, and convex or L-shaped holes. Walls of both signs, of one to three facets.
 */
export interface Feature {
  /** `side` bounds the plate; `tab` is added; `notch` and `hole` are taken away. */
  readonly kind: 'side' | 'notch' | 'tab' | 'hole'
  /** Edges of the loop, as indices of their first corners. */
  readonly edges: readonly number[]
  /** Two edges of a hole between which the material stands into it. */
  readonly inner?: readonly number[]
}

export interface RandomPlate {
  readonly thickness: number
  readonly loops: readonly (readonly Point[])[]
  readonly walls: readonly (readonly Wall[])[]
  /** Of every loop. */
  readonly features: readonly (readonly Feature[])[]
}

const STEEPEST = 45

export function randomPlate(random: () => number): RandomPlate {
  const thickness = 3 + 7 * random()
  // Few bends for the whole plate, each at its own depth, so that bands are many but not countless.
  const bends = [0.25, 0.55].map((share) => thickness * (share + 0.2 * random()))
  const wall = (): Wall => {
    const kept = bends.filter(() => random() < 0.4)
    return {
      facets: [...kept, thickness].map((depth) => ({
        depth,
        tilt: 2 * STEEPEST * DEGREE * (random() - 0.5),
      })),
    }
  }
  const outline = randomOutline(random, wall)
  const holes = randomHoles(random)
  return {
    thickness,
    loops: [outline.points, ...holes.map(({ points }) => points)],
    walls: [outline.walls, ...holes.map(({ points }) => points.map(wall))],
    features: [outline.features, ...holes.map(({ feature }) => [feature])],
  }
}

function randomOutline(random: () => number, wall: () => Wall) {
  const sides = 4 + Math.floor(4 * random())
  const corners = Array.from({ length: sides }, (_, i) => polar(300, (i + 0.3 * random()) / sides))
  const [points, walls, features]: [Point[], Wall[], Feature[]] = [[], [], []]
  for (const [i, a] of corners.entries()) {
    const b = corners[(i + 1) % sides]!
    const length = Math.hypot(b.x - a.x, b.y - a.y)
    const u = { x: (b.x - a.x) / length, y: (b.y - a.y) / length }
    /** Along the side from its middle, and outward from it. */
    const at = (along: number, out: number) => ({
      x: (a.x + b.x) / 2 + along * u.x + out * u.y,
      y: (a.y + b.y) / 2 + along * u.y - out * u.x,
    })
    // Both parts of a side keep one wall, so that they stay one plane.
    const side = wall()
    const first = points.push(a) - 1
    walls.push(side)
    features.push({ kind: 'side', edges: [first] })
    const extra = random()
    if (extra < 0.25) {
      points.push(at(-45, 0), at(20 * (random() - 0.5), -50), at(45, 0))
      walls.push(wall(), wall(), side)
      features.push({ kind: 'notch', edges: [first + 1, first + 2] })
    } else if (extra < 0.5) {
      points.push(at(-45, 0), at(-38 + 8 * random(), -45), at(34 + 8 * random(), -38), at(45, 0))
      walls.push(wall(), wall(), wall(), side)
      features.push({ kind: 'notch', edges: [first + 1, first + 2, first + 3] })
    } else if (extra < 0.75) {
      points.push(at(-50, 0), at(-40 - 15 * random(), 60), at(45, 50), at(50, 0))
      walls.push(wall(), wall(), wall(), side)
      features.push({ kind: 'tab', edges: [first + 1, first + 2, first + 3] })
    }
  }
  return { points, walls, features }
}

function randomHoles(random: () => number): { points: Point[]; feature: Feature }[] {
  const count = 1 + Math.floor(4 * random())
  const [ring, size] = count === 1 ? [0, 70] : [75, 30]
  return Array.from({ length: count }, (_, i) => {
    const centre = polar(ring, (i + 0.2 * random()) / count)
    const at = ({ x, y }: Point) => ({ x: centre.x + x, y: centre.y + y })
    if (random() < 0.3) {
      const [s, inner] = [0.9 * size, 6 * (random() - 0.5)]
      const corners = [[-s, -s], [s, -s], [s, inner], [inner, inner], [inner, s], [-s, s]] // prettier-ignore
      const points = reversed(corners.map(([x, y]) => at({ x: x!, y: y! })))
      return { points, feature: { kind: 'hole', edges: [0, 1, 4, 5], inner: [2, 3] } }
    }
    const sides = 3 + Math.floor(4 * random())
    const points = reversed(
      Array.from({ length: sides }, (__, k) => at(polar(size, (k + 0.3 * random()) / sides))),
    )
    return { points, feature: { kind: 'hole', edges: points.map((__, k) => k) } }
  })
}

/** A point at a distance, `turns` of a whole turn round. */
function polar(radius: number, turns: number): Point {
  return { x: radius * Math.cos(2 * Math.PI * turns), y: radius * Math.sin(2 * Math.PI * turns) }
}
