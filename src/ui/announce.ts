import { create } from 'zustand'

/** What the page's one live region says; `turn` lets the same words be said twice. */
export const useAnnouncement = create<{ text: string; turn: number }>(() => ({ text: '', turn: 0 }))

/** Says a short sentence to screen readers, politely: a selection that moved, a draft that was saved. */
export function announce(text: string): void {
  useAnnouncement.setState(({ turn }) => ({ text, turn: turn + 1 }))
}
