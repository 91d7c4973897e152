import { createHash } from 'node:crypto'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { Part } from '../../shared/api/parts.ts'
import type { Revision, RevisionRow, Setup } from '../../shared/api/setups.ts'
import { expectStatus, ifMatch, makeHead, makeSetup, PASSWORD, saveBody } from '../support/app.ts'
import { startShop, type Shop } from '../support/shop.ts'

let app: Shop['app']
let part: Shop['part']
let head: Shop['head']
let programmer: Shop['programmer']
let engineer: Shop['engineer']

beforeAll(async () => {
  ;({ app, part, head, programmer, engineer } = await startShop('setups'))
})
afterAll(() => app.close())

const fresh = () => makeSetup(app, part.id, head.id)
const path = (setup: Setup, act = '') => `/api/setups/${setup.id}${act}`
const hashOf = (setup: Setup) => ({ hash: setup.revision.hash })
const submit = (setup: Setup, by = programmer) =>
  expectStatus<Setup>(200, by.post(path(setup, '/submit')).set(ifMatch(setup)).send(hashOf(setup)))
const approval = (setup: Setup) => ({ ...hashOf(setup), password: PASSWORD })
const approve = (setup: Setup, by = engineer) =>
  expectStatus<Setup>(200, by.post(path(setup, '/approve')).set(ifMatch(setup)).send(approval(setup)))
const save = (setup: Setup, tilt: number) =>
  expectStatus<Setup>(200, programmer.put(path(setup)).set(ifMatch(setup)).send(saveBody(setup, tilt)))

describe('a new set-up', () => {
  it('takes profile from the part, limits and jet from the head, and is square', async () => {
    const setup = await fresh()
    const { content } = setup.revision
    expect(setup).toMatchObject({ state: 'draft', version: 1, approvedRevision: null, partId: part.id })
    expect(content.loops).toEqual(part.loops)
    expect(content.part).toEqual({
      id: part.id,
      number: part.number,
      name: part.name,
      drawingSha256: part.drawing.sha256,
    })
    expect(content.head).toEqual({ id: head.id, name: head.name, mechanicalLimit: 60, workingLimit: null })
    expect(content.jet).toEqual(head.jet)
    expect([content.walls, content.joints, content.datum]).toEqual([[], [], 'top'])
  })

  it('needs a part and a head that exist', async () => {
    const body = { partId: part.id, headId: part.id, name: 'x', plate: { material: 'S355', thickness: 20 } }
    await expectStatus(404, programmer.post('/api/setups').send(body))
    await expectStatus(
      404,
      programmer.post('/api/setups').send({ ...body, partId: head.id, headId: head.id }),
    )
  })
})

describe('saving', () => {
  it('writes a revision each time and leaves the ones before as they were', async () => {
    const first = await fresh()
    const second = await save(first, 30)
    const third = await save(second, 0)
    expect(third.revision.number).toBe(3)
    expect(third.version).toBe(3)
    const { items } = await expectStatus<{ items: RevisionRow[] }>(
      200,
      programmer.get(path(first, '/revisions')),
    )
    expect(items.map(({ number, state, hash }) => [number, state, hash])).toEqual([
      [3, 'draft', third.revision.hash],
      [2, 'superseded', second.revision.hash],
      [1, 'superseded', first.revision.hash],
    ])
    const again = await expectStatus<Revision>(200, programmer.get(path(first, '/revisions/2')))
    expect(again.content).toEqual(second.revision.content)
    // Saved with the same content as the first: the same hash, though another revision.
    expect(third.revision.hash).toBe(first.revision.hash)
  })

  it('refuses an old version and shows what is there now', async () => {
    const setup = await fresh()
    const now = await save(setup, 10)
    const { status, body } = await programmer.put(path(setup)).set(ifMatch(setup)).send(saveBody(setup, 20))
    expect(status).toBe(412)
    expect(body.error.code).toBe('version-stale')
    expect(body.error.details.current).toEqual(now)
  })

  it('copies the limits of the head as they are then', async () => {
    const own = await makeHead(app)
    const setup = await makeSetup(app, part.id, own.id)
    const limit = { workingLimit: 47, reason: 'cut coupons' }
    await expectStatus(200, engineer.put(`/api/heads/${own.id}/working-limit`).set(ifMatch(own)).send(limit))
    const saved = await save(setup, 10)
    expect(saved.revision.content.head.workingLimit).toBe(47)
    const first = await expectStatus<Revision>(200, programmer.get(path(setup, '/revisions/1')))
    expect(first.content.head.workingLimit).toBeNull()
  })

  it('does not let a body set what is the server’s: part, loops, state, approval, version', async () => {
    const setup = await fresh()
    for (const extra of [
      { loops: [] },
      { part: setup.revision.content.part },
      { state: 'approved' },
      { approvedRevision: 1 },
      { version: 7 },
      { head: setup.revision.content.head },
      { savedBy: app.ids.engineer },
    ]) {
      const body = { ...saveBody(setup, 10), ...extra }
      await expectStatus(400, programmer.put(path(setup)).set(ifMatch(setup)).send(body))
    }
  })

  it('refuses what has no sound meaning, and says where', async () => {
    const setup = await fresh()
    const facets = [{ depth: 20, tilt: 10 }]
    for (const change of [
      { walls: [{ loop: 0, edge: 99, facets }] },
      { walls: [{ loop: 7, edge: 0, facets }] },
      {
        walls: [
          { loop: 0, edge: 1, facets },
          { loop: 0, edge: 1, facets },
        ],
      },
      { walls: [{ loop: 0, edge: 0, facets: [{ depth: 12, tilt: 10 }] }] },
      { joints: [{ loop: 0, edge: 99, label: 'J1', rootOpening: 2, mate: 'same' }] },
    ]) {
      const body = { ...saveBody(setup, 0), ...change }
      const answer = await programmer.put(path(setup)).set(ifMatch(setup)).send(body)
      expect(answer.status).toBe(400)
      expect(answer.body.error.code).toBe('unusable-geometry')
    }
    expect((await expectStatus<Setup>(200, programmer.get(path(setup)))).version).toBe(1)
  })
})

