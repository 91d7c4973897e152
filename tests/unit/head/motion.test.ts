import { expect, test } from 'vitest'
import { axesAlong } from '../../../shared/head/axes-along.ts'
import { MotionLimit, motionAlong } from '../../../shared/head/motion.ts'
import { refine } from '../../../shared/head/refine.ts'
import type { HeadSpec } from '../../../shared/head/types.ts'
import { DEGREE } from '../../support/plates.ts'
import { headOf, pathFrom, type Station } from './paths.ts'

/** Times by hand. A head of 180°/s for C, 90°/s for A, 15 m/min, pivot 150 mm up. */
const head = headOf('C-A')
const STANDOFF = 4

function motion(
  spec: HeadSpec,
  stations: readonly Station[],
  feed: number | null,
  minutes?: readonly number[],
) {
  const { path, passes } = pathFrom(stations)
  const axes = axesAlong(path, passes, spec)
  const wish =
    feed === null
      ? null
      : {
          feed: new Float64Array(path.count).fill(feed),
          minutes: minutes ? Float64Array.from(minutes) : undefined,
        }
  const along = motionAlong(path, passes, axes, spec, STANDOFF, wish)
  return { along, program: refine(path, passes, axes, spec, STANDOFF, wish) }
}

const line = (tilt: number): Station[] => [
  { x: 0, y: 0, tilt, heading: -90, edge: 5 },
  { x: 100, y: 0, tilt, heading: -90 },
]

test('a straight cut goes at the wished feed', () => {
  const { along, program } = motion(head, line(30), 200)
  expect(along.feed[0]).toBeCloseTo(200, 9)
  expect(along.minutes[0]).toBeCloseTo(0.5, 12)
  expect(along.totalMinutes).toBeCloseTo(program.totalMinutes, 12)
  expect(along.problems).toEqual([])
})

test('a wish above the linear axes is cut down and told with both feeds', () => {
  const { along, program } = motion(head, line(0), 20_000)
  expect(along.feed[0]).toBeCloseTo(15_000, 6)
  expect(program.feed[0]).toBeCloseTo(15_000, 6)
  expect(along.problems).toHaveLength(1)
  expect(along.problems[0]).toMatchObject({ code: 'feed-limited-by-linear', station: 0, edge: 5 })
  expect(along.problems[0]!.value).toBeCloseTo(15_000, 6)
  expect(along.problems[0]!.limit).toBeCloseTo(20_000, 6)
})

test('on a small arc the pivot outruns the tip: its way counts', () => {
  // Leaning out with depth at 45°, the pivot circles at |10 − 154·sin 45°| = 98.894 mm: 9.89 times the feed.
  const arc = { tilt: 45, heading: 0, centre: [0, 0] as const }
  const swift = headOf('C-A', { outer: { from: null, to: null, speed: 36_000 } })
  const { along, program } = motion(
    swift,
    [
      { x: 10, y: 0, sweep: 90, ...arc },
      { x: 0, y: 10, ...arc, heading: 90 },
    ],
    3_000,
  )
  expect(along.limit[0]).toBe(MotionLimit.linear)
  expect(along.feed[0]).toBeCloseTo((15_000 * 10) / (154 * Math.SQRT1_2 - 10), 6)
  expect(program.totalMinutes).toBeCloseTo(along.totalMinutes, 5)
})

test('a rotary axis holds a small arc back', () => {
  // Radius 1 mm at 20,000 mm/min asks 19,099°/s of C; 180°/s leave 188.5 mm/min.
  const arc = { tilt: 10, centre: [0, 0] as const, edge: 7 }
  const { along } = motion(
    head,
    [
      { x: 1, y: 0, heading: 0, sweep: 90, ...arc },
      { x: 0, y: 1, heading: 90, ...arc },
    ],
    400,
  )
  expect(along.limit[0]).toBe(MotionLimit.rotary)
  expect(along.feed[0]).toBeCloseTo(180 * DEGREE * 60, 6)
  expect(along.problems[0]).toMatchObject({ code: 'feed-limited-by-rotary', station: 0, edge: 7 })
})

const pivot: Station[] = [
  { x: 0, y: 0, tilt: 1, heading: 0 },
  { x: 0, y: 0, tilt: 1, heading: 90 },
]

test('a pivot takes its rotary time, or the longer one that the process asks', () => {
  expect(motion(head, pivot, null).along.minutes[0]! * 60).toBeCloseTo(0.5, 9)
  expect(motion(head, pivot, 300).along.minutes[0]! * 60).toBeCloseTo(0.5, 9)
  const asked = motion(head, pivot, 300, [0.2, 0])
  expect(asked.along.minutes[0]).toBeCloseTo(0.2, 12)
  expect(asked.program.totalMinutes).toBeCloseTo(0.2, 9)
  const hurried = motion(head, pivot, 0, [0.001, 0]).along.problems
  expect(hurried[0]).toMatchObject({ code: 'feed-limited-by-rotary', limit: 0.001 })
  expect(hurried[0]!.value * 60).toBeCloseTo(0.5, 9)
})

test('the swing of C past the vertical takes as long as the fine program says', () => {
  // Past it at 0.06°: C turns by 178°, nearly all of it in a hundredth of the move.
  const swing = [
    { x: 0, y: 0, tilt: 3, heading: 1 },
    { x: 20, y: 0, tilt: 3, heading: 179 },
  ]
  const { along, program } = motion(head, swing, 1_000)
  const whole = 20 / 1000
  expect(along.minutes[0]).toBeGreaterThan(whole + 0.5 / 60)
  expect(along.minutes[0]! / program.totalMinutes).toBeCloseTo(1, 2)
  // Slow enough, there is nothing to wait for.
  expect(motion(head, swing, 10).along.minutes[0]).toBeCloseTo(2, 9)
  // As fast as can be: the turning alone.
  expect(motion(head, swing, null).along.minutes[0]! * 60).toBeCloseTo(178 / 180, 9)
})

test('the radial change of a lean asks nothing of C', () => {
  const lean = [
    { x: 0, y: 0, tilt: 10, heading: 20 },
    { x: 10, y: 0, tilt: 40, heading: 20 },
  ]
  expect(motion(head, lean, null).along.minutes[0]! * 60).toBeCloseTo(30 / 90, 1)
})

test('crossed tilts going round swing to and fro; the time shows it though they end as they began', () => {
  const arc = { tilt: 30, heading: 0, centre: [0, 0] as const }
  const { along, program } = motion(
    headOf('A-B'),
    [
      { x: 5, y: 0, sweep: 360, ...arc },
      { x: 5, y: 0, ...arc },
    ],
    10_000,
  )
  expect(along.limit[0]).not.toBe(MotionLimit.none)
  // At an even feed the quickest moment rules; a program that slows only there is quicker.
  expect(along.totalMinutes).toBeGreaterThanOrEqual(program.totalMinutes)
  expect(along.totalMinutes).toBeLessThan(2 * program.totalMinutes)
})
