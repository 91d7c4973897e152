import SwaggerParser from '@apidevtools/swagger-parser'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { evaluationRequestSchema, evaluationSchema } from '../../shared/evaluate/schema.ts'
import type { Route } from '../../shared/api/route.ts'
import { routes } from '../../shared/api/routes.ts'
import { expectStatus, startApp, type TestApp } from '../support/app.ts'

interface Document {
  openapi: string
  paths: Record<string, Record<string, Operation>>
  components: { securitySchemes: Record<string, unknown> }
}
interface Operation {
  operationId: string
  security: unknown[]
  responses: Record<string, unknown>
  parameters?: { name: string; in: string; required: boolean }[]
  requestBody?: { content: Record<string, { example?: unknown }> }
}

let app: TestApp
let document: Document
beforeAll(async () => {
  app = await startApp('openapi')
  document = await expectStatus<Document>(200, app.anyone().get('/api/openapi.json'))
})
afterAll(() => app.close())

describe('the description of the API', () => {
  it('is OpenAPI 3.1, sound by an independent validator', async () => {
    expect(document.openapi).toBe('3.1.0')
    await expect(SwaggerParser.validate(structuredClone(document) as never)).resolves.toBeDefined()
  })

  it('holds every route of the table with its success, and no other', () => {
    const described = Object.entries(document.paths).flatMap(([path, methods]) =>
      Object.entries(methods).map(([method, { operationId }]) => `${operationId} ${method} ${path}`),
    )
    const mounted = Object.entries(routes).map(([name, { method, path }]) => {
      return `${name} ${method} ${path.replace(/:(\w+)/g, '{$1}')}`
    })
    expect(described.sort()).toEqual(mounted.sort())
    for (const route of Object.values(routes) as Route[]) {
      const operation = document.paths[route.path.replace(/:(\w+)/g, '{$1}')]?.[route.method]
      expect(Object.keys(operation?.responses ?? {})).toContain(String(route.status))
    }
  })

  it('says where a session, a version and a key are sent', () => {
    expect(document.components.securitySchemes.session).toEqual({
      type: 'apiKey',
      in: 'cookie',
      name: 'undercant',
    })
    const save = document.paths['/api/setups/{id}']?.put
    expect(save?.security).toEqual([{ session: [] }])
    expect(save?.parameters).toContainEqual(
      expect.objectContaining({ name: 'If-Match', in: 'header', required: true }),
    )
    expect(Object.keys(save?.responses ?? {})).toEqual(
      expect.arrayContaining(['401', '403', '404', '412', '428']),
    )
    expect(document.paths['/api/session']?.post?.security).toEqual([])
  })

  it('carries an example of an evaluation that works as it stands', async () => {
    const body = document.paths['/api/evaluations']?.post?.requestBody
    const example = body?.content['application/json']?.example
    expect(evaluationRequestSchema.safeParse(example).success).toBe(true)
    const agent = await app.as('welder')
    const answer = await expectStatus(200, agent.post('/api/evaluations').send(example as object))
    expect(evaluationSchema.safeParse(answer).success).toBe(true)
  })
})
