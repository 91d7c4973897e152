import * as z from 'zod'
import { saveSetupBody, type SaveSetup } from '../../../../shared/api/setups.ts'

/**
 * What a person typed and has not saved, kept in the browser so that a reload, a crash or a lost session
 * costs nothing. A draft names the revision it was begun on.
 */
const keptSchema = z.strictObject({
  format: z.literal(1),
  draft: z.strictObject({
    setupId: z.string(),
    person: z.string(),
    revision: z.int(),
    version: z.int(),
    keptAt: z.number().describe('milliseconds since 1970'),
    content: saveSetupBody,
  }),
})

export interface Draft {
  readonly setupId: string
  readonly person: string
  readonly revision: number
  /** Version of the set-up that it was begun on: what a save must name. */
  readonly version: number
  readonly keptAt: number
  readonly content: SaveSetup
}

/** Longest wait from a keystroke to the draft being kept, ms. */
export const DRAFT_WITHIN_MS = 2_000

type Store = Pick<Storage, 'getItem' | 'setItem' | 'removeItem'>

/** Drafts belong to a person: two people at one browser do not meet each other's. */
function keyOf(setupId: string, person: string): string {
  return `undercant.draft.${setupId}.${person}`
}

/** True when the draft is safe; false when the browser has no room or forbids storage. */
export function keepDraft(store: Store, draft: Draft): boolean {
  try {
    store.setItem(keyOf(draft.setupId, draft.person), JSON.stringify({ format: 1, draft }))
    return true
  } catch {
    return false
  }
}

/** The kept draft, or null when there is none or it cannot be read (then it is removed). */
export function findDraft(store: Store, setupId: string, person: string): Draft | null {
  const key = keyOf(setupId, person)
  try {
    const text = store.getItem(key)
    if (text === null) return null
    const read = keptSchema.safeParse(JSON.parse(text))
    const draft = read.data?.draft
    if (draft?.setupId === setupId && draft.person === person) return draft
  } catch {
    // unreadable: fall through and remove it
  }
  dropDraft(store, setupId, person)
  return null
}

export function dropDraft(store: Store, setupId: string, person: string): void {
  try {
    store.removeItem(keyOf(setupId, person))
  } catch {
    // storage is forbidden: nothing was kept either
  }
}

/** `14:02:11`, in the person's own time. */
export function clockText(milliseconds: number): string {
  const at = new Date(milliseconds)
  return [at.getHours(), at.getMinutes(), at.getSeconds()].map((n) => String(n).padStart(2, '0')).join(':')
}
