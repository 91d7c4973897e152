import Module from 'manifold-3d'
import { beforeAll, expect, test } from 'vitest'
import { checkMesh } from '../../../shared/solid/check.ts'
import { firstEvent } from '../../../shared/events/event.ts'
import { meshOf } from '../../../shared/solid/mesh.ts'
import type { Wall } from '../../../shared/walls/types.ts'
import { volumeOf } from '../../../shared/solid/volume.ts'
import type { Point } from '../../../shared/geometry/types.ts'
import { DEGREE, plate, reversed, seeded } from '../../support/plates.ts'

/**
 * Volumes against manifold-3d 3.5, a solid kernel that knows nothing of walls: a convex plate is the intersection
 * of half-spaces, a notch takes away the intersection of its two outer half-spaces, a tab adds the intersection
 * of its three, a convex hole is taken away. So every concave corner is a union of two half-spaces and every
 * convex one an intersection. Planes are worked out here from the tilts, band by band.
 */
type Kernel = Awaited<ReturnType<typeof Module>>
type Solid = InstanceType<Kernel['Manifold']>
let kernel: Kernel
beforeAll(async () => {
  kernel = await Module()
  kernel.setup()
})

interface Feature {
  readonly kind: 'side' | 'notch' | 'tab' | 'hole'
  /** Edges of the loop, as indices of their first corners. */
  readonly edges: readonly number[]
}

interface Plate {
  readonly loops: Point[][]
  readonly walls: Wall[][]
  readonly features: readonly (readonly Feature[])[]
  readonly thickness: number
}

function randomPlate(seed: number): Plate {
  const random = seeded(seed)
  const thickness = 4 + 8 * random()
  const middle = thickness * (0.3 + 0.4 * random())
  const wall = (): Wall => {
    const tilt = () => (random() - 0.5) * 70 * DEGREE
    const facets = [{ depth: thickness, tilt: tilt() }]
    return { facets: random() < 0.3 ? [{ depth: middle, tilt: tilt() }, ...facets] : facets }
  }
  const sides = 4 + Math.floor(4 * random())
  const corners = Array.from({ length: sides }, (_, i) => {
    const heading = ((i + 0.3 * random()) / sides) * 2 * Math.PI
    return { x: 300 * Math.cos(heading), y: 300 * Math.sin(heading) }
  })
  const [points, walls, features]: [Point[], Wall[], Feature[]] = [[], [], []]
  for (const [i, a] of corners.entries()) {
    const b = corners[(i + 1) % sides]!
    const u = {
      x: (b.x - a.x) / Math.hypot(b.x - a.x, b.y - a.y),
      y: (b.y - a.y) / Math.hypot(b.x - a.x, b.y - a.y),
    }
    const middlePoint = { x: (a.x + b.x) / 2, y: (a.y + b.y) / 2 }
    /** Along the side from its middle, and outward from it. */
    const at = (along: number, out: number) => ({
      x: middlePoint.x + along * u.x + out * u.y,
      y: middlePoint.y + along * u.y - out * u.x,
    })
    const side = wall()
    const first = points.push(a) - 1
    walls.push(side)
    features.push({ kind: 'side', edges: [first] })
    const extra = random()
    if (extra < 0.35) {
      points.push(at(-45, 0), at(20 * (random() - 0.5), -50), at(45, 0))
      walls.push(wall(), wall(), side)
      features.push({ kind: 'notch', edges: [first + 1, first + 2] })
    } else if (extra < 0.7) {
      points.push(at(-50, 0), at(-40 - 15 * random(), 60), at(45, 50), at(50, 0))
      walls.push(wall(), wall(), wall(), side)
      features.push({ kind: 'tab', edges: [first + 1, first + 2, first + 3] })
    }
  }
  const holeSides = 3 + Math.floor(3 * random())
  const hole = reversed(
    Array.from({ length: holeSides }, (_, i) => ({
      x: 70 * Math.cos((2 * Math.PI * (i + 0.3 * random())) / holeSides),
      y: 70 * Math.sin((2 * Math.PI * (i + 0.3 * random())) / holeSides),
    })),
  )
  return {
    thickness,
    loops: [points, hole],
    walls: [walls, hole.map(wall)],
    features: [features, [{ kind: 'hole', edges: hole.map((_, i) => i) }]],
  }
}

function solidVolume({ loops, walls, features, thickness }: Plate): number {
  const levels = [...new Set([0, ...walls.flat().flatMap((w) => w.facets.map((f) => f.depth))])].sort(
    (a, b) => a - b,
  )
  let volume = 0
  for (let i = 1; i < levels.length; i++) volume += bandVolume(levels[i - 1]!, levels[i]!)
  expect(levels.at(-1)).toBe(thickness)
  return volume

  function bandVolume(from: number, to: number): number {
    const slab = kernel.Manifold.cube([2000, 2000, to - from]).translate([-1000, -1000, -to])
    const cut = (solid: Solid, loop: number, edge: number, keep: 'material' | 'waste'): Solid => {
      const [a, b] = [loops[loop]![edge]!, loops[loop]![(edge + 1) % loops[loop]!.length]!]
      const length = Math.hypot(b.x - a.x, b.y - a.y)
      const n = { x: (b.y - a.y) / length, y: -(b.x - a.x) / length }
      let [offset, top, w] = [0, 0, 0]
      for (const facet of walls[loop]![edge]!.facets) {
        w = Math.tan(facet.tilt)
        if (facet.depth > from) break
        offset += w * (facet.depth - top)
        top = facet.depth
      }
      // n·x + w z = n·a + offset − w·top holds on the wall: outside where the left is greater.
      const size = Math.hypot(1, w) * (keep === 'material' ? -1 : 1)
      const height = n.x * a.x + n.y * a.y + offset - w * top
      return solid.trimByPlane([n.x / size, n.y / size, w / size], height / size)
    }
    let solid = slab
    for (const f of features[0]!) if (f.kind === 'side') solid = cut(solid, 0, f.edges[0]!, 'material')
    const base = solid
    for (const [loop, list] of features.entries()) {
      for (const { kind, edges } of list) {
        if (kind === 'side') continue
        if (kind === 'tab') {
          // The tab's walls reach inward without end; half the plate on its side is enough.
          const [p, q] = [loops[0]![edges[1]!]!, loops[0]![edges[2]!]!]
          const mid = { x: (p.x + q.x) / 2, y: (p.y + q.y) / 2 }
          const far = Math.hypot(mid.x, mid.y)
          let tab = slab.trimByPlane([mid.x / far, mid.y / far, 0], far - 120)
          for (const edge of edges) tab = cut(tab, loop, edge, 'material')
          solid = solid.add(tab)
        } else {
          let away = kind === 'hole' ? base : slab
          for (const edge of edges) away = cut(away, loop, edge, 'waste')
          solid = solid.subtract(away)
        }
      }
    }
    return solid.volume()
  }
}

test.each(Array.from({ length: 24 }, (_, seed) => [seed]))(
  'plate %i: volume and mesh equal those of the solid kernel',
  (seed) => {
    const it = randomPlate(seed)
    const body = plate(it.thickness, it.loops, (l, e) => it.walls[l]![e]!)
    expect(firstEvent(body)).toBeNull()
    const expected = solidVolume(it)
    expect(Math.abs(volumeOf(body)! / expected - 1)).toBeLessThan(1e-11)
    const mesh = checkMesh(meshOf(body, 0.1)!)
    expect(mesh.unmatched).toBe(0)
    expect(mesh.repeated).toBe(0)
    expect(Math.abs(mesh.volume / expected - 1)).toBeLessThan(1e-11)
  },
)
