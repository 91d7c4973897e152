import { gzipSync, deflateRawSync } from 'node:zlib'
import { describe, expect, it } from 'vitest'
import { DrawingError, type DrawingErrorCode } from '../../../shared/drawing/errors.ts'
import { MAX_BYTES } from '../../../shared/drawing/limits.ts'
import { readDrawing } from '../../../shared/drawing/read.ts'
import {
  block,
  dxfBytes,
  dxfText,
  groups,
  insert,
  line,
  polyline,
  square,
} from '../../../server/demo/dxf-text.ts'

/** What the product promises for whatever a person uploads; processor time, so that a busy machine is no fault. */
const LONGEST_MS = 2_000

/** How long a test may take on a machine that does other things as well. */
const PATIENCE_MS = 60_000

function processorMs(): number {
  const { user, system } = process.cpuUsage()
  return (user + system) / 1000
}

function refusal(bytes: Uint8Array | string): DrawingErrorCode {
  const started = processorMs()
  try {
    readDrawing(typeof bytes === 'string' ? dxfBytes(bytes) : bytes, {})
  } catch (error) {
    expect(processorMs() - started).toBeLessThan(LONGEST_MS)
    expect(error).toBeInstanceOf(DrawingError)
    expect((error as DrawingError).message).toMatch(/\w.*\.$/s)
    return (error as DrawingError).code
  }
  throw new Error('the drawing was read')
}

const good = dxfText({ entities: [square(0, 0, 100)] })
const section = (name: string, body: string) =>
  groups([0, 'SECTION'], [2, name]) + body + groups([0, 'ENDSEC'])
const end = groups([0, 'EOF'])
const laughs = (levels: number, copies: number) =>
  dxfText({
    blocks: Array.from({ length: levels }, (_, i) =>
      block(
        `B${i}`,
        i === 0 ? [line(0, 0, 1, 0)] : Array.from({ length: copies }, () => insert(`B${i - 1}`, 0, 0)),
      ),
    ),
    entities: [insert(`B${levels - 1}`, 0, 0)],
  })

