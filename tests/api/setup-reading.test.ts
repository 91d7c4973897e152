import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { Setup } from '../../shared/api/setups.ts'
import { expectStatus, ifMatch, makePart, makeSetup, saveBody } from '../support/app.ts'
import { startShop, type Shop } from '../support/shop.ts'

let app: Shop['app']
let part: Shop['part']
let head: Shop['head']
let programmer: Shop['programmer']

beforeAll(async () => {
  ;({ app, part, head, programmer } = await startShop('setup_reading'))
})
afterAll(() => app.close())

const fresh = () => makeSetup(app, part.id, head.id)
const path = (setup: Setup, act = '') => `/api/setups/${setup.id}${act}`
const save = (setup: Setup, tilt: number) =>
  expectStatus<Setup>(200, programmer.put(path(setup)).set(ifMatch(setup)).send(saveBody(setup, tilt)))

describe('what a revision gives away', () => {
  it('is the server’s own evaluation, bound to the hash', async () => {
    const setup = await save(await fresh(), 30)
    const answer = await expectStatus<{
      hash: string
      evaluation: { edges: { loop: number; edge: number; bottomOffset: number }[] }
    }>(200, (await app.as('welder')).get(path(setup, '/revisions/2/evaluation')))
    expect(answer.hash).toBe(setup.revision.hash)
    // Plate thickness times the tangent of the tilt: 20 mm × tan 30°.
    const edge = answer.evaluation.edges.find(({ loop, edge }) => loop === 0 && edge === 0)
    expect(edge?.bottomOffset).toBeCloseTo(20 * Math.tan(Math.PI / 6), 9)
  })

  it('downloads as attachments with names that are safe', async () => {
    const setup = await save(await fresh(), 30)
    for (const [file, type, start] of [
      ['contours.dxf', 'application/dxf', '999\n'],
      ['edges.csv', 'text/csv; charset=utf-8', 'Edge,'],
    ] as const) {
      const answer = await programmer
        .get(path(setup, `/revisions/2/${file}`))
        .buffer(true)
        .responseType('blob')
      expect(answer.status).toBe(200)
      expect(answer.headers['content-type']).toBe(type)
      expect(answer.headers['content-disposition']).toMatch(
        /^attachment; filename="T-\d+ r2\.\w+"; filename\*=UTF-8''/,
      )
      expect(answer.headers['x-content-type-options']).toBe('nosniff')
      expect((answer.body as Buffer).toString('utf8').replaceAll('\r', '')).toContain(start)
    }
    await expectStatus(404, programmer.get(path(setup, '/revisions/9/edges.csv')))
    await expectStatus(400, programmer.get(path(setup, '/revisions/0')))
  })
})

describe('the list', () => {
  it('filters, sorts and pages', async () => {
    const own = await makePart(app)
    const names = ['B list', 'A list', 'C list']
    for (const name of names) {
      const body = { partId: own.id, headId: head.id, name, plate: { material: 'S355', thickness: 8 } }
      await expectStatus(201, programmer.post('/api/setups').send(body))
    }
    type Rows = { items: { name: string; thickness: number; partNumber: string }[]; total: number }
    const list = (query: object) =>
      expectStatus<Rows>(200, programmer.get('/api/setups').query({ partId: own.id, ...query }))
    const byName = await list({ sort: 'name', pageSize: 2 })
    expect(byName.total).toBe(3)
    expect(byName.items.map(({ name }) => name)).toEqual(['A list', 'B list'])
    expect(byName.items[0]).toMatchObject({ thickness: 8, partNumber: own.number })
    expect((await list({ sort: '-name', page: 2, pageSize: 2 })).items.map(({ name }) => name)).toEqual([
      'A list',
    ])
    expect((await list({ q: 'b li' })).total).toBe(1)
    expect((await list({ state: 'approved' })).total).toBe(0)
    expect((await list({ q: own.number, sort: 'savedAt' })).total).toBe(3)
  })
})
