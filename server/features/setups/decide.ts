import type { EntityManager } from 'typeorm'
import type { CurrentUser } from '../../../shared/api/people.ts'
import type { Setup as SetupAnswer, SetupState } from '../../../shared/api/setups.ts'
import { Decision } from '../../db/entities/decision.ts'
import { Setup } from '../../db/entities/setup.ts'
import type { SetupRevision } from '../../db/entities/setup-revision.ts'
import type { HandlersOf } from '../../http/call.ts'
import { claimVersion } from '../../http/claim.ts'
import { Refusal } from '../../http/refusal.ts'
import type { Services } from '../../services.ts'
import { confirmPassword } from '../people/confirm.ts'
import { appendToRecord } from '../record/audit.ts'
import { evaluateRevision, findRevision, hashOf } from './content.ts'
import { findSetup, presentSetup } from './present.ts'

/** From which state a decision leads to which, what it is called in the record, and what it declares. */
const steps = {
  submitted: {
    from: 'draft',
    action: 'setup.submit',
    meaning: 'I ask for approval of exactly this content.',
  },
  approved: {
    from: 'submitted',
    action: 'setup.approve',
    meaning: 'I have checked exactly this content and approve it for cutting.',
  },
  returned: {
    from: 'submitted',
    action: 'setup.return',
    meaning: 'I do not approve this content; the reason says what to change.',
  },
} as const satisfies Partial<Record<SetupState, { from: SetupState; action: string; meaning: string }>>

type Step = keyof typeof steps

export const decisionHandlers: HandlersOf<'submitSetup' | 'approveSetup' | 'returnSetup'> = {
  submitSetup: async (call) => {
    const seen = await see(call, 'submitted')
    await refuseStops(call.services, seen)
    return call.write((manager) => decide(manager, call, 'submitted', call.body.remark ?? ''))
  },

  /** Everything is looked at first, so that a password is asked for only when an approval is possible. */
  approveSetup: async (call) => {
    const seen = await see(call, 'approved')
    await refuseStops(call.services, seen)
    await confirmPassword(call.services, call.user, call.body.password)
    return call.write((manager) => decide(manager, call, 'approved', call.body.remark ?? ''))
  },

  returnSetup: (call) => call.write((manager) => decide(manager, call, 'returned', call.body.reason)),
}

interface Asked {
  readonly services: Services
  readonly user: CurrentUser
  readonly params: { readonly id: string }
  readonly version: number
  readonly body: { readonly hash: string }
}

/** Looks before the transaction: what takes long must not hold the record's lock. `decide` checks it all again. */
async function see({ services, user, params, version, body }: Asked, step: Step): Promise<SetupRevision> {
  const { manager } = services.dataSource
  const setup = await findSetup(manager, params.id)
  if (setup.version !== version) {
    throw new Refusal('version-stale', 'Someone else changed this meanwhile. Look at it again.', {
      details: { current: await presentSetup(manager, setup.id) },
    })
  }
  const revision = await findRevision(manager, setup.id, setup.revision)
  refuseWrongStep(setup, revision, user, step, body.hash)
  return revision
}

/** One step of the state machine, in the caller's transaction. */
async function decide(
  manager: EntityManager,
  { user, params, version, body }: Asked,
  step: Step,
  reason: string,
): Promise<SetupAnswer> {
  const { id } = params
  await claimVersion(manager, Setup, { id, version }, () => presentSetup(manager, id))
  const setup = await findSetup(manager, id)
  const revision = await findRevision(manager, id, setup.revision)
  refuseWrongStep(setup, revision, user, step, body.hash)
  const at = new Date()
  const { action, meaning } = steps[step]
  const { number, hash } = revision
  await manager.insert(Decision, {
    setupId: id,
    revision: number,
    kind: step,
    by: user.id,
    at,
    reason,
    meaning,
    hash,
  })
  await manager.update(
    Setup,
    { id },
    {
      state: step,
      ...(step === 'submitted' ? { submittedBy: user.id, submittedAt: at } : {}),
      ...(step === 'approved' ? { approvedRevision: number } : {}),
    },
  )
  await appendToRecord(manager, user, {
    action,
    subject: { kind: 'setup', id, label: setup.name },
    details: { revision: number, hash, reason, meaning },
  })
  return presentSetup(manager, id)
}

function refuseWrongStep(
  setup: Setup,
  revision: SetupRevision,
  user: CurrentUser,
  step: Step,
  hash: string,
): void {
  const { from } = steps[step]
  if (setup.state !== from) {
    throw new Refusal(
      'wrong-state',
      `This is possible for a set-up that is ${from}; this one is ${setup.state}.`,
      {
        details: { state: setup.state, needed: from },
      },
    )
  }
  if (step === 'approved' && setup.submittedBy === user.id) {
    throw new Refusal('own-submission', 'You submitted this yourself. Another engineer has to approve it.')
  }
  if (hash !== revision.hash) {
    throw new Refusal(
      'hash-mismatch',
      'The content is not the one you looked at. Look at it again, then decide.',
      {
        details: { hash: revision.hash },
      },
    )
  }
  // What is stored must still be what was hashed when it was saved.
  if (hashOf(revision.content) !== revision.hash)
    throw new Error(`Revision ${setup.id}/${revision.number} is damaged`)
}

async function refuseStops(services: Services, revision: SetupRevision): Promise<void> {
  const { findings } = await evaluateRevision(services, revision)
  const stops = findings.filter((finding) => finding.severity === 'stop')
  if (stops.length > 0) {
    throw new Refusal(
      'has-stop-findings',
      `The set-up cannot be cut as it is (${stops.length} ${stops.length === 1 ? 'finding stops' : 'findings stop'} it). Cure them first.`,
      { details: { findings: stops } },
    )
  }
}
