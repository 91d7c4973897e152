import { createHash } from 'node:crypto'
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { canonicalText, type Json } from '../../../shared/setup/canonical.ts'
import { content } from './content.ts'

const SEED = 20261201

describe('canonical text', () => {
  it('sorts keys, writes no spaces, leaves out what is undefined', () => {
    expect(canonicalText({ b: [1, { z: null, a: 'ü"' }], a: undefined, A: 0.1 })).toBe(
      '{"A":0.1,"b":[1,{"a":"ü\\"","z":null}]}',
    )
  })

  it('gives −0 and 0 one text, and refuses what JSON cannot hold', () => {
    expect(canonicalText(-0)).toBe('0')
    for (const wrong of [Number.NaN, Infinity, -Infinity])
      expect(() => canonicalText([wrong])).toThrow('finite')
  })

  it('reads back to the same value, bit for bit, and is the same whatever the order of keys', () => {
    fc.assert(
      fc.property(fc.jsonValue({ maxDepth: 4 }), (value) => {
        const json = value as Json
        const text = canonicalText(json)
        expect(JSON.parse(text)).toEqual(JSON.parse(JSON.stringify(value)))
        expect(canonicalText(shuffled(json))).toBe(text)
      }),
      { seed: SEED },
    )
  })

  it('keeps every bit of a number', () => {
    fc.assert(
      fc.property(fc.double({ noNaN: true, noDefaultInfinity: true }), (value) => {
        expect(Number(canonicalText(value))).toBe(value === 0 ? 0 : value)
      }),
      { seed: SEED },
    )
  })

  it('hashes the same on the server and in a browser', async () => {
    const text = canonicalText(content())
    const server = createHash('sha256').update(text, 'utf8').digest('hex')
    const browser = await crypto.subtle.digest('SHA-256', new TextEncoder().encode(text))
    expect(Buffer.from(browser).toString('hex')).toBe(server)
  })
})

function shuffled(value: Json): Json {
  if (Array.isArray(value)) return value.map((item: Json) => shuffled(item))
  if (value === null || typeof value !== 'object') return value
  return Object.fromEntries(
    Object.entries(value)
      .reverse()
      .map(([key, item]) => [key, shuffled(item as Json)]),
  )
}
