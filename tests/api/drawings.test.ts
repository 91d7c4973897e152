import { createHash } from 'node:crypto'
import { connect } from 'node:net'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { Drawing, Part } from '../../shared/api/parts.ts'
import type { Reading } from '../../shared/drawing/schema.ts'
import { DrawingReader } from '../../server/features/drawings/reader.ts'
import { Slots } from '../../server/workers/slots.ts'
import { Drawing as DrawingRow } from '../../server/db/entities/drawing.ts'
import {
  type Agent,
  emailOf,
  expectStatus,
  ifMatch,
  PASSWORD,
  startApp,
  type TestApp,
} from '../support/app.ts'
import { inchPlateDxf } from '../support/drawings.ts'
import { plateDxf } from '../support/plate.ts'

let app: TestApp
let programmer: Agent
beforeAll(async () => {
  app = await startApp('drawings')
  programmer = await app.as('programmer')
})
afterAll(() => app.close())

interface Read {
  drawing: Drawing
  reading: Reading
}

const upload = (bytes: Buffer | string, name = 'plate.dxf', agent = programmer) =>
  agent.post('/api/drawings').attach('file', Buffer.from(bytes), name)
const plateLine = (i: number) => `0\nLINE\n8\n0\n10\n${i}\n20\n0\n11\n${i + 1}\n21\n${i % 7}\n`
const stored = () => app.services.dataSource.getRepository(DrawingRow).count()

describe('a drawing', () => {
  it('is read, kept whole with its hash, and given back as it was', async () => {
    const bytes = Buffer.from(plateDxf())
    const { drawing, reading } = await expectStatus<Read>(201, upload(bytes))
    const sha256 = createHash('sha256').update(bytes).digest('hex')
    expect(drawing).toMatchObject({ fileName: 'plate.dxf', size: bytes.length, sha256 })
    expect(reading.parts).toHaveLength(1)
    // 200 × 100 less the hole of 30 mm, by hand.
    expect(reading.parts[0]?.area).toBeCloseTo(20_000 - Math.PI * 225, 6)
    const file = await programmer.get(`/api/drawings/${drawing.id}/file`).responseType('blob')
    expect(file.body).toEqual(bytes)
    expect(file.headers['content-disposition']).toContain('attachment; filename="plate.dxf"')
    expect(file.headers['x-content-type-options']).toBe('nosniff')
    await expectStatus(403, (await app.as('welder')).get(`/api/drawings/${drawing.id}/file`))
  })

  it('can be read again with other options', async () => {
    const { drawing, reading } = await expectStatus<Read>(201, upload(plateDxf()))
    expect(reading.unit.used).toBe('mm')
    const again = await expectStatus<Read>(
      200,
      programmer.post(`/api/drawings/${drawing.id}/reading`).send({ unit: 'in' }),
    )
    expect(again.reading.unit.used).toBe('in')
    expect(again.reading.parts[0]?.area).toBeCloseTo((reading.parts[0]?.area ?? 0) * 25.4 ** 2, 3)
    expect(again.drawing).toEqual(drawing)
    const wrong = { unit: 'furlong', joinTolerance: -1 }
    await expectStatus(400, programmer.post(`/api/drawings/${drawing.id}/reading`).send(wrong))
  })
})

describe('a part', () => {
  it('takes its profile from the stored drawing, in millimetres, holes after the outline', async () => {
    const { drawing, reading } = await expectStatus<Read>(201, upload(inchPlateDxf(), 'inch.dxf'))
    const body = { drawingId: drawing.id, reading: {}, pick: 0, number: 'IN-1', name: 'Inch plate' }
    const part = await expectStatus<Part>(201, programmer.post('/api/parts').send(body))
    const picked = reading.parts[0]
    expect(part.loops).toEqual(
      [picked?.outer ?? 0, ...(picked?.holes ?? [])].map((i) => reading.loops[i]?.vertices),
    )
    expect(part.bounds.maxX - part.bounds.minX).toBeCloseTo(6 * 25.4, 9)
    expect(part.area).toBe(picked?.area)
    const same = await programmer.post('/api/parts').send(body)
    expect([same.status, same.body.error.code]).toEqual([409, 'name-taken'])
    const none = await programmer.post('/api/parts').send({ ...body, number: 'IN-2', pick: 1 })
    expect([none.status, none.body.error.code]).toEqual([400, 'invalid-request'])
    await expectStatus(
      400,
      programmer.post('/api/parts').send({ ...body, number: 'IN-3', loops: part.loops }),
    )
  })

  it('can be renamed, its profile not', async () => {
    const { drawing } = await expectStatus<Read>(201, upload(plateDxf()))
    const body = { drawingId: drawing.id, reading: {}, pick: 0, number: 'RN-1', name: 'Before' }
    const part = await expectStatus<Part>(201, programmer.post('/api/parts').send(body))
    const path = `/api/parts/${part.id}`
    const renamed = await expectStatus<Part>(
      200,
      programmer.patch(path).set(ifMatch(part)).send({ name: 'After' }),
    )
    expect(renamed).toEqual({ ...part, name: 'After', version: 2 })
    await expectStatus(412, programmer.patch(path).set(ifMatch(part)).send({ name: 'Late' }))
    await expectStatus(400, programmer.patch(path).set(ifMatch(renamed)).send({ loops: [] }))
    const rows = await expectStatus<{ items: Part[]; total: number }>(
      200,
      programmer.get('/api/parts').query({ q: 'RN-', sort: '-createdAt' }),
    )
    expect(rows.items.map(({ name }) => name)).toEqual(['After'])
  })
})

