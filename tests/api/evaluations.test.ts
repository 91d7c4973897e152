import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { evaluationSchema, type Evaluation } from '../../shared/evaluate/schema.ts'
import { type Agent, expectStatus, startApp, type TestApp } from '../support/app.ts'

let app: TestApp
let welder: Agent
beforeAll(async () => {
  app = await startApp('evaluations')
  welder = await app.as('welder')
})
afterAll(() => app.close())

const square = [
  [0, 0],
  [100, 0],
  [100, 100],
  [0, 100],
].map(([x, y]) => ({ x, y }))
const plate = { thickness: 20 }
const evaluate = (body: object, agent = welder) => agent.post('/api/evaluations').send(body)

describe('an evaluation', () => {
  it('moves the bottom edge by thickness × tan(tilt), for anyone signed in', async () => {
    const walls = [{ loop: 0, edge: 0, facets: [{ depth: 20, tilt: 30 }] }]
    const answer = await expectStatus<Evaluation>(200, evaluate({ plate, loops: [square], walls }))
    expect(evaluationSchema.safeParse(answer).success).toBe(true)
    expect(answer.edges[0]?.bottomOffset).toBeCloseTo(20 * Math.tan(Math.PI / 6), 9)
    expect(answer.edges[1]?.bottomOffset).toBeCloseTo(0, 12)
    expect(answer.contours.map(({ depth }) => depth)).toEqual([0, 20])
    expect(answer.firstEvent).toBeNull()
  })

  it('stores nothing', async () => {
    const count = async () => {
      const [row] = await app.services.dataSource.query('SELECT last_id FROM audit_chain')
      return row.last_id
    }
    const before = await count()
    await expectStatus(200, evaluate({ plate, loops: [square], walls: [] }))
    expect(await count()).toBe(before)
  })

  it('of a large outline runs beside the others and equals its own small kind', async () => {
    const sides = 1_200
    const ring = Array.from({ length: sides }, (_, i) => ({
      x: 300 * Math.cos((2 * Math.PI * i) / sides),
      y: 300 * Math.sin((2 * Math.PI * i) / sides),
    }))
    const walls = ring.map((_, edge) => ({ loop: 0, edge, facets: [{ depth: 20, tilt: -20 }] }))
    const large = evaluate({ plate, loops: [ring], walls })
    const [answer] = await Promise.all([
      expectStatus<Evaluation>(200, large),
      expectStatus(200, evaluate({ plate, loops: [square], walls: [] })),
    ])
    expect(answer.edges).toHaveLength(sides)
    expect(answer.edges[7]?.bottomOffset).toBeCloseTo(-20 * Math.tan(Math.PI / 9), 9)
  })

  it('of what has no meaning is refused with the place, in either size', async () => {
    const walls = [{ loop: 0, edge: 4, facets: [{ depth: 20, tilt: 30 }] }]
    const small = await evaluate({ plate, loops: [square], walls })
    expect([small.status, small.body.error.code]).toEqual([400, 'unusable-geometry'])
    expect(small.body.error.details).toMatchObject({ loop: 0, edge: 4 })
    const ring = Array.from({ length: 600 }, (_, i) => ({
      x: Math.cos(i / 95) * 90,
      y: Math.sin(i / 95) * 90,
    }))
    const wrong = [{ loop: 0, edge: 600, facets: [{ depth: 20, tilt: 30 }] }]
    const large = await evaluate({ plate, loops: [ring], walls: wrong })
    expect([large.status, large.body.error.code]).toEqual([400, 'unusable-geometry'])
  })

  it.each([
    ['no loops', { plate, loops: [], walls: [] }],
    ['a loop of one vertex', { plate, loops: [[{ x: 0, y: 0 }]], walls: [] }],
    ['no thickness', { plate: { thickness: 0 }, loops: [square], walls: [] }],
    [
      'a right angle',
      { plate, loops: [square], walls: [{ loop: 0, edge: 0, facets: [{ depth: 20, tilt: 90 }] }] },
    ],
    ['text for a number', { plate: { thickness: '20' }, loops: [square], walls: [] }],
    [
      'half an edge',
      { plate, loops: [square], walls: [{ loop: 0, edge: 0.5, facets: [{ depth: 20, tilt: 3 }] }] },
    ],
    ['no facets', { plate, loops: [square], walls: [{ loop: 0, edge: 0, facets: [] }] }],
    ['an unknown datum', { plate, loops: [square], walls: [], datum: 'middle' }],
    ['points far away', { plate, loops: [[{ x: 1e9, y: 0 }, ...square]], walls: [] }],
  ])('refuses %s', async (_, body) => {
    const answer = await evaluate(body)
    expect([answer.status, answer.body.error.code]).toEqual([400, 'invalid-request'])
  })
})

describe('how often', () => {
  it('a person may ask is 50 a second and one burst; then one is told to wait, and others are not hindered', async () => {
    const body = { plate, loops: [square], walls: [] }
    const engineer = await app.as('engineer')
    const started = performance.now()
    const answers = await Promise.all(Array.from({ length: 260 }, () => evaluate(body, engineer)))
    const seconds = (performance.now() - started) / 1000
    const served = answers.filter(({ status }) => status === 200).length
    const refused = answers.filter(({ status }) => status === 429)
    expect(served + refused.length).toBe(260)
    expect(served).toBeGreaterThanOrEqual(100)
    expect(served).toBeLessThanOrEqual(101 + 50 * seconds)
    for (const { body: answer, headers } of refused) {
      expect(answer.error.code).toBe('too-many-requests')
      expect(Number(headers['retry-after'])).toBeGreaterThan(0)
    }
    await expectStatus(200, evaluate(body))
  })
})
