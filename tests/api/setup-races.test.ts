import fc from 'fast-check'
import { createHash } from 'node:crypto'
import { setTimeout as wait } from 'node:timers/promises'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { Revision, Setup, SetupState } from '../../shared/api/setups.ts'
import { firstBrokenEntry } from '../../server/features/record/audit.ts'
import { expectStatus, ifMatch, makeSetup, PASSWORD, saveBody } from '../support/app.ts'
import { startShop, type Shop } from '../support/shop.ts'

/** Two people at once, and any order of acts: the state machine holds, and nothing acknowledged is lost. */

const ROUNDS = 50
/** ms by which one of two comes first; the largest is more than an approval takes. */
const LEAD_STEP = 60

let app: Shop['app']
let part: Shop['part']
let head: Shop['head']
let programmer: Shop['programmer']
let engineer: Shop['engineer']

beforeAll(async () => {
  ;({ app, part, head, programmer, engineer } = await startShop('races'))
})
afterAll(async () => {
  expect(await firstBrokenEntry(app.services.dataSource.manager)).toBeNull()
  await app.close()
})

const read = (id: string) => expectStatus<Setup>(200, programmer.get(`/api/setups/${id}`))
const submit = (setup: Setup) =>
  expectStatus<Setup>(
    200,
    programmer.post(`/api/setups/${setup.id}/submit`).set(ifMatch(setup)).send({ hash: setup.revision.hash }),
  )

describe('two editors', () => {
  it(
    `save the same version at once: one wins, one is told, for ${ROUNDS} rounds`,
    { timeout: 180_000 },
    async () => {
      const { id, ...first } = await makeSetup(app, part.id, head.id)
      let { version } = first
      const second = await app.as('programmer2')
      for (let round = 1; round <= ROUNDS; round += 1) {
        const setup = await read(id)
        const saves = [programmer, second].map((agent, who) =>
          agent
            .put(`/api/setups/${id}`)
            .set(ifMatch(setup))
            .send(saveBody(setup, round / 10 + who)),
        )
        const answers = await Promise.all(saves)
        expect(answers.map(({ status }) => status).sort()).toEqual([200, 412])
        const winner = answers.find(({ status }) => status === 200)?.body as Setup
        const now = await read(id)
        expect(now).toEqual(winner)
        expect(now.version).toBe(version + 1)
        expect(now.revision.number).toBe(round + 1)
        version = now.version
      }
    },
  )
})

describe('approving against editing', () => {
  it(`approves what was hashed or nothing, for ${ROUNDS} rounds`, { timeout: 180_000 }, async () => {
    const { id } = await makeSetup(app, part.id, head.id)
    const outcomes = new Set<string>()
    for (let round = 1; round <= ROUNDS; round += 1) {
      const setup = await submit(await ensureDraft(id, round))
      const approve = () =>
        engineer
          .post(`/api/setups/${id}/approve`)
          .set(ifMatch(setup))
          .send({ hash: setup.revision.hash, password: PASSWORD })
      const edit = () => programmer.put(`/api/setups/${id}`).set(ifMatch(setup)).send(saveBody(setup, 20))
      // Who comes first changes from round to round, so that both outcomes are seen.
      const lead = ((round % 5) - 1) * LEAD_STEP
      const [approved, edited] = await Promise.all([
        wait(Math.max(0, -lead)).then(() => approve()),
        wait(Math.max(0, lead)).then(() => edit()),
      ])
      outcomes.add(approved.status === 200 ? 'approved' : 'edited')
      expect([approved.status, edited.status].filter((status) => status === 200)).toHaveLength(1)
      const now = await read(id)
      if (approved.status === 200) {
        expect(now).toMatchObject({ state: 'approved', approvedRevision: setup.revision.number })
        const bytes = await engineer
          .get(`/api/setups/${id}/revisions/${setup.revision.number}/content`)
          .responseType('blob')
        expect(
          createHash('sha256')
            .update(bytes.body as Buffer)
            .digest('hex'),
        ).toBe(setup.revision.hash)
      } else {
        expect([409, 412]).toContain(approved.status)
        expect(now.state).toBe('draft')
        const before = await expectStatus<Revision>(
          200,
          engineer.get(`/api/setups/${id}/revisions/${setup.revision.number}`),
        )
        expect(before.decisions.map(({ kind }) => kind)).toEqual(['submitted', 'withdrawn'])
      }
    }
    expect([...outcomes].sort()).toEqual(['approved', 'edited'])
  })

  async function ensureDraft(id: string, round: number): Promise<Setup> {
    const setup = await read(id)
    const body = saveBody(setup, 10 + round / 10)
    return expectStatus<Setup>(200, programmer.put(`/api/setups/${id}`).set(ifMatch(setup)).send(body))
  }
})

