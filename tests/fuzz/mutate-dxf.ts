import {
  arc,
  block,
  circle,
  dxfText,
  groups,
  insert,
  line,
  oldPolyline,
  polyline,
  square,
} from '../../server/demo/dxf-text.ts'

/** A seeded source of numbers in [0, 1) (mulberry32), so that every failure can be made again. */
export function seeded(seed: number): () => number {
  let state = seed >>> 0
  return () => {
    state = (state + 0x6d2b79f5) >>> 0
    let t = Math.imul(state ^ (state >>> 15), 1 | state)
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t
    return ((t ^ (t >>> 14)) >>> 0) / 4_294_967_296
  }
}

const spline = groups(
  [0, 'SPLINE'],
  [8, 'S'],
  [70, 8],
  [71, 3],
  [72, 8],
  [73, 4],
  ...[0, 0, 0, 0, 1, 1, 1, 1].map((knot) => [40, knot] as const),
  ...[1, 2, 0.5, 1].map((weight) => [41, weight] as const),
  ...[0, 10, 20, 30].flatMap((x, i) => [[10, x] as const, [20, (i % 2) * 8] as const]),
)
const ellipse = groups(
  [0, 'ELLIPSE'],
  [8, 'E'],
  [10, 5],
  [20, 5],
  [11, 30],
  [21, 0],
  [40, 0.5],
  [41, 0],
  [42, 6.283185307179586],
)

/** Sound drawings of every kind of entity, to be broken. */
const sound: readonly string[] = [
  dxfText({ units: 4, entities: [square(0, 0, 100), circle(50, 50, 10), circle(20, 20, 5)] }),
  dxfText({
    units: 1,
    blocks: [
      block('HOLE', [circle(0, 0, 0.25)], [0.1, 0]),
      block('ROW', [insert('HOLE', 1, 0, [70, 3], [44, 1])]),
    ],
    entities: [
      polyline([
        [0, 0],
        [4, 0, 0.4],
        [4, 2],
        [0, 2, -0.2],
      ]),
      insert('ROW', 0.2, 1, [41, -1], [42, 1], [50, 30]),
      insert('ROW', 1, 1, [41, 2], [42, 0.5], [71, 2], [45, 0.5]),
    ],
  }),
  dxfText({
    entities: [
      line(0, 0, 80, 0),
      arc(80, 20, 20, -90, 90),
      line(80, 40, 0, 40),
      line(0, 40, 0, 0),
      oldPolyline([
        [10, 10],
        [20, 10, 1],
        [20, 20],
        [10, 20],
      ]),
    ],
  }),
  dxfText({
    entities: [
      spline,
      line(30, 8, 0, 0),
      ellipse,
      arc(0, 0, 5, 10, 200) + groups([210, 0], [220, 0], [230, -1]),
    ],
  }),
  groups(
    [0, 'SECTION'],
    [2, 'TABLES'],
    [0, 'TABLE'],
    [2, 'LAYER'],
    [70, 1],
    [0, 'LAYER'],
    [2, 'CUT'],
    [70, 0],
    [62, 7],
    [0, 'ENDTAB'],
    [0, 'ENDSEC'],
  ) + dxfText({ entities: [square(-5, -5, 10, 'CUT'), groups([0, 'TEXT'], [10, 0], [20, 0], [1, 'A'])] }),
]

const ODD_VALUES = [
  '',
  '0',
  '-1',
  '1',
  '2',
  '3',
  '4',
  '1e999',
  'NaN',
  '12,5',
  '1e11',
  '-1e11',
  '1e-300',
  '0.1',
  '4000000000',
  'EOF',
  'ENDSEC',
  'ENDBLK',
  'SEQEND',
  'SECTION',
  'LINE',
  'VERTEX',
  'POLYLINE',
  'LWPOLYLINE',
  'SPLINE',
  'INSERT',
  'HOLE',
  'ROW',
  '*',
]
const ODD_CODES = [
  '0',
  '2',
  '8',
  '10',
  '11',
  '20',
  '21',
  '40',
  '41',
  '42',
  '50',
  '67',
  '70',
  '71',
  '90',
  '91',
  '100',
  '102',
  '210',
  '230',
  '999',
  '1001',
  '-5',
  '99999',
  'x',
]

/** A sound drawing with one to six faults; the same for the same seed. */
export function malformedDrawing(seed: number): Uint8Array {
  const random = seeded(seed)
  const pick = <T>(list: readonly T[]): T => list[Math.floor(random() * list.length)] as T
  const lines = pick(sound).split('\n')
  const faults = 1 + Math.floor(random() * 6)
  for (let i = 0; i < faults; i++) {
    const pair = 2 * Math.floor((random() * lines.length) / 2)
    const other = 2 * Math.floor((random() * lines.length) / 2)
    const length = 2 * (1 + Math.floor(random() * 6))
    const faultKinds: (() => void)[] = [
      () => (lines[pair + 1] = pick(ODD_VALUES)),
      () => (lines[pair] = pick(ODD_CODES)),
      () => (lines[pair + 1] = String((random() - 0.5) * 10 ** Math.floor(random() * 16 - 4))),
      () => lines.splice(pair, length),
      () => lines.splice(other, 0, ...lines.slice(pair, pair + length)),
      () => lines.splice(pair, 0, pick(ODD_CODES), pick(ODD_VALUES)),
      () => lines.splice(pair, length, ...lines.slice(other, other + length)),
    ]
    pick(faultKinds)()
  }
  if (random() < 0.05) lines.splice(Math.floor(random() * lines.length), 1)
  if (random() < 0.03) lines.length = Math.floor(random() * lines.length)
  const bytes = new TextEncoder().encode(lines.join('\n'))
  if (random() < 0.1) bytes[Math.floor(random() * bytes.length)] = Math.floor(random() * 256)
  return bytes
}
