import { describe, expect, it } from 'vitest'
import {
  parallelTo,
  rangeBetween,
  sameLength,
  sameLoop,
  smoothChain,
  stepEdge,
  toggleEdge,
} from '../../../src/features/bench/model/edges.ts'
import { ell, lineLoop, slot } from './fixtures.ts'

const loops = [ell, slot]
const keys = (edges: readonly { loop: number; edge: number }[]) =>
  edges.map(({ loop, edge }) => `${loop}-${edge}`)
const edge = (loop: number, at: number) => ({ loop, edge: at })

describe('picking many edges from one', () => {
  it('takes every edge of the loops that are touched', () => {
    expect(keys(sameLoop(loops, [edge(1, 2)]))).toEqual(['1-0', '1-1', '1-2', '1-3'])
  })

  it('takes edges of the same length over all loops, arcs by their arc length', () => {
    expect(keys(sameLength(loops, [edge(0, 0)]))).toEqual(['0-0', '0-5'])
    expect(keys(sameLength(loops, [edge(1, 1)]))).toEqual(['1-1', '1-3'])
  })

  it('takes parallel straight edges whichever way they run, and no arcs', () => {
    expect(keys(parallelTo(loops, [edge(0, 1)]))).toEqual(['0-1', '0-3', '0-5', '1-0', '1-2'])
    expect(parallelTo(loops, [edge(1, 1)])).toEqual([])
  })

  it('follows a smooth chain round both ways and stops at a corner', () => {
    expect(keys(smoothChain(loops, [edge(1, 0)]))).toEqual(['1-0', '1-1', '1-2', '1-3'])
    expect(keys(smoothChain(loops, [edge(0, 0)]))).toEqual(['0-0'])
    const split = lineLoop([
      [0, 0],
      [50, 0],
      [90, 0],
      [90, 40],
      [0, 40],
    ])
    expect(keys(smoothChain([split], [edge(0, 0)]))).toEqual(['0-0', '0-1'])
    expect(keys(smoothChain([split], [edge(0, 1)]))).toEqual(['0-0', '0-1'])
  })

  it('takes a range in profile order, whichever end came first', () => {
    expect(keys(rangeBetween(loops, edge(1, 0), edge(0, 4)))).toEqual(['0-4', '0-5', '1-0'])
    expect(keys(rangeBetween(loops, edge(9, 9), edge(0, 4)))).toEqual(['0-4'])
  })

  it('steps round from the last edge to the first and back', () => {
    expect(stepEdge(loops, edge(1, 3), 1)).toEqual(edge(0, 0))
    expect(stepEdge(loops, edge(0, 0), -1)).toEqual(edge(1, 3))
    expect(stepEdge(loops, null, 1)).toEqual(edge(0, 0))
    expect(stepEdge(loops, null, -1)).toEqual(edge(1, 3))
    expect(stepEdge([], null, 1)).toBeNull()
  })

  it('adds and takes away by toggling', () => {
    expect(keys(toggleEdge([edge(0, 1)], edge(0, 2)))).toEqual(['0-1', '0-2'])
    expect(keys(toggleEdge([edge(0, 1), edge(0, 2)], edge(0, 1)))).toEqual(['0-2'])
  })
})