describe('what is approved', () => {
  it('is byte for byte what was hashed, and stays so', async () => {
    const setup = await approve(await submit(await save(await fresh(), 30)))
    expect(setup).toMatchObject({ state: 'approved', approvedRevision: 2 })
    const content = async () => {
      const answer = await engineer.get(path(setup, '/revisions/2/content')).buffer(true).responseType('blob')
      expect(answer.status).toBe(200)
      return answer.body as Buffer
    }
    const bytes = await content()
    expect(createHash('sha256').update(bytes).digest('hex')).toBe(setup.revision.hash)
    expect(JSON.parse(bytes.toString('utf8'))).toEqual(setup.revision.content)
    const approved = setup.revision.decisions.at(-1)
    expect(approved).toMatchObject({
      kind: 'approved',
      hash: setup.revision.hash,
      by: { id: app.ids.engineer },
    })
    // Renaming the part, moving the head's limits and saving anew change nothing of it.
    const renamed = { name: 'Renamed since' }
    const now = await expectStatus<Part>(200, engineer.get(`/api/parts/${part.id}`))
    await expectStatus(200, engineer.patch(`/api/parts/${part.id}`).set(ifMatch(now)).send(renamed))
    const next = await save(setup, 15)
    expect(next).toMatchObject({ state: 'draft', approvedRevision: 2 })
    expect(next.revision).toMatchObject({ number: 3, decisions: [] })
    expect(await content()).toEqual(bytes)
    const kept = await expectStatus<Revision>(200, engineer.get(path(setup, '/revisions/2')))
    expect(kept.state).toBe('approved')
  })

  it('survives text that needs care: accents, quotes, line ends, other alphabets', async () => {
    const setup = await fresh()
    const note = 'ø12 "±0,5"\r\n\t漢字 🌊 \u2028 \\ </script> e\u0301'
    const body = { ...saveBody(setup, 5), note }
    const saved = await expectStatus<Setup>(200, programmer.put(path(setup)).set(ifMatch(setup)).send(body))
    const answer = await engineer.get(path(setup, '/revisions/2/content')).buffer(true).responseType('blob')
    expect(
      createHash('sha256')
        .update(answer.body as Buffer)
        .digest('hex'),
    ).toBe(saved.revision.hash)
    expect(JSON.parse((answer.body as Buffer).toString('utf8')).note).toBe(note)
  })

  it('cannot be changed in the database either', async () => {
    const setup = await submit(await fresh())
    const { dataSource } = app.services
    for (const statement of [
      'UPDATE setup_revisions SET content = ? WHERE setup_id = ?',
      'UPDATE decisions SET reason = ? WHERE setup_id = ?',
    ]) {
      await expect(dataSource.query(statement, ['{}', setup.id])).rejects.toThrow(/written once/)
    }
    await expect(dataSource.query('DELETE FROM decisions WHERE setup_id = ?', [setup.id])).rejects.toThrow(
      /once/,
    )
  })
})

