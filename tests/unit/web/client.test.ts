// @vitest-environment jsdom
import { afterEach, describe, expect, it, vi } from 'vitest'
import { call, urlOf } from '../../../src/api/client.ts'
import { ApiError, messageOf, NetworkError } from '../../../src/api/errors.ts'
import { shouldRetry } from '../../../src/api/query-client.ts'
import { answerGate, watchGate } from '../../../src/api/sign-in-gate.ts'

const id = '0b0e7a52-6a0f-4d39-9a53-4a3f2f3c1d11'

function json(status: number, body: unknown): Response {
  return new Response(JSON.stringify(body), { status, headers: { 'content-type': 'application/json' } })
}
const refusal = (status: number, code: string, message = 'Do this instead.') =>
  json(status, { error: { code, message, requestId: 'r-1', details: { limit: 2 } } })

/** Answers each request in turn and keeps what was asked. */
function serve(...answers: (Response | Error | DOMException)[]) {
  const asked: { url: string; init: RequestInit }[] = []
  vi.stubGlobal('fetch', (url: string, init: RequestInit) => {
    asked.push({ url, init })
    const answer = answers.shift()
    if (answer === undefined) throw new Error(`unexpected request ${url}`)
    return answer instanceof Response ? Promise.resolve(answer) : Promise.reject(answer)
  })
  return asked
}
const headerOf = (init: RequestInit, name: string) => new Headers(init.headers).get(name)

afterEach(() => vi.unstubAllGlobals())

describe('the address of a route', () => {
  it('fills parameters in, encoded, and leaves empty filters out', () => {
    expect(urlOf('getRevision', { params: { id, revision: 3 } })).toBe(`/api/setups/${id}/revisions/3`)
    expect(urlOf('listParts', { query: { q: 'a&b', page: 2, sort: undefined } })).toBe(
      '/api/parts?q=a%26b&page=2',
    )
    expect(urlOf('listParts', { query: { q: '' } })).toBe('/api/parts')
    expect(urlOf('endSession', { params: { id: '../x' } })).toBe('/api/sessions/..%2Fx')
  })
})

describe('a call', () => {
  it('sends method, JSON and the version that it changes', async () => {
    const asked = serve(json(200, { id }))
    await call('updatePart', { params: { id }, body: { name: 'Gusset' }, ifMatch: 7 })
    expect(asked[0]?.url).toBe(`/api/parts/${id}`)
    expect(asked[0]?.init.method).toBe('PATCH')
    expect(asked[0]?.init.body).toBe('{"name":"Gusset"}')
    expect(headerOf(asked[0]!.init, 'if-match')).toBe('"7"')
  })

  it('gives nothing for 204 and a Blob for a download', async () => {
    serve(new Response(null, { status: 204 }), new Response('e1;30', { status: 200 }))
    expect(await call('signOut', {})).toBeUndefined()
    const file = await call('revisionEdges', { params: { id, revision: 1 } })
    expect(await file.text()).toBe('e1;30')
  })

  it('throws what the server refused, with its code and request id', async () => {
    serve(refusal(412, 'version-stale'))
    const error: unknown = await call('updatePart', { params: { id }, body: {}, ifMatch: 1 }).catch(
      (e: unknown) => e,
    )
    expect(error).toBeInstanceOf(ApiError)
    expect(error).toMatchObject({
      status: 412,
      code: 'version-stale',
      message: 'Do this instead.',
      requestId: 'r-1',
      details: { limit: 2 },
    })
  })

  it.each([
    ['a page of a proxy', new Response('<html>Bad gateway</html>', { status: 502 })],
    ['an error of another shape', json(500, { error: 'oops' })],
    ['a code that is not ours', refusal(400, 'surprise')],
    ['a lost connection', new TypeError('Failed to fetch')],
    ['half an answer', new Response('{"items": [', { status: 200 })],
  ])('takes %s for no answer', async (_, answer) => {
    serve(answer)
    await expect(call('listHeads', {})).rejects.toBeInstanceOf(NetworkError)
  })

  it('passes an abort on as it is', async () => {
    serve(new DOMException('stopped', 'AbortError'))
    await expect(call('listHeads', {})).rejects.toMatchObject({ name: 'AbortError' })
  })
})

describe('a write that got no answer', () => {
  it('is sent once more under the same key, so that it is done once', async () => {
    const asked = serve(new TypeError('reset'), json(201, { id }))
    await call('createSetup', {
      body: { partId: id, headId: id, name: 'A', plate: { material: 'S355', thickness: 25 } },
    })
    const keys = asked.map(({ init }) => headerOf(init, 'idempotency-key'))
    expect(keys[0]).toMatch(/^[0-9a-f]{32}$/)
    expect(keys).toEqual([keys[0], keys[0]])
  })

  it('is not repeated without a key', async () => {
    const asked = serve(new TypeError('reset'))
    await expect(call('updatePart', { params: { id }, body: {}, ifMatch: 1 })).rejects.toBeInstanceOf(
      NetworkError,
    )
    expect(asked).toHaveLength(1)
  })
})

describe('a session that ended in mid-work', () => {
  it('asks once for all calls, then repeats each', async () => {
    const opened: boolean[] = []
    const unwatch = watchGate((open) => opened.push(open))
    const asked = serve(
      refusal(401, 'not-signed-in'),
      refusal(401, 'not-signed-in'),
      json(200, { name: 'first' }),
      json(200, { name: 'second' }),
    )
    const both = Promise.all([call('getHead', { params: { id } }), call('getHead', { params: { id } })])
    await vi.waitFor(() => expect(opened).toHaveLength(2))
    answerGate(true)
    expect((await both).map(({ name }) => name).sort()).toEqual(['first', 'second'])
    expect(asked).toHaveLength(4)
    expect(opened.at(-1)).toBe(false)
    unwatch()
  })

  it('fails when the person would rather not sign in', async () => {
    const unwatch = watchGate((open) => {
      if (open) queueMicrotask(() => answerGate(false))
    })
    serve(refusal(401, 'not-signed-in'))
    await expect(call('getHead', { params: { id } })).rejects.toMatchObject({ code: 'not-signed-in' })
    unwatch()
  })

  it('does not ask while finding out who is signed in, nor for a wrong password', async () => {
    const opened: boolean[] = []
    const unwatch = watchGate((open) => opened.push(open))
    serve(refusal(401, 'not-signed-in'), refusal(401, 'wrong-sign-in'))
    await expect(call('whoAmI', {})).rejects.toBeInstanceOf(ApiError)
    await expect(call('signIn', { body: { email: 'a', password: 'b' } })).rejects.toBeInstanceOf(ApiError)
    expect(opened).toEqual([])
    unwatch()
  })
})

describe('retries of a read', () => {
  it('never repeats a refusal, and repeats a lost connection twice', () => {
    expect(shouldRetry(0, new ApiError(404, 'not-found', '', ''))).toBe(false)
    expect(shouldRetry(0, new ApiError(503, 'database-away', '', ''))).toBe(true)
    expect([0, 1, 2].map((n) => shouldRetry(n, new NetworkError()))).toEqual([true, true, false])
  })
})

it('shows no inner words of a bug to people', () => {
  expect(messageOf(new TypeError('x is undefined'))).not.toContain('undefined')
})
