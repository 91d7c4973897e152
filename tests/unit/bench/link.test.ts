import { describe, expect, it } from 'vitest'
import {
  MOST_EDGES_IN_LINK,
  readEdges,
  readRevision,
  writeEdges,
} from '../../../src/features/bench/model/link.ts'
import { ell, slot } from './fixtures.ts'

describe('a link to the bench', () => {
  it('names edges and reads them back', () => {
    const edges = [
      { loop: 0, edge: 1 },
      { loop: 1, edge: 3 },
    ]
    expect(writeEdges(edges)).toBe('0-1,1-3')
    expect(readEdges('0-1,1-3', [ell, slot])).toEqual(edges)
  })

  it('passes over what the profile does not have, what is twice and what is no edge', () => {
    expect(readEdges('0-1,0-99,7-0,x,0-1,', [ell])).toEqual([{ loop: 0, edge: 1 }])
    expect(readEdges(null, [ell])).toEqual([])
  })

  it('names none rather than too many', () => {
    const many = Array.from({ length: MOST_EDGES_IN_LINK + 1 }, (_, edge) => ({ loop: 0, edge }))
    expect(writeEdges(many)).toBeNull()
    expect(writeEdges([])).toBeNull()
  })

  it('reads a revision strictly', () => {
    expect(readRevision('7')).toBe(7)
    for (const text of [null, '', '0', '-1', '7.5', '07', 'x']) expect(readRevision(text)).toBeNull()
  })
})
