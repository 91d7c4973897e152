import { describe, expect, it } from 'vitest'
import {
  facetsOf,
  inThickness,
  jointOf,
  shared,
  withFacets,
  withJoint,
  withThickness,
  withTilt,
} from '../../../src/features/bench/model/walls.ts'
import { content } from './fixtures.ts'

const edge = (at: number) => ({ loop: 0, edge: at })

describe('walls of the content', () => {
  it('reads an unnamed edge as square through the whole plate', () => {
    expect(facetsOf(content, edge(1))).toEqual([{ depth: 25, tilt: 0 }])
    expect(facetsOf(content, edge(2))).toEqual([{ depth: 25, tilt: -15 }])
  })

  it('changes only the edges named and leaves square walls out', () => {
    const changed = withFacets(content, [edge(2), edge(1)], (facets, { edge: at }) =>
      withTilt(facets, 0, at === 2 ? 0 : 45),
    )
    expect(changed.walls.map((wall) => wall.edge)).toEqual([0, 1])
    expect(facetsOf(changed, edge(2))).toEqual([{ depth: 25, tilt: 0 }])
  })

  it('is the same value when nothing changes', () => {
    expect(withFacets(content, [edge(2)], (facets) => withTilt(facets, 0, -15))).toBe(content)
  })

  it('keeps root faces in another thickness; the bevels share the rest', () => {
    const double = [
      { depth: 10, tilt: 30 },
      { depth: 15, tilt: 0 },
      { depth: 25, tilt: -30 },
    ]
    expect(inThickness(double, 45)).toEqual([
      { depth: 20, tilt: 30 },
      { depth: 25, tilt: 0 },
      { depth: 45, tilt: -30 },
    ])
  })

  it('shrinks all alike where a plate is thinner than its root faces', () => {
    expect(
      inThickness(
        [
          { depth: 5, tilt: 30 },
          { depth: 25, tilt: 0 },
        ],
        10,
      ),
    ).toEqual([
      { depth: 2, tilt: 30 },
      { depth: 10, tilt: 0 },
    ])
  })

  it('ends every wall at the new thickness', () => {
    const thicker = withThickness(content, 40)
    expect(thicker.walls.map(({ facets }) => facets.at(-1)!.depth)).toEqual([40, 40])
    expect(thicker.walls[0]!.facets[0]).toEqual({ depth: 34, tilt: 30 })
  })

  it('tells one shared value from mixed ones', () => {
    expect(shared([30, 30])).toEqual({ mixed: false, value: 30 })
    expect(shared([30, 45])).toEqual({ mixed: true })
    expect(shared([])).toEqual({ mixed: true })
  })

  it('makes, changes and removes joints', () => {
    const made = withJoint(content, [edge(2), edge(0)], (joint) => ({
      ...joint,
      label: 'J4',
      rootOpening: 3,
    }))
    expect(made.joints.map((joint) => joint.edge)).toEqual([0, 2])
    expect(jointOf(made, edge(2))).toMatchObject({ label: 'J4', rootOpening: 3, mate: 'same' })
    expect(withJoint(made, [edge(0)], () => null).joints).toHaveLength(1)
  })
})
