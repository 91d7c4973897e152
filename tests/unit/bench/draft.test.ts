import { describe, expect, it } from 'vitest'
import { clockText, dropDraft, findDraft, keepDraft } from '../../../src/features/bench/model/draft.ts'
import { content } from './fixtures.ts'

function memory(broken = false) {
  const items = new Map<string, string>()
  return {
    items,
    getItem: (key: string) => items.get(key) ?? null,
    setItem: (key: string, value: string) => {
      if (broken) throw new Error('no room')
      items.set(key, value)
    },
    removeItem: (key: string) => void items.delete(key),
  }
}

const draft = { setupId: 's1', person: 'p1', revision: 7, version: 9, keptAt: 1_772_460_131_000, content }

describe('kept drafts', () => {
  it('gives back what was kept', () => {
    const store = memory()
    expect(keepDraft(store, draft)).toBe(true)
    expect(findDraft(store, 's1', 'p1')).toEqual(draft)
  })

  it('keeps two set-ups and two people apart', () => {
    const store = memory()
    keepDraft(store, draft)
    expect(findDraft(store, 's2', 'p1')).toBeNull()
    expect(findDraft(store, 's1', 'p2')).toBeNull()
  })

  it('is gone once dropped', () => {
    const store = memory()
    keepDraft(store, draft)
    dropDraft(store, 's1', 'p1')
    expect(findDraft(store, 's1', 'p1')).toBeNull()
  })

  it('removes what cannot be read, and says when there is no room', () => {
    const store = memory()
    keepDraft(store, draft)
    const [key] = store.items.keys()
    store.items.set(key!, '{"format":1,"content":{}}')
    expect(findDraft(store, 's1', 'p1')).toBeNull()
    expect(store.items.size).toBe(0)
    store.items.set(key!, 'not json')
    expect(findDraft(store, 's1', 'p1')).toBeNull()
    expect(keepDraft(memory(true), draft)).toBe(false)
  })

  it('shows its time to the second', () => {
    expect(clockText(new Date(2026, 2, 2, 9, 2, 5).getTime())).toBe('09:02:05')
  })
})
