import { describe, expect, it } from 'vitest'
import type { Decision, Setup } from '../../../shared/api/setups.ts'
import { revisionText, revisionToShow, standingOf } from '../../../src/revision/standing.ts'

const person = { id: '7c0a9c66-0d0e-4a35-8f5b-7b8f0f5f6a03', name: 'Mara Holt' }
const decision = (kind: Decision['kind'], hash = 'h7'): Decision => ({
  kind,
  by: person,
  at: '2026-11-30T14:02:11.000Z',
  reason: kind === 'returned' ? 'The root face is missing.' : '',
  hash,
})
const setup = (newest: number, approvedRevision: number | null) =>
  ({ approvedRevision, revision: { number: newest } }) as Pick<Setup, 'approvedRevision' | 'revision'>
const revision = (number: number, decisions: Decision[], hash = 'h7') => ({ number, hash, decisions })

describe('how a revision stands', () => {
  it('is approved by a decision on exactly this content', () => {
    const standing = standingOf(revision(7, [decision('submitted'), decision('approved')]), setup(7, 7))
    expect(standing).toMatchObject({ approval: { by: person }, supersededBy: null, newerDraft: null })
  })

  it('is not approved by a decision on other content', () => {
    expect(standingOf(revision(7, [decision('approved', 'h6')]), setup(7, 7)).approval).toBeNull()
  })

  it('is not approved while submitted, nor when returned, and gives the reason', () => {
    expect(standingOf(revision(7, [decision('submitted')]), setup(7, null)).approval).toBeNull()
    const returned = standingOf(revision(7, [decision('submitted'), decision('returned')]), setup(7, null))
    expect(returned).toMatchObject({ approval: null, returned: { reason: 'The root face is missing.' } })
  })

  it('is superseded by a newer approved revision, though it was approved once', () => {
    const standing = standingOf(revision(5, [decision('approved')]), setup(8, 7))
    expect(standing).toMatchObject({ supersededBy: 7, newerDraft: null })
    expect(revisionText({ number: 5, state: 'approved' }, standing)).toBe('5 · superseded')
  })

  it('stays good beside a newer draft and tells of it', () => {
    const standing = standingOf(revision(7, [decision('approved')]), setup(9, 7))
    expect(standing).toMatchObject({ supersededBy: null, newerDraft: 9 })
  })
})

describe('which revision is shown', () => {
  it('is the one asked for, else the newest approved, else the newest', () => {
    expect(revisionToShow('3', setup(9, 7))).toBe(3)
    expect(revisionToShow(null, setup(9, 7))).toBe(7)
    expect(revisionToShow(null, setup(9, null))).toBe(9)
    expect(revisionToShow('0x3', setup(9, 7))).toBe(7)
  })
})
