import { describe, expect, it } from 'vitest'
import type { Finding } from '../../../shared/findings/schema.ts'
import type { User } from '../../../shared/api/people.ts'
import { oneOf } from '../../../src/app/list-params.ts'
import { deviceInWords } from '../../../src/features/account/device.ts'
import { groupsOf } from '../../../src/features/approvals/finding-groups.ts'
import { bodyOf, headFormSchema, startValues } from '../../../src/features/heads/head-form.ts'
import { nameFrom } from '../../../src/features/parts/reading/NewPartForm.tsx'
import { frameOf } from '../../../src/features/parts/reading/frame.ts'
import { boundsIn, startOptions, withLayer } from '../../../src/features/parts/reading/options.ts'
import { changesOf } from '../../../src/features/people/changes.ts'
import { jointEdges } from '../../../src/features/setups/joint-edges.ts'
import { approvedFirst } from '../../../src/features/setups/WelderSetups.tsx'
import { placeAfterSignIn } from '../../../src/features/sign-in/next.ts'
import { formatWait } from '../../../src/ui/when.ts'

describe('where signing in leads', () => {
  it.each(['/setups/1?revision=2', '/parts'])('back to %s', (place) =>
    expect(placeAfterSignIn(place)).toBe(place),
  )
  it.each([
    null,
    '',
    'https://elsewhere.example',
    '//elsewhere.example',
    '/\\elsewhere.example',
    '/sign-in?next=/x',
  ])('to the parts for %s', (place) => expect(placeAfterSignIn(place)).toBe('/parts'))
})

describe('reading a drawing', () => {
  it('starts with the tolerances of the API', () => {
    expect(startOptions).toEqual({ joinTolerance: 0.01, recogniseArcs: true, arcTolerance: 0.01 })
  })

  it('says how large the drawing would be in another unit', () => {
    const read = { minX: 0, minY: 0, maxX: 3048, maxY: 2032 }
    const inMm = boundsIn(read, 'in', 'mm')
    expect(inMm.maxX).toBeCloseTo(120, 9)
    expect(inMm.maxY).toBeCloseTo(80, 9)
  })

  it('chooses layers one by one, and none in particular when all are ticked', () => {
    const layers = [
      { name: '0', read: true },
      { name: 'holes', read: false },
    ]
    expect(withLayer(layers, '0', false)).toEqual([])
    expect(withLayer(layers, 'holes', true)).toBeUndefined()
  })

  it('guesses a name from the file', () => {
    expect(nameFrom('bearing-plate_v2.dxf')).toBe('Bearing plate v2')
    expect(nameFrom('x'.repeat(300))).toHaveLength(120)
  })

  it('frames the drawing inside the picture, Y upward', () => {
    const frame = frameOf({ minX: 100, minY: 50, maxX: 500, maxY: 150 }, 800)
    const left = frame.originX + frame.scale * 100
    const right = frame.originX + frame.scale * 500
    expect(left).toBeCloseTo(800 - right, 9)
    expect(left).toBeGreaterThan(0)
    const [top, bottom] = [150, 50].map((y) => frame.originY - frame.scale * y)
    expect(top).toBeLessThan(bottom!)
    expect(top).toBeGreaterThan(0)
    expect(bottom).toBeLessThan(frame.height)
  })
})

describe('joints for the welder', () => {
  it('come labelled first in the order of their numbers, then other bevelled edges; square ones stay out', () => {
    const wall = (edge: number, tilt: number) => ({ loop: 0, edge, facets: [{ depth: 25, tilt }] })
    const joint = (edge: number, label: string) => ({
      loop: 0,
      edge,
      label,
      rootOpening: 2,
      mate: 'same' as const,
    })
    const found = jointEdges({
      walls: [wall(4, 30), wall(0, 0), wall(1, 15), wall(2, 45)],
      joints: [joint(2, 'J-12'), joint(3, 'J-2')],
    })
    expect(found.map(({ edge, label }) => [edge.edge, label])).toEqual([
      [3, 'J-2'],
      [2, 'J-12'],
      [1, null],
      [4, null],
    ])
  })

  it('puts what is approved first and keeps the order otherwise', () => {
    const rows = [null, 2, null, 1].map((approvedRevision, n) => ({ approvedRevision, n }))
    expect(approvedFirst(rows).map(({ n }) => n)).toEqual([1, 3, 0, 2])
  })
})

it('groups findings by kind, the worst first', () => {
  const finding = (code: Finding['code'], severity: Finding['severity'], vertex: number): Finding => ({
    code,
    severity,
    vertex,
    message: '',
  })
  const groups = groupsOf([
    finding('concave-fillet', 'note', 1),
    finding('corner-over-working-limit', 'warning', 2),
    finding('concave-fillet', 'note', 3),
    finding('wall-vanishes', 'stop', 4),
  ])
  expect(groups.map((group) => group.map(({ vertex }) => vertex))).toEqual([[4], [2], [1, 3]])
})

describe('forms send', () => {
  const person: User = {
    id: '0b0e7a52-6a0f-4d39-9a53-4a3f2f3c1d11',
    email: 'a@b.example',
    name: 'Ana',
    role: 'welder',
    disabled: false,
    version: 3,
    createdAt: '2026-01-01T00:00:00Z',
  }

  it('only what was changed of a person', () => {
    expect(changesOf(person, { name: 'Ana', role: 'welder', disabled: false, password: '' })).toEqual({})
    expect(
      changesOf(person, { name: 'Ana', role: 'engineer', disabled: true, password: 'new words' }),
    ).toEqual({
      role: 'engineer',
      disabled: true,
      password: 'new words',
    })
  })

  it('no head with a number that is missing or out of range', () => {
    const typed = { ...startValues(null), name: 'North', mechanicalLimit: 60 }
    expect(headFormSchema.safeParse(typed).success).toBe(false)
    const whole = { ...typed, kerf: 1.1, taper: -0.4, standoff: 2.5, nozzleDiameter: 7 }
    expect(bodyOf(headFormSchema.parse(whole))).toEqual({
      name: 'North',
      kind: 'turning',
      mechanicalLimit: 60,
      jet: { kerf: 1.1, taper: -0.4, standoff: 2.5, nozzleDiameter: 7 },
    })
    expect(headFormSchema.safeParse({ ...whole, mechanicalLimit: 91 }).success).toBe(false)
  })
})

it.each([
  ['2026-03-01T11:59:40Z', 'under a minute'],
  ['2026-03-01T11:18:00Z', '42 min'],
  ['2026-03-01T01:00:00Z', '11 h'],
  ['2026-02-26T12:00:00Z', '3 days'],
  ['2026-03-01T12:05:00Z', 'under a minute'],
])('a wait since %s is %s', (since, words) =>
  expect(formatWait(since, new Date('2026-03-01T12:00:00Z'))).toBe(words),
)

it('names a device so that its owner knows it', () => {
  expect(deviceInWords('Mozilla/5.0 (X11; Linux x86_64; rv:140.0) Gecko/20100101 Firefox/140.0')).toBe(
    'Firefox on Linux',
  )
  expect(deviceInWords('')).toBe('Unknown program')
})

it('takes nothing from the URL that is not on the list', () => {
  expect(oneOf('draft', ['draft', 'approved'])).toBe('draft')
  expect(oneOf('x; drop', ['draft', 'approved'])).toBeUndefined()
})