const hostile: Record<string, readonly [DrawingErrorCode, () => Uint8Array | string]> = {
  'nothing at all': ['drawing-empty', () => new Uint8Array()],
  'white space only': ['drawing-empty', () => ' \r\n\n\t '],
  'more than the upload limit': ['drawing-too-large', () => new Uint8Array(MAX_BYTES + 1).fill(48)],
  gzip: ['drawing-compressed', () => gzipSync(good)],
  zip: [
    'drawing-compressed',
    () => Buffer.concat([Buffer.from([0x50, 0x4b, 3, 4, 20, 0, 0, 0, 8, 0]), deflateRawSync(good)]),
  ],
  'binary DXF': ['drawing-binary', () => Buffer.from('AutoCAD Binary DXF\r\n\x1a\0\0\0SECTION\0', 'latin1')],
  DWG: ['drawing-binary', () => Buffer.from('AC1032\0\0\0\0\0\x01', 'latin1')],
  'null bytes': ['drawing-binary', () => good.replace('100', '1\x0000')],
  'UTF-16': ['drawing-binary', () => Buffer.from(good, 'utf16le')],
  PDF: ['drawing-not-dxf', () => '%PDF-1.7\n1 0 obj\n'],
  prose: ['drawing-not-dxf', () => 'Dear shop,\nplease cut this.\n'],
  'numbers without sections': ['drawing-not-dxf', () => '10\n5\n20\n5\n'],
  JSON: ['drawing-not-dxf', () => '{"loops":[]}\n'],
  'half a file': ['drawing-truncated', () => good.slice(0, good.length >> 1)],
  'no end of file': ['drawing-truncated', () => good.slice(0, -groups([0, 'EOF']).length)],
  'a code without a value': ['drawing-truncated', () => `${good.slice(0, -groups([0, 'EOF']).length)}0`],
  'a section without its end': [
    'drawing-malformed',
    () => groups([0, 'SECTION'], [2, 'HEADER']) + section('ENTITIES', square(0, 0, 9)) + end,
  ],
  'a count of a hundred million in 76 bytes': [
    'drawing-malformed',
    () => '0\nSECTION\n2\nENTITIES\n0\nLWPOLYLINE\n90\n100000000\n10\n0\n0\nENDSEC\n0\nEOF\n',
  ],
  'the same with one vertex': [
    'drawing-no-geometry',
    () => section('ENTITIES', groups([0, 'LWPOLYLINE'], [90, 100_000_000], [10, 0], [20, 0])) + end,
  ],
  'a decimal comma': ['drawing-number', () => good.replace('\n100\n', '\n12,5\n')],
  'not a number': ['drawing-number', () => good.replace('\n100\n', '\nNaN\n')],
  'an infinity by exponent': ['drawing-number', () => good.replace('\n100\n', '\n1e999\n')],
  'a number beyond use': ['drawing-number', () => good.replace('\n100\n', '\n1e200\n')],
  'an empty number': ['drawing-number', () => good.replace('\n100\n', '\n\n')],
  'a number in hexadecimal': ['drawing-number', () => good.replace('\n100\n', '\n0x64\n')],
  'a count that is no whole number': ['drawing-number', () => good.replace('90\n4\n', '90\n4.5\n')],
  'a POLYLINE without its end': [
    'drawing-malformed',
    () =>
      section(
        'ENTITIES',
        groups([0, 'POLYLINE'], [66, 1], [0, 'VERTEX'], [10, 0], [20, 0]) + line(0, 0, 1, 1),
      ) + end,
  ],
  'a POLYLINE at the end of the section': [
    'drawing-malformed',
    () => section('ENTITIES', groups([0, 'POLYLINE'], [66, 1], [0, 'VERTEX'], [10, 0], [20, 0])) + end,
  ],
  'a VERTEX by itself': [
    'drawing-malformed',
    () => section('ENTITIES', groups([0, 'VERTEX'], [10, 0], [20, 0])) + end,
  ],
  'a TABLE without its end': [
    'drawing-malformed',
    () =>
      section('TABLES', groups([0, 'TABLE'], [2, 'LAYER'], [70, 1], [0, 'LAYER'], [2, 'CUT'])) +
      section('ENTITIES', square(0, 0, 9)) +
      end,
  ],
  'a BLOCK without its end': [
    'drawing-malformed',
    () =>
      section('BLOCKS', groups([0, 'BLOCK'], [2, 'A']) + line(0, 0, 1, 1)) + section('ENTITIES', '') + end,
  ],
  'a BLOCK without a name': [
    'drawing-malformed',
    () => section('BLOCKS', groups([0, 'BLOCK'], [70, 0], [0, 'ENDBLK'])) + section('ENTITIES', '') + end,
  ],
  'a group outside every section': [
    'drawing-malformed',
    () => section('HEADER', '') + line(0, 0, 1, 1) + end,
  ],
  'a code that is no number': ['drawing-malformed', () => good.replace('\n90\n', '\nninety\n')],
  'a line without its end point': [
    'drawing-malformed',
    () => dxfText({ entities: [groups([0, 'LINE'], [10, 0], [20, 0], [11, 5])] }),
  ],
  'a circle without a radius': [
    'drawing-malformed',
    () => dxfText({ entities: [groups([0, 'CIRCLE'], [10, 0], [20, 0])] }),
  ],
  'an arc without angles': [
    'drawing-malformed',
    () => dxfText({ entities: [groups([0, 'ARC'], [10, 0], [20, 0], [40, 5])] }),
  ],
  'a vertex without its y': [
    'drawing-malformed',
    () => dxfText({ entities: [groups([0, 'LWPOLYLINE'], [90, 2], [10, 0], [20, 0], [10, 4])] }),
  ],
  'a spline with too few knots': [
    'drawing-malformed',
    () =>
      dxfText({
        entities: [groups([0, 'SPLINE'], [71, 3], [40, 0], [40, 1], [10, 0], [20, 0], [10, 1], [20, 1])],
      }),
  ],
  'a spline of degree a thousand': [
    'drawing-malformed',
    () => dxfText({ entities: [groups([0, 'SPLINE'], [71, 1000], [10, 0], [20, 0])] }),
  ],
  'a value of ten million characters': [
    'drawing-malformed',
    () => good.replace('8\n0\n', `8\n${'A'.repeat(1e7)}\n`),
  ],
  'a single line of ten million digits': ['drawing-not-dxf', () => '9'.repeat(1e7)],
  'a block that inserts itself': [
    'drawing-block-recursion',
    () => dxfText({ blocks: [block('A', [insert('A', 1, 0)])], entities: [insert('A', 0, 0)] }),
  ],
  'two blocks that insert each other': [
    'drawing-block-recursion',
    () =>
      dxfText({
        blocks: [block('A', [insert('b', 1, 0)]), block('B', [insert('a', 1, 0)])],
        entities: [insert('A', 0, 0)],
      }),
  ],
  'blocks a thousand deep': ['drawing-block-recursion', () => laughs(1_000, 1)],
  'blocks that double thirty times': ['drawing-too-many-entities', () => laughs(31, 2)],
  'the same without anything in them': [
    'drawing-too-many-entities',
    () => laughs(31, 2).replace(line(0, 0, 1, 0), ''),
  ],
  'an array of a million million': [
    'drawing-too-many-entities',
    () =>
      dxfText({
        blocks: [block('A', [line(0, 0, 1, 0)])],
        entities: [insert('A', 0, 0, [70, 1e6], [71, 1e6], [44, 2], [45, 2])],
      }),
  ],
  'a million entities': [
    'drawing-too-many-entities',
    () => dxfText({ entities: ['0\nPOINT\n'.repeat(1e6)] }),
  ],
  'a million vertices': [
    'drawing-too-many-entities',
    () => dxfText({ entities: [groups([0, 'LWPOLYLINE'], [90, 1e6]) + '10\n1\n20\n1\n'.repeat(1e6)] }),
  ],
  'only text': [
    'drawing-no-geometry',
    () => dxfText({ entities: [groups([0, 'TEXT'], [10, 0], [20, 0], [1, 'BP-04'])] }),
  ],
  'no entities': ['drawing-no-geometry', () => dxfText({ entities: [] })],
  'sections of other kinds only': [
    'drawing-no-geometry',
    () => section('OBJECTS', groups([0, 'DICTIONARY'])) + end,
  ],
  'kilometres of drawing': ['drawing-too-large', () => dxfText({ entities: [square(0, 0, 3e6)] })],
  'heaps of lines over one another': [
    'drawing-too-slow',
    () =>
      dxfText({
        entities: Array.from({ length: 2_000 }, (_, i) =>
          polyline([
            [0, 0],
            [1000, i / 10],
            [1000, 500 + i / 10],
          ]),
        ),
      }),
  ],
}

describe('hostile drawings', () => {
  for (const [name, [code, make]] of Object.entries(hostile)) {
    it(
      `${name}: ${code}`,
      () => {
        expect(refusal(make())).toBe(code)
      },
      PATIENCE_MS,
    )
  }

  it('says the line of a bad number', () => {
    const text = good.replace('\n100\n', '\n12,5\n')
    const bad = text.split('\n').indexOf('12,5') + 1
    expect(() => readDrawing(dxfBytes(text), {})).toThrow(
      expect.objectContaining({ line: bad, message: expect.stringContaining('decimal comma') }),
    )
  })
})
