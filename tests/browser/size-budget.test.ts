import fs from 'node:fs'
import path from 'node:path'
import { gzipSync } from 'node:zlib'
import { describe, expect, it } from 'vitest'

const web = path.resolve(import.meta.dirname, '../../dist/web')

interface Chunk {
  readonly file: string
  readonly isEntry?: boolean
  readonly imports?: readonly string[]
  readonly css?: readonly string[]
}

const manifest = JSON.parse(fs.readFileSync(path.join(web, '.vite/manifest.json'), 'utf8')) as Record<
  string,
  Chunk
>

/** Scripts that load together with a chunk: itself and all that it imports statically. */
function loadedWith(key: string, seen = new Set<string>()): Set<string> {
  const chunk = manifest[key]
  if (!chunk || seen.has(key)) return seen
  seen.add(key)
  for (const other of chunk.imports ?? []) loadedWith(other, seen)
  return seen
}

function zippedKilobytes(keys: Iterable<string>): number {
  let bytes = 0
  for (const key of keys) bytes += gzipSync(fs.readFileSync(path.join(web, manifest[key]!.file))).length
  return bytes / 1000
}

const entry = Object.keys(manifest).find((key) => manifest[key]!.isEntry)!
const first = loadedWith(entry)

/** Budgets of the product's own quality goals, kB gzipped. */
describe('size of what a browser loads', () => {
  it('keeps the first route within 170 kB', () => {
    expect(first.size).toBeGreaterThan(0)
    expect(zippedKilobytes(first)).toBeLessThanOrEqual(170)
  })

  it('keeps the viewer, loaded when needed, within 300 kB', () => {
    const viewer = Object.keys(manifest).find((key) => /^src\/viewer\//.test(key))
    expect(viewer).toBeDefined()
    const own = [...loadedWith(viewer!)].filter((key) => !first.has(key))
    expect(zippedKilobytes(own)).toBeLessThanOrEqual(300)
  })
})