describe('what strangers send', () => {
  const tags = (...values: (string | number)[]) => values.join('\n') + '\n'
  const entities = (...values: (string | number)[]) =>
    tags(0, 'SECTION', 2, 'ENTITIES', ...values, 0, 'ENDSEC', 0, 'EOF')
  const hostile: readonly (readonly [string, Buffer | string, RegExp])[] = [
    ['nothing', '', /drawing-empty|invalid-request/],
    ['a text', 'not a drawing at all', /drawing-/],
    ['a picture by another name', Buffer.from('89504e470d0a1a0a0000000d49484452', 'hex'), /drawing-/],
    ['a compressed file', Buffer.from('504b0304140000000800', 'hex'), /drawing-compressed/],
    ['a binary drawing', Buffer.from('AutoCAD Binary DXF\r\n\x1a\x00\x00\x00', 'latin1'), /drawing-binary/],
    ['only zeros', Buffer.alloc(100_000), /drawing-/],
    ['a vertex count that kills the parser', entities(0, 'LWPOLYLINE', 8, '0', 90, 100_000_000), /drawing-/],
    ['a polyline without end', tags(0, 'SECTION', 2, 'ENTITIES', 0, 'POLYLINE', 8, '0', 66, 1), /drawing-/],
    ['a table without end', tags(0, 'SECTION', 2, 'TABLES', 0, 'TABLE', 2, 'LAYER', 70, 1), /drawing-/],
    ['numbers that are none', entities(0, 'LINE', 8, '0', 10, 'NaN', 20, 0, 11, 1, 21, 1), /drawing-number/],
    [
      'numbers without bound',
      entities(0, 'LINE', 8, '0', 10, '1e999', 20, 0, 11, 1, 21, 1),
      /drawing-number/,
    ],
    ['a file cut in the middle', plateDxf().slice(0, 200), /drawing-/],
    [
      'a block that inserts itself',
      tags(0, 'SECTION', 2, 'BLOCKS', 0, 'BLOCK', 2, 'A', 70, 0, 10, 0, 20, 0) +
        tags(0, 'INSERT', 2, 'A', 10, 0, 20, 0, 0, 'ENDBLK', 0, 'ENDSEC') +
        entities(0, 'INSERT', 2, 'A', 10, 0, 20, 0),
      /drawing-block-recursion|drawing-too-many-entities/,
    ],
  ]

  it.each(hostile)('%s is refused by name, keeps nothing, and the server lives', async (_, bytes, code) => {
    const before = await stored()
    const started = performance.now()
    const { status, body } = await upload(bytes, 'x.dxf')
    // A hang would last for ever; how fast the reading itself is stands in the reader's own tests.
    expect(performance.now() - started).toBeLessThan(20_000)
    expect(status).toBe(400)
    expect(body.error.code).toMatch(code)
    expect(body.error.message.length).toBeGreaterThan(20)
    expect(await stored()).toBe(before)
    await expectStatus(200, app.anyone().get('/readyz'))
  })

  it('more than 25 MB is refused and nothing is kept', async () => {
    const before = await stored()
    const { status, body } = await upload(Buffer.alloc(25 * 1_048_576 + 1, '0'), 'huge.dxf')
    expect([status, body.error.code]).toEqual([413, 'too-large'])
    expect(await stored()).toBe(before)
  })

  it('more than one file, other fields and other kinds of body are refused', async () => {
    const file = Buffer.from(plateDxf())
    const before = await stored()
    const calls = [
      programmer.post('/api/drawings').attach('file', file, 'a.dxf').attach('file', file, 'b.dxf'),
      programmer.post('/api/drawings').attach('other', file, 'a.dxf'),
      programmer.post('/api/drawings').field('file', 'text'),
      programmer.post('/api/drawings').field('id', 'x').attach('file', file, 'a.dxf'),
      programmer.post('/api/drawings').send({ file: 'x' }),
      programmer.post('/api/drawings').set('Content-Type', 'multipart/form-data').send('no boundary'),
      programmer
        .post('/api/drawings')
        .set('Content-Type', 'multipart/form-data; boundary=x')
        .send('--x\r\nbroken'),
    ]
    for (const call of calls) {
      const { status, body } = await call
      expect([status, body.error.code]).toEqual([400, 'invalid-request'])
    }
    expect(await stored()).toBe(before)
  })

  it.each([
    ['../../etc/passwd.dxf', 'passwd.dxf'],
    ['C:\\drawings\\plate.dxf', 'plate.dxf'],
    ['a"; filename="b.exe', /^[^"\\/]+$/],
    ['quay\r\nSet-Cookie: x=1.dxf', /^[^\r\n]+$/],
    ['...', 'drawing.dxf'],
    ['Brücke ø12 漢字.dxf', 'Brücke ø12 漢字.dxf'],
    [`${'long'.repeat(75)}.dxf`, /^(long){29}\.dxf$/],
  ])('the name %j becomes safe', async (name, expected) => {
    const boundary = 'tide'
    const disposition = `form-data; name="file"; filename="${name.replace(/[\r\n"]/g, (c) => encodeURIComponent(c))}"`
    const text = `--${boundary}\r\nContent-Disposition: ${disposition}\r\n\r\n${plateDxf()}\r\n--${boundary}--\r\n`
    const call = programmer
      .post('/api/drawings')
      .set('Content-Type', `multipart/form-data; boundary=${boundary}`)
      .send(text)
    const { drawing } = await expectStatus<Read>(201, call)
    if (typeof expected === 'string') expect(drawing.fileName).toBe(expected)
    else expect(drawing.fileName).toMatch(expected)
    const file = await programmer.get(`/api/drawings/${drawing.id}/file`)
    const header = String(file.headers['content-disposition'])
    expect(header).toMatch(
      /^attachment; filename="[\x20-\x21\x23-\x7e]+"; filename\*=UTF-8''[\w%.!#$&+^`|~-]+$/,
    )
  })

  it('an upload that is cut off half-way leaves nothing, twenty times over', async () => {
    const before = await stored()
    const signedIn = await app
      .anyone()
      .post('/api/session')
      .send({ email: emailOf('programmer'), password: PASSWORD })
    const cookie = String(signedIn.headers['set-cookie']).split(';')[0] ?? ''
    await expectStatus(200, app.anyone().get('/api/session').set('Cookie', cookie))
    const { port } = app.server.address() as { port: number }
    for (let i = 0; i < 20; i += 1) {
      await new Promise<void>((resolve) => {
        const socket = connect(port, '127.0.0.1', () => {
          socket.write(
            `POST /api/drawings HTTP/1.1\r\nHost: 127.0.0.1:${port}\r\nCookie: ${cookie}\r\n` +
              'Content-Type: multipart/form-data; boundary=x\r\nContent-Length: 100000\r\n\r\n' +
              '--x\r\nContent-Disposition: form-data; name="file"; filename="a.dxf"\r\n\r\n0\nSECTION\n',
          )
          setTimeout(() => socket.destroy(), 5)
        })
        socket.on('close', () => resolve())
        socket.on('error', () => undefined)
      })
    }
    expect(await stored()).toBe(before)
    await expectStatus(201, upload(plateDxf()))
  })
})

describe('a server under pressure', () => {
  it('takes no drawing when the disk is almost full', async () => {
    const full = await startApp('full', {
      config: { minFreeDiskBytes: 1_000 },
      services: { freeDiskBytes: () => Promise.resolve(999) },
    })
    try {
      const { status, body } = await upload(plateDxf(), 'a.dxf', await full.as('programmer'))
      expect([status, body.error.code]).toEqual([507, 'disk-full'])
    } finally {
      await full.close()
    }
  })

  it('ends a reading that takes longer than its deadline', async () => {
    const many = Array.from({ length: 40_000 }, (_, i) => plateLine(i)).join('')
    const drawing = Buffer.from(`0\nSECTION\n2\nENTITIES\n${many}0\nENDSEC\n0\nEOF\n`)
    const reader = new DrawingReader(5)
    await expect(reader.read(drawing, {})).rejects.toMatchObject({ code: 'drawing-too-slow' })
  })

  it('works on two at once, lets some wait, and turns the rest away', async () => {
    const slots = new Slots(2, 3)
    let running = 0
    let most = 0
    const job = async () => {
      running += 1
      most = Math.max(most, running)
      await new Promise((resolve) => setTimeout(resolve, 20))
      running -= 1
    }
    const outcomes = await Promise.allSettled(Array.from({ length: 8 }, () => slots.run(job)))
    expect(most).toBe(2)
    expect(outcomes.map(({ status }) => status)).toEqual([
      ...Array(5).fill('fulfilled'),
      ...Array(3).fill('rejected'),
    ])
    await expect(slots.run(job)).resolves.toBeUndefined()
    await expect(slots.run(() => Promise.reject(new Error('failed')))).rejects.toThrow('failed')
    await expect(Promise.all([1, 2, 3, 4, 5].map(() => slots.run(job)))).resolves.toHaveLength(5)
  })
})
