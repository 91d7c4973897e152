import { AuditChain, AuditEntry } from './audit.ts'
import { Decision } from './decision.ts'
import { Drawing } from './drawing.ts'
import { Head } from './head.ts'
import { IdempotencyKey } from './idempotency-key.ts'
import { Part } from './part.ts'
import { Session } from './session.ts'
import { Setup } from './setup.ts'
import { SetupDraft } from './setup-draft.ts'
import { SetupRevision } from './setup-revision.ts'
import { SignInAttempt } from './sign-in-attempt.ts'
import { User } from './user.ts'

export const entities = [
  User,
  Session,
  SignInAttempt,
  Head,
  Drawing,
  Part,
  Setup,
  SetupRevision,
  SetupDraft,
  Decision,
  AuditEntry,
  AuditChain,
  IdempotencyKey,
]
