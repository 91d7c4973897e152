import type { KeyboardEvent } from 'react'
import type { EdgeRef } from '../../../shared/walls/types.ts'
import type { Acts } from './model/store.ts'

interface Moves {
  /** The edges in the order in which they stand. */
  readonly edges: readonly EdgeRef[]
  /** Index of the one that the keyboard stands on. */
  readonly at: number
  readonly back: string
  readonly forth: string
  readonly acts: Acts
}

/** Edges a page key moves by. */
const PAGE = 10

/** Keys of a list with many selected, as the ARIA pattern has them: move, range, move alone, toggle, all, none. */
export function moveKeys(event: KeyboardEvent, { edges, at, back, forth, acts }: Moves): void {
  const held = event.ctrlKey || event.metaKey
  const last = edges.length - 1
  const target = targetOf(event.key)
  if (target !== null) {
    const edge = edges[Math.max(0, Math.min(last, target))]!
    if (event.shiftKey) acts.select(edge, 'range')
    else if (held) acts.stand(edge)
    else acts.select(edge, 'replace')
  } else if (event.key === ' ' || (event.key === 'Enter' && !held)) {
    const edge = edges[at]
    if (edge !== undefined) acts.select(edge, 'toggle')
  } else if (held && event.key.toLowerCase() === 'a') {
    acts.selectMany(edges)
  } else if (event.key === 'Escape') {
    acts.select(null, 'replace')
  } else return
  event.preventDefault()

  function targetOf(key: string): number | null {
    if (key === back) return at - 1
    if (key === forth) return at + 1
    if (key === 'PageUp') return at - PAGE
    if (key === 'PageDown') return at + PAGE
    if (key === 'Home') return 0
    if (key === 'End') return last
    return null
  }
}
