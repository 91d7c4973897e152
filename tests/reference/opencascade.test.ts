import type { TopoDS_Shape } from 'replicad-opencascadejs'
import { describe, expect, test } from 'vitest'
import { firstEvent } from '../../shared/events/event.ts'
import type { Vertex } from '../../shared/geometry/types.ts'
import { volumeOf } from '../../shared/solid/volume.ts'
import type { Wall } from '../../shared/walls/types.ts'
import { DEGREE, plate, seeded } from '../support/plates.ts'
import { openCascade, SPAN, type Kernel } from './opencascade-kernel.ts'
import { drawings, type Drawing, type Solid } from './opencascade-plates.ts'

/**
 * Source: OpenCascade 7 (a boundary-representation kernel), by the npm package replicad-opencascadejs 1.1. Volumes of
 * plates with arcs: every arc's wall is a frustum of a cone, every line's a plane, joined by the kernel's booleans band
 * by band between facet ends. Optional: where the package is not installed the test says so and is skipped.
 */
const kernel = await openCascade()
if (!kernel) console.warn('replicad-opencascadejs is not installed: its test is skipped')

test('the kernel is there in continuous integration', () => {
  expect(kernel !== null || !process.env['CI']).toBe(true)
})

/** Relative. The worst that was seen stands in README.md. */
const TOLERANCE = 1e-9
/** Sets of random walls for every drawing. */
const WALLS = 3

/** A wall by the test's own sum: what it stands outside its top line at a depth. */
function reach({ facets }: Wall, depth: number): number {
  let [sum, top] = [0, 0]
  for (const facet of facets) {
    sum += (Math.min(depth, facet.depth) - Math.min(depth, top)) * Math.tan(facet.tilt)
    top = facet.depth
  }
  return sum
}

interface Edge {
  readonly a: Vertex
  readonly b: Vertex
  readonly wall: Wall
}

/** Centre and radius of an arc from its bulge: tan of a quarter of the sweep. */
function circleOf(a: Vertex, b: Vertex, bulge: number) {
  const chord = Math.hypot(b.x - a.x, b.y - a.y)
  // Distance from the chord's middle to the centre, to the left of travel: (1/bulge − bulge)·chord/4.
  const left = ((1 / bulge - bulge) * chord) / 4
  return {
    x: (a.x + b.x) / 2 - (left * (b.y - a.y)) / chord,
    y: (a.y + b.y) / 2 + (left * (b.x - a.x)) / chord,
    radius: Math.hypot(chord / 2, left),
  }
}

/** The solids of one band in the kernel. */
class Band {
  constructor(
    private readonly oc: Kernel,
    private readonly edges: readonly (readonly Edge[])[],
    private readonly from: number,
    private readonly to: number,
  ) {}

  volume(solid: Solid): number {
    return this.oc.volume(this.within(this.slab(), solid))
  }

  private slab(): TopoDS_Shape {
    return this.oc.slab(-this.to, -this.from)
  }

  /** What the shape has in common with a solid. */
  private within(shape: TopoDS_Shape, solid: Solid): TopoDS_Shape {
    switch (solid.kind) {
      case 'all':
        return solid.of.reduce((rest, each) => this.within(rest, each), shape)
      case 'any': {
        const [first, ...others] = solid.of.map((each) => this.within(this.slab(), each))
        return this.oc.common(
          shape,
          others.reduce((sum, each) => this.oc.fuse(sum, each), first!),
        )
      }
      case 'beyond': {
        const [x, y] = solid.at
        const far = [x + SPAN * solid.x, y + SPAN * solid.y, 0] as const
        return this.oc.common(shape, this.oc.halfSpace([x, y, 0], [solid.x, solid.y, 0], far))
      }
      default:
        return this.beside(shape, this.edges[solid.loop]![solid.edge]!, solid.kind)
    }
  }

  private beside(shape: TopoDS_Shape, { a, b, wall }: Edge, keep: 'material' | 'waste'): TopoDS_Shape {
    const [head, foot] = [reach(wall, this.from), reach(wall, this.to)]
    const bulge = a.bulge ?? 0
    if (bulge === 0) {
      const length = Math.hypot(b.x - a.x, b.y - a.y)
      const n = { x: (b.y - a.y) / length, y: -(b.x - a.x) / length }
      const w = (foot - head) / (this.to - this.from)
      // Lean w: the wall's outward normal is (n, w) with z upward.
      const through = [a.x + head * n.x, a.y + head * n.y, -this.from] as const
      const side = keep === 'material' ? -SPAN : SPAN
      const towards = [through[0] + side * n.x, through[1] + side * n.y, through[2] + side * w] as const
      return this.oc.common(shape, this.oc.halfSpace(through, [n.x, n.y, w], towards))
    }
    const { x, y, radius } = circleOf(a, b, bulge)
    const out = bulge > 0 ? 1 : -1
    const cone = this.oc.frustum(x, y, -this.to, radius + out * foot, -this.from, radius + out * head)
    return (keep === 'material') === bulge > 0 ? this.oc.common(shape, cone) : this.oc.cut(shape, cone)
  }
}

function kernelVolume(oc: Kernel, drawing: Drawing, walls: readonly (readonly Wall[])[]): number {
  const edges = drawing.loops.map((loop, l) =>
    loop.map((a, e): Edge => ({ a, b: loop[(e + 1) % loop.length]!, wall: walls[l]![e]! })),
  )
  const ends = walls.flat().flatMap(({ facets }) => facets.map(({ depth }) => depth))
  const levels = [...new Set([0, ...ends])].sort((a, b) => a - b)
  let volume = 0
  for (let i = 1; i < levels.length; i++) {
    const band = new Band(oc, edges, levels[i - 1]!, levels[i]!)
    for (const solid of drawing.add) volume += band.volume(solid)
    for (const solid of drawing.take ?? []) volume -= band.volume(solid)
  }
  return volume
}

/** Walls of both signs, of one, two or three facets in any order of tilt. */
function randomWalls(random: () => number, { loops }: Drawing) {
  const thickness = 5 + 5 * random()
  const bends = [0.35, 0.7].map((share) => thickness * (share + 0.1 * random()))
  const wall = (): Wall => {
    const kept = bends.filter(() => random() < 0.4)
    return { facets: [...kept, thickness].map((depth) => ({ depth, tilt: 60 * DEGREE * (random() - 0.5) })) }
  }
  return { thickness, walls: loops.map((loop) => loop.map(wall)) }
}

describe.skipIf(!kernel)('volumes against OpenCascade', () => {
  test.each(drawings.map((drawing, i) => [drawing.name, drawing, i] as const))('%s', (_, drawing, i) => {
    const random = seeded(1_000 + i)
    let sound = 0
    // Walls under which something vanishes or splits are another test's matter.
    for (let tries = 0; sound < WALLS; tries++) {
      expect(tries).toBeLessThan(5 * WALLS)
      const { thickness, walls } = randomWalls(random, drawing)
      const body = plate(thickness, drawing.loops, (l, e) => walls[l]![e]!)
      if (firstEvent(body)) continue
      sound++
      const expected = kernelVolume(kernel!, drawing, walls)
      expect(Math.abs(volumeOf(body)! / expected - 1)).toBeLessThan(drawing.within ?? TOLERANCE)
    }
  })
})
