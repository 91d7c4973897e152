import { describe, expect, it } from 'vitest'
import * as bench from '../../../src/features/bench/model/state.ts'
import { withFacets, withTilt } from '../../../src/features/bench/model/walls.ts'
import { content, ell, setupOf, slot } from './fixtures.ts'

const loops = [ell, slot]
const start = () => bench.startBench(bench.baseOf(setupOf(content, 7)))
const present = (state: bench.BenchState) => state.history.present
const tilt = (edges: readonly { loop: number; edge: number }[], to: number) => (from: typeof content) =>
  withFacets(from, edges, (facets) => withTilt(facets, 0, to))

describe('the bench', () => {
  it('starts from the fields a person may change', () => {
    expect(bench.editableOf(setupOf(content, 7))).toEqual(content)
  })

  it('changes many edges as one step', () => {
    const edges = [0, 1, 2, 3].map((edge) => ({ loop: 0, edge }))
    const changed = bench.edit(start(), tilt(edges, 20))
    expect(present(changed).walls).toHaveLength(4)
    expect(present(bench.undone(changed))).toEqual(content)
  })

  it('keeps its steps over a save, and what was typed while it was on its way', () => {
    const sent = bench.edit(start(), tilt([{ loop: 0, edge: 1 }], 10))
    const typed = bench.edit(sent, tilt([{ loop: 0, edge: 1 }], 12))
    const after = bench.saved(typed, setupOf(present(sent), 8), present(sent))
    expect(after.base).toMatchObject({ version: 8, revision: 8, content: present(sent) })
    expect(present(after)).toBe(present(typed))
    expect(present(bench.undone(bench.undone(after)))).toEqual(content)
  })

  it('takes the other side as one step, so that one’s own is one step back', () => {
    const mine = bench.edit(start(), tilt([{ loop: 0, edge: 1 }], 10))
    const theirs = setupOf({ ...content, note: 'checked' }, 8)
    const taken = bench.tookTheirs(mine, theirs)
    expect(present(taken).note).toBe('checked')
    expect(taken.base.version).toBe(8)
    expect(present(bench.undone(taken))).toBe(present(mine))
  })

  it('puts one’s own on top of theirs', () => {
    const mine = bench.edit(start(), tilt([{ loop: 0, edge: 1 }], 10))
    const kept = bench.keptMine(mine, setupOf(content, 9))
    expect(kept.base.version).toBe(9)
    expect(present(kept)).toBe(present(mine))
  })

  it('goes on with a draft against the version it began on', () => {
    const draft = { ...content, note: 'kept' }
    const state = bench.continued(start(), draft, 5)
    expect(present(state)).toBe(draft)
    expect(state.base.version).toBe(5)
    expect(present(bench.undone(state))).toEqual(content)
  })

  it('selects one, adds, and takes a range from where it began', () => {
    let state = bench.select(start(), loops, { loop: 0, edge: 1 }, 'replace')
    state = bench.select(state, loops, { loop: 0, edge: 3 }, 'range')
    expect(state.selection.map(({ edge }) => edge)).toEqual([1, 2, 3])
    state = bench.select(state, loops, { loop: 0, edge: 0 }, 'range')
    expect(state.selection.map(({ edge }) => edge)).toEqual([0, 1])
    state = bench.select(state, loops, { loop: 0, edge: 0 }, 'toggle')
    expect(state.selection.map(({ edge }) => edge)).toEqual([1])
    expect(bench.select(state, loops, null, 'replace').selection).toEqual([])
  })

  it('remembers which fields are not understood', () => {
    const unclear = bench.understood(bench.understood(start(), 'angle', false), 'depth', false)
    expect([...unclear.unclear]).toEqual(['angle', 'depth'])
    expect([...bench.understood(unclear, 'angle', true).unclear]).toEqual(['depth'])
    expect(bench.understood(unclear, 'depth', false)).toBe(unclear)
  })
})
