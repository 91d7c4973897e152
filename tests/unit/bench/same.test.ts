import { expect, it } from 'vitest'
import { sameValue } from '../../../src/features/bench/model/same.ts'
import { content } from './fixtures.ts'

it('compares values, not references or the order of keys', () => {
  expect(sameValue(content, structuredClone(content))).toBe(true)
  expect(sameValue({ a: 1, b: [2] }, { b: [2], a: 1 })).toBe(true)
  expect(sameValue({ a: 1, b: undefined }, { a: 1 })).toBe(true)
})

it('sees a difference at any depth', () => {
  const changed = structuredClone(content)
  changed.walls[0]!.facets[0]!.tilt += 1e-12
  expect(sameValue(content, changed)).toBe(false)
  expect(sameValue([1, 2], [1])).toBe(false)
  expect(sameValue([], {})).toBe(false)
  expect(sameValue(null, {})).toBe(false)
})
