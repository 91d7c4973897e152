import express from 'express'
import { createServer, type Server } from 'node:http'
import fs from 'node:fs'
import os from 'node:os'
import path from 'node:path'
import request from 'supertest'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { serveWeb } from '../../server/http/web.ts'

let folder: string
let server: Server
const script = `console.log('${'tide '.repeat(500)}')`
beforeAll(() => {
  folder = fs.mkdtempSync(path.join(os.tmpdir(), 'undercant-web-'))
  fs.mkdirSync(path.join(folder, 'web/assets'), { recursive: true })
  fs.writeFileSync(path.join(folder, 'web/index.html'), '<!doctype html><title>Undercant</title>')
  fs.writeFileSync(path.join(folder, 'web/assets/app-1a2b3c.js'), script)
  fs.writeFileSync(path.join(folder, 'web/assets/mono-1a2b3c.woff2'), Buffer.from([1, 2, 3]))
  fs.writeFileSync(path.join(folder, 'secret.js'), 'not for anyone')
  const app = express()
  serveWeb(app, path.join(folder, 'web'))
  server = createServer(app)
})
afterAll(() => {
  server.close()
  fs.rmSync(folder, { recursive: true, force: true })
})

const get = (at: string, accept = 'text/html') => request(server).get(at).set('Accept', accept)

describe('the pages', () => {
  it('are the shell at every path of theirs, asked about again each time', async () => {
    for (const at of ['/', '/setups/1/joint/0-3', '/index.html']) {
      const { status, text, headers } = await get(at)
      expect([status, headers['cache-control']]).toEqual([200, 'no-cache'])
      expect(text).toContain('<title>Undercant</title>')
    }
  })

  it('keep hashed files for ever, packed as the browser can', async () => {
    for (const encoding of ['br', 'gzip', 'identity']) {
      const answer = await get('/assets/app-1a2b3c.js', '*/*').set('Accept-Encoding', encoding)
      expect(answer.status).toBe(200)
      expect(answer.headers['cache-control']).toBe('public, max-age=31536000, immutable')
      expect(answer.headers['content-encoding']).toBe(encoding === 'identity' ? undefined : encoding)
      const sent = Number(answer.headers['content-length'])
      if (encoding === 'identity') expect(sent).toBe(script.length)
      else expect(sent).toBeLessThan(script.length / 4)
      // The client unpacks what it was sent.
      expect(answer.text ?? (answer.body as Buffer).toString()).toBe(script)
    }
    const font = await get('/assets/mono-1a2b3c.woff2', '*/*')
    expect([font.status, font.headers['cache-control']]).toEqual([200, 'public, max-age=31536000, immutable'])
  })

  it('do not stand in for files that are not there, nor give away what lies beside them', async () => {
    for (const at of [
      '/assets/gone-1a2b3c.js',
      '/favicon.png',
      '/../secret.js',
      '/%2e%2e/secret.js',
      '/..%2fsecret.js',
    ]) {
      const { status, text } = await get(at, '*/*')
      expect(status).toBeGreaterThanOrEqual(400)
      expect(text).not.toContain('not for anyone')
    }
    expect((await get('/anything', 'application/json')).status).toBe(404)
  })
})
