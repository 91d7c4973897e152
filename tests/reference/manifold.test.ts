import Module from 'manifold-3d'
import { beforeAll, expect, test } from 'vitest'
import { contourArea } from '../../shared/contours/check.ts'
import { contourAt } from '../../shared/contours/contour.ts'
import { firstEvent } from '../../shared/events/event.ts'
import { checkMesh } from '../../shared/solid/check.ts'
import { meshOf } from '../../shared/solid/mesh.ts'
import { volumeOf } from '../../shared/solid/volume.ts'
import { plate, seeded } from '../support/plates.ts'
import { randomPlate, type Feature, type RandomPlate } from './manifold-plates.ts'

/**
 * Source: manifold-3d 3.5, a solid kernel that knows nothing of walls. A convex outline is the intersection of
 * half-spaces, a notch takes away the intersection of its outer half-spaces, a tab adds the intersection of its own, a
 * hole is taken away: every concave corner is a union of two half-spaces, every convex one an intersection. The
 * planes are worked out here from the tilts, band by band between facet ends.
 */
type Kernel = Awaited<ReturnType<typeof Module>>
type Solid = InstanceType<Kernel['Manifold']>
let kernel: Kernel
beforeAll(async () => {
  kernel = await Module()
  kernel.setup()
})

/** Relative; volumes of the kernel are exact but for rounding. */
const VOLUME = 1e-11
/** Relative; the kernel rounds the points of a slice. */
const AREA = 1e-9
const DEPTHS = [1, 2, 3, 4, 5, 6, 7, 8, 9].map((tenth) => tenth / 10)

/** Half of the slab that every band is cut from, mm. */
const SPAN = 1_000

class Band {
  private readonly made: Solid[] = []

  constructor(
    private readonly it: RandomPlate,
    private readonly from: number,
    private readonly to: number,
  ) {}

  solid(): Solid {
    const slab = this.slab()
    const outline = this.it.features[0]!
    let solid = this.cut(
      slab,
      0,
      outline.flatMap(({ kind, edges }) => (kind === 'side' ? edges : [])),
      'material',
    )
    const base = solid
    for (const [loop, features] of this.it.features.entries()) {
      for (const feature of features) {
        if (feature.kind === 'tab') solid = this.keep(solid.add(this.tab(loop, feature)))
        if (feature.kind === 'notch')
          solid = this.keep(solid.subtract(this.cut(slab, loop, feature.edges, 'waste')))
        if (feature.kind === 'hole') solid = this.keep(solid.subtract(this.hole(base, loop, feature)))
      }
    }
    return solid
  }

  /** The kernel's memory is not collected. */
  free(): void {
    for (const solid of this.made) solid.delete()
  }

  private keep(solid: Solid): Solid {
    this.made.push(solid)
    return solid
  }

  private slab(): Solid {
    const cube = this.keep(kernel.Manifold.cube([2 * SPAN, 2 * SPAN, this.to - this.from]))
    return this.keep(cube.translate([-SPAN, -SPAN, -this.to]))
  }

  /** The tab's walls reach inward without end; half the plate on its side is enough. */
  private tab(loop: number, { edges }: Feature): Solid {
    const points = this.it.loops[loop]!
    const [p, q] = [points[edges[1]!]!, points[edges[2]!]!]
    const mid = { x: (p.x + q.x) / 2, y: (p.y + q.y) / 2 }
    const far = Math.hypot(mid.x, mid.y)
    const near = this.keep(this.slab().trimByPlane([mid.x / far, mid.y / far, 0], far - 120))
    return this.cut(near, loop, edges, 'material')
  }

  private hole(base: Solid, loop: number, { edges, inner }: Feature): Solid {
    const away = this.cut(base, loop, edges, 'waste')
    return inner ? this.keep(away.subtract(this.cut(base, loop, inner, 'material'))) : away
  }

  /** What a solid has on one side of the walls of some edges. */
  private cut(solid: Solid, loop: number, edges: readonly number[], side: 'material' | 'waste'): Solid {
    return edges.reduce((rest, edge) => {
      const points = this.it.loops[loop]!
      const [a, b] = [points[edge]!, points[(edge + 1) % points.length]!]
      const length = Math.hypot(b.x - a.x, b.y - a.y)
      const n = { x: (b.y - a.y) / length, y: -(b.x - a.x) / length }
      let [offset, top, w] = [0, 0, 0]
      for (const facet of this.it.walls[loop]![edge]!.facets) {
        w = Math.tan(facet.tilt)
        if (facet.depth > this.from) break
        offset += w * (facet.depth - top)
        top = facet.depth
      }
      // n·x + w z = n·a + offset − w·top holds on the wall: outside where the left is greater.
      const size = Math.hypot(1, w) * (side === 'material' ? -1 : 1)
      const height = n.x * a.x + n.y * a.y + offset - w * top
      return this.keep(rest.trimByPlane([n.x / size, n.y / size, w / size], height / size))
    }, solid)
  }
}

/** Volume of the whole plate, and area at some depths, by the kernel alone. */
function measured(it: RandomPlate, depths: readonly number[]) {
  const ends = it.walls.flat().flatMap(({ facets }) => facets.map(({ depth }) => depth))
  const levels = [...new Set([0, ...ends])].sort((a, b) => a - b)
  let volume = 0
  const areas: number[] = []
  for (let i = 1; i < levels.length; i++) {
    const [from, to] = [levels[i - 1]!, levels[i]!]
    const band = new Band(it, from, to)
    const solid = band.solid()
    volume += solid.volume()
    for (const depth of depths) {
      if (depth < from || depth >= to) continue
      const slice = solid.slice(-depth)
      areas.push(slice.area())
      slice.delete()
    }
    band.free()
  }
  return { volume, areas }
}

const PLATES = 200
const GROUP = 20

test.each(Array.from({ length: PLATES / GROUP }, (_, i) => [i * GROUP + 1, (i + 1) * GROUP, i]))(
  'plates %i to %i: volume, mesh and nine areas equal those of the solid kernel',
  (_, __, group) => {
    const random = seeded(20261201 + group)
    let sound = 0
    // Plates whose walls meet above the bottom face are for other tests.
    for (let tries = 0; sound < GROUP; tries++) {
      expect(tries).toBeLessThan(3 * GROUP)
      const it = randomPlate(random)
      const body = plate(it.thickness, it.loops, (l, e) => it.walls[l]![e]!)
      if (firstEvent(body)) continue
      sound++
      const depths = DEPTHS.map((share) => share * it.thickness)
      const { volume, areas } = measured(it, depths)
      expect(Math.abs(volumeOf(body)! / volume - 1)).toBeLessThan(VOLUME)
      expect(areas).toHaveLength(depths.length)
      for (const [i, depth] of depths.entries()) {
        expect(Math.abs(contourArea(contourAt(body, depth)) / areas[i]! - 1)).toBeLessThan(AREA)
      }
      const mesh = checkMesh(meshOf(body, 0.1)!)
      expect(mesh).toMatchObject({ unmatched: 0, repeated: 0 })
      expect(Math.abs(mesh.volume / volume - 1)).toBeLessThan(VOLUME)
    }
  },
)
