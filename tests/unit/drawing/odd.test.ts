import { describe, expect, it } from 'vitest'
import { readDrawing } from '../../../shared/drawing/read.ts'
import {
  arc,
  block,
  circle,
  dxfBytes,
  dxfText,
  groups,
  insert,
  line,
  square,
} from '../../../server/demo/dxf-text.ts'

/** How long reading may take; processor time, so that a busy machine is no fault. */
const LONGEST_MS = 4_000
const PATIENCE_MS = 60_000

function processorMs(): number {
  const { user, system } = process.cpuUsage()
  return (user + system) / 1000
}

const good = dxfText({ entities: [square(0, 0, 100)] })
const section = (name: string, body: string) =>
  groups([0, 'SECTION'], [2, name]) + body + groups([0, 'ENDSEC'])
const end = groups([0, 'EOF'])

describe('odd drawings that can be read', () => {
  const area = (bytes: Uint8Array) => readDrawing(bytes, {}).loops[0]?.area

  it('wrong counts are put right and reported', () => {
    for (const count of [1, 3, 5, 100_000_000]) {
      const reading = readDrawing(dxfBytes(good.replace('90\n4\n', `90\n${count}\n`)), {})
      expect(reading.loops[0]?.area).toBe(10_000)
      expect(reading.notices).toContainEqual(
        expect.objectContaining({ code: 'count-corrected', severity: 'warning', count: 1 }),
      )
    }
  })

  it('vertices with numbers of their own (group 91) are all read', () => {
    const text = good.replaceAll('\n20\n', '\n91\n7\n20\n')
    expect(area(dxfBytes(text))).toBe(10_000)
  })

  it('groups in any order, CR LF, CR, spaces, comments, a byte order mark and a closing 0x1a', () => {
    const shuffled = dxfText({
      entities: [
        groups([0, 'LINE'], [10, 0], [11, 50], [20, 0], [21, 0]),
        groups([0, 'LINE'], [21, 40], [11, 0], [20, 0], [10, 50]),
        line(0, 40, 0, 0),
      ],
    })
    for (const text of [
      shuffled,
      shuffled.replaceAll('\n', '\r\n'),
      shuffled.replaceAll('\n', '\r'),
      shuffled.replaceAll('\n', '  \n  '),
      `\uFEFF999\nmade by hand\n${shuffled}\x1a`,
    ]) {
      expect(area(dxfBytes(text))).toBeCloseTo(1_000, 9)
    }
  })

  it('sections in any order', () => {
    const text =
      section('ENTITIES', insert('PLATE', 0, 0)) + section('BLOCKS', block('plate', [square(0, 0, 20)])) + end
    expect(area(dxfBytes(text))).toBe(400)
  })

  it("layer names in the file's code page", () => {
    const text =
      section('HEADER', groups([9, '$DWGCODEPAGE'], [3, 'ANSI_1250'])) +
      section('ENTITIES', circle(0, 0, 10, 'XX')) +
      end
    const bytes = Buffer.from(text, 'latin1')
    bytes.set([0xf8, 0x9e], bytes.indexOf('XX'))
    expect(readDrawing(bytes, {}).layers[0]?.name).toBe('řž')
  })

  it('applications may hang their own groups on an entity', () => {
    const text = dxfText({
      entities: [
        groups([0, 'CIRCLE'], [102, '{OURS'], [40, 3], [102, '}'], [10, 0], [20, 0], [40, 10]) +
          groups([1001, 'OURS'], [1040, 'not,a,number'], [1010, 5]),
      ],
    })
    expect(area(dxfBytes(text))).toBeCloseTo(Math.PI * 100, 9)
  })

  it(
    '50,000 lines, half of them drawn twice',
    () => {
      const ring = Array.from({ length: 6_250 }, (_, i) => [
        line(i * 4, 0, i * 4 + 2, 0),
        line(i * 4 + 2, 0, i * 4 + 2, 2),
        line(i * 4 + 2, 2, i * 4, 2),
        line(i * 4, 2, i * 4, 0),
      ]).flat()
      const bytes = dxfBytes({ entities: [...ring, ...ring.map((one) => one.replace('8\n0', '8\nagain'))] })
      const started = processorMs()
      const reading = readDrawing(bytes, {})
      expect(reading.loops).toHaveLength(6_250)
      expect(reading.notices).toContainEqual(
        expect.objectContaining({ code: 'duplicate-dropped', count: 25_000 }),
      )
      expect(processorMs() - started).toBeLessThan(LONGEST_MS)
    },
    PATIENCE_MS,
  )

  it('an arc of nearly a full turn and one of no turn', () => {
    const reading = readDrawing(
      dxfBytes({ entities: [arc(0, 0, 10, 0, 359.9999), arc(50, 0, 10, 30, 30)] }),
      {},
    )
    expect(reading.loops).toHaveLength(2)
    for (const loop of reading.loops) expect(loop.area).toBeCloseTo(Math.PI * 100, 3)
  })
})
