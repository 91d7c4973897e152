import { edgeKey } from '../../../shared/walls/names.ts'
import type { EdgeRef } from '../../../shared/walls/types.ts'
import type { EdgeLabel } from '../types.ts'

/** Texts that the picture can carry; more would be neither readable nor quick. */
export const LABEL_CAP = 60

export type LabelTone = 'selected' | 'breach' | 'plain'

export interface ChosenLabel extends EdgeLabel {
  readonly key: string
  readonly tone: LabelTone
}

/** The labels worth showing, most important first: selected, then breached, then by length of edge. */
export function chooseLabels(
  labels: readonly EdgeLabel[],
  selection: readonly EdgeRef[],
  breached: readonly EdgeRef[],
  lengthOf: (key: string) => number,
  cap = LABEL_CAP,
): ChosenLabel[] {
  const selectedKeys = new Set(selection.map(edgeKey))
  const breachedKeys = new Set(breached.map(edgeKey))
  const rank = { selected: 0, breach: 1, plain: 2 } as const
  return labels
    .map((label) => {
      const key = edgeKey(label.edge)
      const tone: LabelTone = selectedKeys.has(key) ? 'selected' : breachedKeys.has(key) ? 'breach' : 'plain'
      return { ...label, key, tone, length: lengthOf(key) }
    })
    .sort((a, b) => rank[a.tone] - rank[b.tone] || b.length - a.length)
    .slice(0, cap)
    .map(({ edge, text, key, tone }) => ({ edge, text, key, tone }))
}
