import { createHash } from 'node:crypto'
import type { EntityManager } from 'typeorm'
import { IdempotencyKey } from '../db/entities/idempotency-key.ts'
import { Refusal } from './refusal.ts'

/** A write that its client may repeat: the key it chose, and what the request says. */
export interface IdempotentRequest {
  readonly key: string
  readonly fingerprint: string
}

const KEY = /^[\x21-\x7e]{8,200}$/
/** Never kept, not even hashed. */
const SECRET_FIELDS = new Set(['password', 'current', 'next'])

const sha256 = (data: string | Uint8Array) => createHash('sha256').update(data).digest('hex')

export function idempotentRequest(
  header: string | undefined,
  content: {
    readonly route: string
    readonly params: unknown
    readonly body: unknown
    readonly file?: Uint8Array
  },
): IdempotentRequest | null {
  if (header === undefined) return null
  if (!KEY.test(header)) {
    throw new Refusal('invalid-request', 'An Idempotency-Key has 8 to 200 plain characters without spaces.')
  }
  const { route, params, body, file } = content
  const text = JSON.stringify([route, params, body], (name, value: unknown) =>
    SECRET_FIELDS.has(name) ? undefined : value,
  )
  return { key: sha256(header), fingerprint: sha256(text + (file ? sha256(file) : '')) }
}

/** The answer given before under this key, or null; refuses a key that carried another request. */
export async function keptAnswer(
  manager: EntityManager,
  user: { readonly id: string },
  { key, fingerprint }: IdempotentRequest,
): Promise<{ readonly answer: unknown } | null> {
  const kept = await manager.findOneBy(IdempotencyKey, { userId: user.id, id: key })
  if (!kept) return null
  if (kept.fingerprint !== fingerprint) {
    throw new Refusal(
      'invalid-request',
      'This Idempotency-Key was used for another request. Choose a new one.',
    )
  }
  const answer: unknown = JSON.parse(kept.answer)
  return { answer: answer ?? undefined }
}

export async function keepAnswer(
  manager: EntityManager,
  user: { readonly id: string },
  { key, fingerprint }: IdempotentRequest,
  answer: unknown,
): Promise<void> {
  await manager.insert(IdempotencyKey, {
    userId: user.id,
    id: key,
    fingerprint,
    answer: JSON.stringify(answer ?? null),
    createdAt: new Date(),
  })
}