describe('a decision', () => {
  it('is refused without being the right step, and nothing moves', async () => {
    const draft = await fresh()
    const early = await engineer.post(path(draft, '/approve')).set(ifMatch(draft)).send(approval(draft))
    expect([early.status, early.body.error.code]).toEqual([409, 'wrong-state'])
    const submitted = await submit(draft)
    const twice = await programmer
      .post(path(draft, '/submit'))
      .set(ifMatch(submitted))
      .send(hashOf(submitted))
    expect([twice.status, twice.body.error.code]).toEqual([409, 'wrong-state'])
    expect((await expectStatus<Setup>(200, engineer.get(path(draft)))).version).toBe(submitted.version)
  })

  it('must name the hash of what is there', async () => {
    const setup = await fresh()
    const other = { hash: '0'.repeat(64) }
    for (const [act, body, agent] of [
      ['/submit', other, programmer],
      ['/approve', { ...other, password: PASSWORD }, engineer],
      ['/return', { ...other, reason: 'no' }, engineer],
    ] as const) {
      const current = act === '/submit' ? setup : await expectStatus<Setup>(200, engineer.get(path(setup)))
      const answer = await agent.post(path(setup, act)).set(ifMatch(current)).send(body)
      expect([answer.status, answer.body.error.code]).toEqual([409, 'hash-mismatch'])
      if (act === '/submit') await submit(setup)
    }
  })

  it('is not for the one who submitted, though an engineer', async () => {
    const setup = await submit(await fresh(), engineer)
    const own = await engineer.post(path(setup, '/approve')).set(ifMatch(setup)).send(approval(setup))
    expect([own.status, own.body.error.code]).toEqual([403, 'own-submission'])
    const other = await approve(setup, await app.as('engineer2'))
    expect(other.state).toBe('approved')
  })

  it('asks for the password again, and makes those wait who guess', async () => {
    const setup = await submit(await fresh())
    const agent = await app.as('engineer2')
    const guess = { ...hashOf(setup), password: 'not this one' }
    for (let i = 0; i < 10; i += 1) {
      const answer = await agent.post(path(setup, '/approve')).set(ifMatch(setup)).send(guess)
      expect([answer.status, answer.body.error.code]).toEqual([403, 'wrong-password'])
    }
    const late = await agent.post(path(setup, '/approve')).set(ifMatch(setup)).send(approval(setup))
    expect([late.status, late.body.error.code]).toEqual([429, 'too-many-attempts'])
    expect((await approve(setup)).state).toBe('approved')
  })

  it('sends back with a reason; the next save starts afresh', async () => {
    const setup = await submit(await fresh())
    const body = { ...hashOf(setup), reason: 'Root face is missing on e1' }
    const returned = await expectStatus<Setup>(
      200,
      engineer.post(path(setup, '/return')).set(ifMatch(setup)).send(body),
    )
    expect(returned.state).toBe('returned')
    expect(returned.revision.decisions.at(-1)).toMatchObject({ kind: 'returned', reason: body.reason })
    const noReason = { ...body, reason: ' ' }
    await expectStatus(400, engineer.post(path(setup, '/return')).set(ifMatch(setup)).send(noReason))
    const next = await save(returned, 5)
    expect(next.state).toBe('draft')
  })

  it('is taken back by saving over a submission, and the record says so', async () => {
    const setup = await save(await submit(await fresh()), 12)
    expect(setup.state).toBe('draft')
    const before = await expectStatus<Revision>(200, engineer.get(path(setup, '/revisions/1')))
    expect(before.decisions.map(({ kind }) => kind)).toEqual(['submitted', 'withdrawn'])
    const { items } = await expectStatus<{ items: { submittedBy: unknown }[] }>(
      200,
      engineer.get('/api/setups').query({ q: setup.name }),
    )
    expect(items[0]?.submittedBy).toBeNull()
  })

  it('is refused while a finding stops the set-up', async () => {
    const setup = await save(await fresh(), 75)
    const answer = await programmer.post(path(setup, '/submit')).set(ifMatch(setup)).send(hashOf(setup))
    expect([answer.status, answer.body.error.code]).toEqual([409, 'has-stop-findings'])
    const codes = answer.body.error.details.findings.map((finding: { code: string }) => finding.code)
    expect(codes).toContain('edge-over-mechanical-limit')
  })
})
