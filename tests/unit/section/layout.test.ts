import { describe, expect, it } from 'vitest'
import { dimensionsOf } from '../../../src/section/dimensions.ts'
import { labelSize } from '../../../src/section/label-text.ts'
import { layoutSection } from '../../../src/section/layout.ts'
import type { Box, LayoutOptions, SectionLayout } from '../../../src/section/layout-types.ts'
import { mateFacets } from '../../../src/section/outline.ts'
import type { SectionSpec } from '../../../src/section/types.ts'
import { hardPreps } from './preps.ts'

const tan = (degrees: number) => Math.tan((degrees * Math.PI) / 180)
const tolerances = { includedAngle: '+10 −5°', rootOpening: '+1.6 −3.2 mm', rootFace: '±1.6 mm' }

/** As the plain text takes room, and as inputs in an edge card would. */
const rooms: Record<string, LayoutOptions['labelSize']> = {
  text: labelSize,
  inputs: () => ({ width: 92, height: 46 }),
}
const joints: Record<string, SectionSpec['joint']> = {
  'one plate': undefined,
  'same opposite': { mate: 'same', rootOpening: 2 },
  'square opposite, closed': { mate: 'square', rootOpening: 0 },
}

interface Case {
  readonly name: string
  readonly spec: SectionSpec
  readonly layout: SectionLayout
  readonly width: number
}

/** A prep alone and in joints, with text and with inputs, from a phone's width up. */
function casesOf(plate: SectionSpec): Case[] {
  return Object.entries(joints).flatMap(([where, joint]) =>
    Object.entries(rooms).flatMap(([room, size]) =>
      [300, 358, 720].map((width): Case => {
        const spec = { ...plate, joint }
        const dimensions = dimensionsOf(spec, { tolerances, squareAngles: room === 'inputs' })
        const layout = layoutSection(spec, dimensions, { width, plateHeight: 190, labelSize: size })
        return { name: `${where}, ${room}, ${width} px`, spec, layout, width }
      }),
    ),
  )
}

const meet = (a: Box, b: Box) =>
  a.x < b.x + b.width && b.x < a.x + a.width && a.y < b.y + b.height && b.y < a.y + a.height

describe.each(Object.entries(hardPreps))('%s', (_, plate) => {
  const cases = casesOf(plate)

  it('keeps labels apart and on the drawing', () => {
    for (const { name, layout, width } of cases) {
      expect(layout.labels.length).toBeGreaterThan(0)
      for (const [i, label] of layout.labels.entries()) {
        for (const other of layout.labels.slice(i + 1)) {
          expect(meet(label, other), `${name}: ${label.dimension.id} on ${other.dimension.id}`).toBe(false)
        }
        expect(label.x).toBeGreaterThanOrEqual(0)
        expect(label.y).toBeGreaterThanOrEqual(0)
        expect(label.x + label.width).toBeLessThanOrEqual(width + 1e-9)
        expect(label.y + label.height).toBeLessThanOrEqual(layout.height)
      }
    }
  })

  it('draws every wall at its tilt and depth, at one scale', () => {
    for (const { spec, layout } of cases) {
      const byPlate = { left: spec.facets, right: mateFacets(spec) }
      for (const { plate, facet, tilt, from, to } of layout.facets) {
        const facets = byPlate[plate]
        const height = facets[facet]!.depth - (facets[facet - 1]?.depth ?? 0)
        expect(to.y - from.y).toBeCloseTo(height * layout.scale, 6)
        const outward = plate === 'left' ? to.x - from.x : from.x - to.x
        expect(outward).toBeCloseTo(height * tan(tilt) * layout.scale, 6)
      }
    }
  })

  it('stays within its height and width', () => {
    for (const { spec, layout, width } of cases) {
      expect(layout.scale * spec.thickness).toBeLessThanOrEqual(190 + 1e-9)
      for (const { x } of layout.facets.flatMap(({ from, to }) => [from, to])) {
        expect(x).toBeGreaterThanOrEqual(0)
        expect(x).toBeLessThanOrEqual(width)
      }
    }
  })

  it('leaves the root opening between the plates', () => {
    for (const { spec, layout } of cases) {
      expect(layout.plates).toHaveLength(spec.joint ? 2 : 1)
      if (!spec.joint) continue
      const xs = (plate: 'left' | 'right') =>
        layout.facets.filter((facet) => facet.plate === plate).flatMap(({ from, to }) => [from.x, to.x])
      const gap = Math.min(...xs('right')) - Math.max(...xs('left'))
      expect(gap).toBeCloseTo(spec.joint.rootOpening * layout.scale, 6)
    }
  })
})

describe('arcs', () => {
  const layoutOf = (spec: SectionSpec) =>
    layoutSection(spec, dimensionsOf(spec), { width: 360, plateHeight: 190, labelSize })
  const degrees = ({ from, to }: { from: number; to: number }) => (Math.abs(to - from) * 180) / Math.PI

  it('span the angle from vertical on one plate', () => {
    expect(layoutOf(hardPreps['bevel with root face']!).arcs.map(degrees)).toEqual([expect.closeTo(30, 9)])
    expect(layoutOf(hardPreps['inward 5°']!).arcs.map(degrees)).toEqual([expect.closeTo(5, 9)])
    expect(layoutOf(hardPreps['square']!).arcs).toEqual([])
  })

  it('span the groove angle between both walls, ends on the walls', () => {
    const spec: SectionSpec = {
      ...hardPreps['bevel with root face']!,
      joint: { mate: 'same', rootOpening: 2 },
    }
    const layout = layoutOf(spec)
    const arc = layout.arcs[0]!
    expect(degrees(arc)).toBeCloseTo(60, 9)
    const end = {
      x: arc.centre.x + arc.radius * Math.cos(arc.from),
      y: arc.centre.y + arc.radius * Math.sin(arc.from),
    }
    const wall = layout.facets.find(({ plate, facet }) => plate === 'left' && facet === 0)!
    const share = (end.y - wall.from.y) / (wall.to.y - wall.from.y)
    expect(share).toBeGreaterThan(0)
    expect(share).toBeLessThan(1)
    expect(end.x).toBeCloseTo(wall.from.x + share * (wall.to.x - wall.from.x), 6)
  })
})

describe('standard scales', () => {
  it('takes the largest that fits and names it', () => {
    const spec = hardPreps['bevel with root face']!
    const layout = layoutSection(spec, dimensionsOf(spec), {
      width: 340,
      plateHeight: 150,
      labelSize,
      standardScale: true,
    })
    // 25 mm at 1 : 1 is 94.5 CSS px (96 px to the inch), at 2 : 1 it would be 189, over the 150 allowed.
    expect(layout.scaleText).toBe('1 : 1')
    expect(layout.scale * 25).toBeCloseTo(94.488, 3)
  })
})
