import { createHash } from 'node:crypto'
import type { EntityManager } from 'typeorm'
import type { Head as HeadAnswer } from '../../../shared/api/heads.ts'
import type { Part as PartAnswer } from '../../../shared/api/parts.ts'
import type { Evaluation } from '../../../shared/evaluate/schema.ts'
import { canonicalText } from '../../../shared/setup/canonical.ts'
import { evaluationRequestOf, setupContentSchema, type SetupContent } from '../../../shared/setup/schema.ts'
import { SetupRevision } from '../../db/entities/setup-revision.ts'
import { notFound, Refusal } from '../../http/refusal.ts'
import type { Services } from '../../services.ts'

/** What a person decides about a set-up; the rest of its content is the server's to write. */
export type Choices = Pick<SetupContent, 'plate' | 'jet' | 'datum' | 'walls' | 'joints' | 'note'>

/** Part, profile and limits are copied in, so that a later change elsewhere cannot change what is approved. */
export function contentOf(part: PartAnswer, head: HeadAnswer, choices: Choices): SetupContent {
  return {
    format: 1,
    part: { id: part.id, number: part.number, name: part.name, drawingSha256: part.drawing.sha256 },
    plate: choices.plate,
    head: {
      id: head.id,
      name: head.name,
      mechanicalLimit: head.mechanicalLimit,
      workingLimit: head.workingLimit,
    },
    jet: choices.jet,
    datum: choices.datum,
    loops: part.loops,
    walls: choices.walls,
    joints: choices.joints,
    note: choices.note,
  }
}

/** Text as it is stored and hashed. */
export function sealed(content: SetupContent): { readonly text: string; readonly hash: string } {
  const text = canonicalText(content)
  return { text, hash: hashOf(text) }
}

export function hashOf(text: string): string {
  return createHash('sha256').update(text, 'utf8').digest('hex')
}

/** Stored text back into content. */
export function contentFrom(text: string): SetupContent {
  return setupContentSchema.parse(JSON.parse(text))
}

/** A set-up that has no sound meaning is refused before it is saved. */
export async function checkSound(services: Services, content: SetupContent): Promise<void> {
  await services.evaluator.evaluate(evaluationRequestOf(content))
  const seen = new Set<string>()
  for (const { loop, edge } of content.joints) {
    if (edge >= (content.loops[loop]?.length ?? 0)) {
      throw new Refusal('unusable-geometry', 'A joint names an edge that the part does not have.', {
        details: { loop, edge },
      })
    }
    if (seen.has(`${loop}-${edge}`)) {
      throw new Refusal('unusable-geometry', 'Two joints name the same edge.', { details: { loop, edge } })
    }
    seen.add(`${loop}-${edge}`)
  }
}

export async function findRevision(
  manager: EntityManager,
  setupId: string,
  number: number,
): Promise<SetupRevision> {
  const revision = await manager.findOneBy(SetupRevision, { setupId, number })
  if (!revision) throw notFound('This revision')
  return revision
}

/** The server's own evaluation of what is stored. */
export async function evaluateRevision(services: Services, revision: SetupRevision): Promise<Evaluation> {
  return services.evaluator.evaluate(evaluationRequestOf(contentFrom(revision.content)))
}
