import { describe, expect, it } from 'vitest'
import type { SetupContent } from '../../../shared/setup/schema.ts'
import { gaugeSentence } from '../../../src/features/joint/gauge.ts'
import {
  allowed,
  angleRows,
  edgesWithPrep,
  jointEdgeOf,
  neighbours,
} from '../../../src/features/joint/joint-model.ts'
import { jointPath } from '../../../src/features/joint/joint-path.ts'
import { content } from '../setup/content.ts'

const joint = { label: 'J1', rootOpening: 2, mate: 'same' } as const
/** Four straight edges and a hole; e1 bevelled with a joint, e3 bevelled, e4 square with a joint. */
const setup: SetupContent = content({
  joints: [
    { loop: 0, edge: 3, ...joint, label: 'J2' },
    { loop: 0, edge: 0, ...joint },
  ],
})

describe('the edge of a joint page', () => {
  it('finds facets and joint, and takes an edge without a wall as square', () => {
    expect(jointEdgeOf(setup, { loop: 0, edge: 0 })).toMatchObject({ name: 'e1', joint: { label: 'J1' } })
    expect(jointEdgeOf(setup, { loop: 0, edge: 1 })).toMatchObject({
      facets: [{ depth: 20, tilt: 0 }],
      joint: null,
    })
    expect(jointEdgeOf(setup, { loop: 1, edge: 1 })!.name).toBe('h1.e2')
  })

  it('has no answer for an edge or a loop that the part lacks', () => {
    expect(jointEdgeOf(setup, { loop: 0, edge: 4 })).toBeNull()
    expect(jointEdgeOf(setup, { loop: 2, edge: 0 })).toBeNull()
  })

  it('lists bevelled edges and edges with a joint once each, in order', () => {
    expect(edgesWithPrep(setup).map(({ name }) => name)).toEqual(['e1', 'e3', 'e4'])
  })

  it('walks round the list, from an edge outside it too', () => {
    const edges = edgesWithPrep(setup)
    const names = (edge: number) => {
      const { previous, next } = neighbours(edges, { loop: 0, edge })
      return [previous?.name, next?.name]
    }
    expect(names(0)).toEqual(['e4', 'e3'])
    expect(names(3)).toEqual(['e3', 'e1'])
    expect(names(1)).toEqual(['e1', 'e3'])
    expect(neighbours(edges.slice(0, 1), { loop: 0, edge: 0 })).toEqual({ previous: null, next: null })
  })

  it('keeps to the revision when it turns to another edge', () => {
    expect(jointPath('abc', { loop: 0, edge: 3 }, 7)).toBe('/setups/abc/joint/0-3?rev=7')
  })
})

describe('angles three ways', () => {
  const facets = [
    { depth: 8, tilt: 37.5 },
    { depth: 12, tilt: 0 },
    { depth: 20, tilt: -30 },
  ]

  it('gives a row to each tilted facet; 37.5° from vertical is 52.5° from the face and 75° for two plates', () => {
    const rows = angleRows({ facets, joint: { loop: 0, edge: 0, ...joint } })
    expect(rows).toMatchObject([
      { where: 'upper bevel', fromVertical: 37.5, fromPlateFace: 52.5, included: 75 },
      { where: 'lower bevel', fromVertical: 30, fromPlateFace: 60, included: 60 },
    ])
  })

  it('halves the included angle against a square plate and leaves it out without a joint', () => {
    const square = { loop: 0, edge: 0, ...joint, mate: 'square' as const }
    expect(angleRows({ facets, joint: square })[0]!.included).toBe(37.5)
    expect(angleRows({ facets, joint: null })[0]!.included).toBeNull()
  })

  it('says which one a gauge reads', () => {
    const [row] = angleRows({ facets: [{ depth: 20, tilt: 30 }], joint: { loop: 0, edge: 0, ...joint } })
    expect(gaugeSentence(row!)).toBe(
      "A protractor laid on the plate's face reads 60° (or 120° from its other side); a gauge set into the fitted groove reads 60°.",
    )
  })
})

describe('bands', () => {
  it('never allows less than nothing', () => {
    expect(allowed(2, { plus: 1.6, minus: 3.2 })).toEqual({ from: 0, to: 3.6 })
    expect(allowed(60, { plus: 10, minus: 5 })).toEqual({ from: 55, to: 70 })
  })
})
