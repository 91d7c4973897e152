import { describe, expect, test } from 'vitest'
import { axesAlong } from '../../../shared/head/axes-along.ts'
import { programFaults } from '../../../shared/head/check.ts'
import type { WishedMotion } from '../../../shared/head/motion.ts'
import { refine } from '../../../shared/head/refine.ts'
import {
  DIRECTION_TOLERANCE,
  headKinds,
  POSITION_TOLERANCE,
  type HeadSpec,
} from '../../../shared/head/types.ts'
import { DEGREE, seeded } from '../../support/plates.ts'
import { headOf, inDegrees, pathFrom, type Station } from './paths.ts'

const STANDOFF = 3
const within = { direction: DIRECTION_TOLERANCE, position: POSITION_TOLERANCE }
/** Places looked at in every line: the proof itself looks at five. */
const LOOKS = 23

function program(head: HeadSpec, stations: readonly Station[], wish: WishedMotion | null = null) {
  const { path, passes } = pathFrom(stations)
  const axes = axesAlong(path, passes, head)
  const told = refine(path, passes, axes, head, STANDOFF, wish)
  expect(programFaults(path, told, head, STANDOFF, within, LOOKS)).toEqual([])
  return told
}

/** A chain of moves, straight and round, with slopes that change or not, some upright, some hardly tilted. */
function chain(random: () => number, count: number): Station[] {
  const tilts = [0, 0.001, 0.004, 0.006, 0.02, 0.3, 1, 20, 45]
  const stations: Station[] = []
  let [x, y] = [0, 0]
  let before = { tilt: 20, heading: 0 }
  for (let i = 0; i < count; i++) {
    const kind = random()
    const lean = { tilt: tilts[Math.floor(random() * tilts.length)]!, heading: 360 * random() }
    // The same, the opposite (straight through the vertical, or just past it), or any other lean.
    const next =
      kind < 0.2
        ? before
        : kind < 0.4
          ? {
              tilt: lean.tilt,
              heading: before.heading + 180 + (random() < 0.5 ? 0 : 0.03 * (random() - 0.5)),
            }
          : lean
    if (random() < 0.3) {
      const sweep = 300 * (random() - 0.5)
      const radius = 1 + 30 * random()
      const from = 360 * random()
      const place = (heading: number) =>
        [x + radius * Math.cos(heading * DEGREE), y + radius * Math.sin(heading * DEGREE)] as const
      const [cx, cy] = [x - (place(from)[0] - x), y - (place(from)[1] - y)]
      stations.push({ x, y, ...before, sweep, centre: [cx, cy] })
      ;[x, y] = [
        cx + radius * Math.cos((from + sweep) * DEGREE),
        cy + radius * Math.sin((from + sweep) * DEGREE),
      ]
      if (kind < 0.2) before = { tilt: before.tilt, heading: before.heading + sweep }
      else before = next
    } else {
      stations.push({ x, y, ...before })
      const step = random() < 0.2 ? 0 : 20 * random()
      ;[x, y] = [x + step, y - step / 2]
      before = next
    }
  }
  stations.push({ x, y, ...before })
  return stations
}

describe.each(headKinds)('%s', (kind) => {
  test('random chains: direction and tip within their tolerances everywhere', () => {
    const random = seeded(31)
    const endless = { from: null, to: null, speed: 180 }
    const head = headOf(kind, { outer: endless, inner: endless })
    for (let n = 0; n < 12; n++) program(head, chain(random, 25))
  })

  test('a straight cut along a wall stays one line', () => {
    const stations = [0, 50, 80].map((x) => ({ x, y: 0, tilt: 30, heading: -90 }))
    expect(program(headOf(kind), stations).count).toBe(3)
  })
})

describe('C-A', () => {
  const head = headOf('C-A')

  test('an arc at a steady tilt is split for the tip alone', () => {
    const arc = { tilt: 30, centre: [0, 0] as const }
    const told = program(head, [
      { x: 50, y: 0, heading: 0, sweep: 90, ...arc },
      { x: 0, y: 50, heading: 90, ...arc },
    ])
    // Chords of 64 pieces of 90° at 48.5 mm stand 0.0036 mm off, of 32 0.0146 mm.
    expect(told.count).toBe(65)
    expect(inDegrees(told.inner).every((a) => Math.abs(a - 30) < 1e-9)).toBe(true)
  })

  test('a lean toward a seam is split, angles exact at every line', () => {
    const told = program(head, [
      { x: 0, y: 0, tilt: 30, heading: 0 },
      { x: 0, y: 10, tilt: 39.2315, heading: 45 },
    ])
    expect(told.count).toBeGreaterThan(8)
    expect(told.count).toBeLessThan(50)
  })

  test('through the vertical: no line more than the bend of A asks, C at rest', () => {
    const told = program(head, [
      { x: 0, y: 0, tilt: 3, heading: 0 },
      { x: 10, y: 0, tilt: 3, heading: 180 },
    ])
    expect(new Set(inDegrees(told.outer))).toEqual(new Set([-90]))
    expect(told.count).toBeLessThan(12)
  })

  test('a turn at a standstill: two lines at one place, timed by the rotary axis alone', () => {
    const wish = { feed: new Float64Array([300, 300, 0]) }
    const told = program(
      head,
      [
        { x: 0, y: 0, tilt: 0.3, heading: 0 },
        { x: 10, y: 0, tilt: 0 },
        { x: 20, y: 0, tilt: 0.3, heading: 60 },
      ],
      wish,
    )
    const still = Array.from(told.x).findIndex((x, i) => i > 0 && x === told.x[i - 1])
    expect(still).toBeGreaterThan(0)
    expect((told.outer[still]! - told.outer[still - 1]!) / DEGREE).toBeCloseTo(60, 9)
    expect(told.minutes[still - 1]! * 60).toBeCloseTo(60 / 180, 9)
    expect(told.feed[still - 1]).toBe(0)
    // 20 mm at 300 mm/min are 4 s, and a third of one for the turn.
    expect(told.totalMinutes * 60).toBeCloseTo(4 + 1 / 3, 3)
  })
})
