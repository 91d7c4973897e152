import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { Setup } from '../../shared/api/setups.ts'
import { expectStatus, ifMatch, makeSetup, saveBody } from '../support/app.ts'
import { startShop, type Shop } from '../support/shop.ts'

let app: Shop['app']
let setup: Setup
let programmer: Shop['programmer']

beforeAll(async () => {
  const shop = await startShop('drafts')
  ;({ app, programmer } = shop)
  setup = await makeSetup(app, shop.part.id, shop.head.id)
})
afterAll(() => app.close())

const path = () => `/api/setups/${setup.id}/draft`
const draftOf = (tilt: number) => ({ revision: 1, version: setup.version, content: saveBody(setup, tilt) })

describe('unsaved changes on the server', () => {
  it('are kept, overwritten, given back and forgotten', async () => {
    expect(await expectStatus(200, programmer.get(path()))).toEqual({ draft: null })
    await expectStatus(200, programmer.put(path()).send(draftOf(20)))
    const { keptAt } = await expectStatus<{ keptAt: string }>(200, programmer.put(path()).send(draftOf(33)))
    const { draft } = await expectStatus<{ draft: object }>(200, programmer.get(path()))
    expect(draft).toEqual({ ...draftOf(33), keptAt })
    await expectStatus(204, programmer.delete(path()))
    expect(await expectStatus(200, programmer.get(path()))).toEqual({ draft: null })
  })

  it('belong to one person, and saving needs no draft', async () => {
    await expectStatus(200, programmer.put(path()).send(draftOf(12)))
    const engineer = await app.as('engineer')
    expect(await expectStatus(200, engineer.get(path()))).toEqual({ draft: null })
    await expectStatus(403, (await app.as('welder')).get(path()))
    const next = await expectStatus<Setup>(
      200,
      engineer.put(`/api/setups/${setup.id}`).set(ifMatch(setup)).send(saveBody(setup, 40)),
    )
    // The draft still names the version that it was begun on, so that a save of it meets the conflict.
    const { draft } = await expectStatus<{ draft: { version: number } }>(200, programmer.get(path()))
    expect(draft.version).toBe(next.version - 1)
  })

  it('are refused where they make no sense, and leave the last sound one', async () => {
    await expectStatus(400, programmer.put(path()).send({ ...draftOf(1), version: 0 }))
    await expectStatus(400, programmer.put(path()).send({ revision: 1, version: 1, content: {} }))
    await expectStatus(
      404,
      programmer.put('/api/setups/00000000-0000-4000-8000-000000000000/draft').send(draftOf(1)),
    )
    const { draft } = await expectStatus<{ draft: object }>(200, programmer.get(path()))
    expect(draft).toMatchObject(draftOf(12))
  })

  it('leave no trace in the record', async () => {
    const before = await expectStatus<{ total: number }>(200, (await app.as('engineer')).get('/api/audit'))
    await expectStatus(200, programmer.put(path()).send(draftOf(7)))
    const after = await expectStatus<{ total: number }>(200, (await app.as('engineer')).get('/api/audit'))
    expect(after.total).toBe(before.total)
  })
})