describe('many people on many set-ups at once', () => {
  it('lose no revision and leave the record whole', async () => {
    const setups = []
    for (let i = 0; i < 6; i += 1) setups.push(await makeSetup(app, part.id, head.id))
    const writers = setups.map(async (first) => {
      let setup = first
      for (let i = 1; i <= 8; i += 1) {
        const body = saveBody(setup, i)
        setup = await expectStatus<Setup>(
          200,
          programmer.put(`/api/setups/${setup.id}`).set(ifMatch(setup)).send(body),
        )
      }
      return setup
    })
    for (const setup of await Promise.all(writers)) expect(setup.revision.number).toBe(9)
  })
})

describe('the state machine', () => {
  /** What may happen, in our own words; the server must agree on every step and every refusal. */
  const allowed = {
    save: { draft: 'draft', submitted: 'draft', approved: 'draft', returned: 'draft' },
    submit: { draft: 'submitted' },
    approve: { submitted: 'approved' },
    return: { submitted: 'returned' },
  } as const satisfies Record<string, Partial<Record<SetupState, SetupState>>>
  type Act = keyof typeof allowed
  const acts = Object.keys(allowed) as Act[]

  function perform(act: Act, setup: Setup, hash: string, version: number) {
    const at = `/api/setups/${setup.id}`
    const tag = ifMatch({ version })
    switch (act) {
      case 'save':
        return programmer.put(at).set(tag).send(saveBody(setup, 7))
      case 'submit':
        return programmer.post(`${at}/submit`).set(tag).send({ hash })
      case 'approve':
        return engineer.post(`${at}/approve`).set(tag).send({ hash, password: PASSWORD })
      case 'return':
        return engineer.post(`${at}/return`).set(tag).send({ hash, reason: 'not yet' })
    }
  }

  const step = fc.record({
    act: fc.constantFrom(...acts),
    wrongHash: fc.integer({ min: 0, max: 9 }).map((n) => n === 0),
    stale: fc.integer({ min: 0, max: 9 }).map((n) => n === 0),
  })

  it('cannot be skipped, whatever the order of acts', { timeout: 180_000 }, async () => {
    await fc.assert(
      fc.asyncProperty(fc.array(step, { minLength: 1, maxLength: 12 }), async (steps) => {
        let setup = await makeSetup(app, part.id, head.id)
        let approved: number | null = null
        for (const { act, wrongHash, stale } of steps) {
          const next: SetupState | undefined = (allowed[act] as Partial<Record<SetupState, SetupState>>)[
            setup.state
          ]
          const hash = wrongHash ? 'f'.repeat(64) : setup.revision.hash
          const { status, body } = await perform(act, setup, hash, stale ? setup.version + 1 : setup.version)
          const hashMatters = act !== 'save'
          const expected = stale ? 412 : !next ? 409 : wrongHash && hashMatters ? 409 : 200
          expect(status).toBe(expected)
          const now = await read(setup.id)
          if (status === 200) {
            expect(body).toEqual(now)
            expect(now.state).toBe(next)
            expect(now.version).toBe(setup.version + 1)
            if (next === 'approved') approved = now.revision.number
          } else expect(now).toEqual(setup)
          expect(now.approvedRevision).toBe(approved)
          setup = now
        }
      }),
      { numRuns: 12, seed: 20_261_201 },
    )
  })
})
