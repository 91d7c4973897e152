import type { Head } from '../../../../shared/api/heads.ts'
import type { SaveSetup } from '../../../../shared/api/setups.ts'
import type { EvaluationRequest } from '../../../../shared/evaluate/schema.ts'
import { canonicalText } from '../../../../shared/setup/canonical.ts'
import { evaluationRequestOf, type HeadSnapshot, type SetupContent } from '../../../../shared/setup/schema.ts'

const texts = new WeakMap<SaveSetup, string>()

function textOf(content: SaveSetup): string {
  let text = texts.get(content)
  if (text === undefined) {
    text = canonicalText(content)
    texts.set(content, text)
  }
  return text
}

/** Whether two contents would be saved as the same text. */
export function sameContent(a: SaveSetup, b: SaveSetup): boolean {
  return a === b || textOf(a) === textOf(b)
}

/** Limits that count: the head's own record of today, as the server will copy it; else what was copied last. */
export function headOf(stored: HeadSnapshot, heads: readonly Head[], headId: string): HeadSnapshot {
  const head = heads.find(({ id }) => id === headId)
  if (head === undefined) return { ...stored, id: headId }
  const { id, name, mechanicalLimit, workingLimit } = head
  return { id, name, mechanicalLimit, workingLimit }
}

/** The whole content that the server would write from what is on the bench. */
export function wholeContent(stored: SetupContent, content: SaveSetup, head: HeadSnapshot): SetupContent {
  const { plate, jet, datum, walls, joints, note } = content
  return { ...stored, head, plate, jet, datum, walls, joints, note }
}

/** Only what the evaluation depends on, so that a change of a note asks nothing. */
export function requestOf(
  stored: SetupContent,
  content: Pick<SaveSetup, 'plate' | 'jet' | 'datum' | 'walls'>,
  head: HeadSnapshot,
): EvaluationRequest {
  return evaluationRequestOf({ ...stored, ...content, head })
}
