import { describe, expect, test } from 'vitest'
import { axesAlong } from '../../../shared/head/axes-along.ts'
import { axesFaults } from '../../../shared/head/check.ts'
import type { HeadSpec } from '../../../shared/head/types.ts'
import { DIRECTION_TOLERANCE } from '../../../shared/head/types.ts'
import { MoveKind } from '../../../shared/passes/types.ts'
import { DEGREE } from '../../support/plates.ts'
import { headOf, inDegrees, pathFrom, type Station } from './paths.ts'

/** Angles in degrees, by hand. C of a jet that leans into a heading is that heading less 90°. */
const turning = headOf('C-A')
const crossed = headOf('A-B')
const near = (column: Float64Array, expected: readonly number[]) => {
  expect(column.length).toBe(expected.length)
  inDegrees(column).forEach((angle, i) => expect(angle).toBeCloseTo(expected[i]!, 9))
}

function plan(head: HeadSpec, ...passes: readonly (readonly Station[])[]) {
  const made = pathFrom(...passes)
  const axes = axesAlong(made.path, made.passes, head)
  expect(axesFaults(made.path, made.passes, axes, head, DIRECTION_TOLERANCE)).toEqual([])
  return axes
}

/** Stations 10 mm apart along X. */
const row = (...leans: readonly (readonly [tilt: number, heading?: number])[]): Station[] =>
  leans.map(([tilt, heading = 0], i) => ({ x: 10 * i, y: 0, tilt, heading, edge: i }))

describe('C-A: unwinding', () => {
  test('round a square, pivoting: C goes on by 90° per corner and never back', () => {
    const axes = plan(turning, row([30, 0], [30, 90], [30, 180], [30, 270], [30, 360]))
    near(axes.outer, [-90, 0, 90, 180, 270])
    near(axes.inner, [30, 30, 30, 30, 30])
    expect(axes.problems).toEqual([])
  })

  test('a whole circle in one move is a whole turn of C', () => {
    const round = { tilt: 20, heading: 0, centre: [0, 0] as const }
    const axes = plan(turning, [
      { x: 50, y: 0, sweep: -360, ...round },
      { x: 50, y: 0, ...round },
    ])
    near(axes.outer, [270, -90])
  })

  test('a pass begins where the whole of it fits into the travel', () => {
    const spiral = row(...Array.from({ length: 8 }, (_, i) => [30, 80 * i] as const))
    const axes = plan(turning, spiral)
    // 560° of turning fits between ±360° only when it begins at −270° or 90° lower than that.
    near(axes.outer, [-270, -190, -110, -30, 50, 130, 210, 290])
    expect(axes.problems).toEqual([])
  })

  test('out of travel: told once, where it begins, how far it gets, and the turn before it', () => {
    const spiral = row(...Array.from({ length: 14 }, (_, i) => [30, 90 * i] as const)).map((station, i) => ({
      ...station,
      move: i === 3 ? MoveKind.turn : MoveKind.cut,
    }))
    const { problems, outer } = plan(turning, spiral)
    // 1170° in a travel of 720° cannot fit; the middle of the way lies in the middle of the travel.
    expect(problems.map(({ code, axis }) => [code, axis])).toEqual([
      ['travel-exceeded', 'C'],
      ['travel-exceeded', 'C'],
    ])
    const above = problems.find(({ value }) => value > 0)!
    expect(outer[above.station]! / DEGREE).toBeGreaterThan(360)
    expect(outer[above.station - 1]! / DEGREE).toBeLessThanOrEqual(360)
    expect(above.value).toBe(outer[13])
    expect(above.limit / DEGREE).toBeCloseTo(360, 9)
    expect(above.unwindAt).toBe(3)
    expect(above.edge).toBe(above.station)
    expect(problems.find(({ value }) => value < 0)!.unwindAt).toBe(-1)
  })

  test('the round way to an upright station needs travel too', () => {
    // From −90° the arc carries C on by 80°, and the turn to the next lean is made there.
    const stations: Station[] = [
      { x: 50, y: 0, tilt: 30, heading: 0, sweep: 80, centre: [0, 0] },
      { x: 50 * Math.cos(80 * DEGREE), y: 50 * Math.sin(80 * DEGREE), tilt: 0 },
      { x: 0, y: 90, tilt: 30, heading: 0 },
    ]
    const wide = plan(turning, stations)
    near(wide.outer, [-90, -90, -90])
    near(wide.dwell, [0, -80, 0])
    // A travel that has −90° and 90° but no 80° beyond either: told at the upright station.
    const axis = { speed: 180, from: -95, to: 95 }
    expect(plan(headOf('C-A', { outer: axis }), stations).problems).toEqual([])
    const narrow = plan(headOf('C-A', { outer: { ...axis, from: -92, to: -20 } }), stations).problems
    expect(narrow).toHaveLength(1)
    expect(narrow[0]).toMatchObject({ code: 'travel-exceeded', axis: 'C', station: 1 })
    expect(narrow[0]!.value / DEGREE).toBeCloseTo(-10, 9)
    // With the other branch open the run moves there rather than past the end.
    const shifted = plan(headOf('C-A', { outer: { ...axis, from: -92, to: 175 } }), stations)
    expect(shifted.problems).toEqual([])
  })

  test('an axis that turns endlessly has no such problem', () => {
    const endless = headOf('C-A', { outer: { from: null, to: null, speed: 180 } })
    const axes = plan(endless, row(...Array.from({ length: 40 }, (_, i) => [30, 90 * i] as const)))
    expect(axes.problems).toEqual([])
    expect((axes.outer[39]! - axes.outer[0]!) / DEGREE).toBeCloseTo(39 * 90, 6)
  })
})

describe('C-A: near vertical', () => {
  test('straight through the vertical A changes its sign and C rests', () => {
    const axes = plan(turning, row([30, 0], [20, 180]))
    near(axes.outer, [-90, -90])
    near(axes.inner, [30, -20])
    expect(axes.crossing[0]).toBeCloseTo(
      Math.tan(30 * DEGREE) / (Math.tan(30 * DEGREE) + Math.tan(20 * DEGREE)),
      12,
    )
  })

  test('a head whose A cannot go negative turns C by half a turn there', () => {
    const oneSided = headOf('C-A', { inner: { from: 0, to: 60, speed: 90 } })
    const axes = plan(oneSided, row([30, 0], [20, 180]))
    near(axes.inner, [30, 20])
    expect(Math.abs(axes.outer[1]! - axes.outer[0]!) / DEGREE).toBeCloseTo(180, 9)
    expect(axes.problems).toEqual([])
  })

  test('past the vertical at more than the tolerance C follows the heading', () => {
    const miss = 0.02
    const axes = plan(turning, [
      { x: 0, y: 0, tilt: 30, heading: miss / 2 },
      { x: 10, y: 0, tilt: 30, heading: 180 - miss / 2 },
    ])
    expect((axes.outer[1]! - axes.outer[0]!) / DEGREE).toBeCloseTo(180 - miss, 6)
    near(axes.inner, [30, 30])
    expect(axes.crossing[0]).toBe(0)
  })

  test('C is held while the jet stands upright and turns along the longest move', () => {
    const stations = row([30, 0], [0], [0], [0], [0], [30, 90])
    // 5 mm, 100 mm, 5 mm between the upright stations.
    const axes = plan(
      turning,
      stations.map((s, i) => ({ ...s, x: [0, 5, 10, 110, 115, 120][i]! })),
    )
    near(axes.outer, [-90, -90, -90, 0, 0, 0])
    near(axes.inner, [30, 0, 0, 0, 0, 30])
    expect(Array.from(axes.held)).toEqual([0, 1, 1, 1, 1, 0])
    expect(Array.from(axes.dwell).every((turn) => turn === 0)).toBe(true)
  })

  test('one upright station between two leans: C turns there at a standstill', () => {
    const axes = plan(turning, row([30, 0], [0], [30, 60]))
    near(axes.outer, [-90, -30, -30])
    near(axes.dwell, [0, 60, 0])
  })

  test('the other branch where it turns less: 120° are made 60° with A negative', () => {
    const axes = plan(turning, row([30, 0], [0], [30, 120]))
    near(axes.dwell, [0, -60, 0])
    near(axes.inner, [30, 0, -30])
  })

  test('the choice looks ahead: a longer turn now keeps the whole pass in travel', () => {
    // After the upright station 600° more: they fit only from −360° … −240° on.
    const turns = Array.from({ length: 7 }, (_, i) => [30, 100 * i] as const)
    const { problems, outer } = plan(turning, row([30, 0], [0], ...turns))
    expect(problems).toEqual([])
    expect(outer[2]! / DEGREE).toBeCloseTo(-270, 9)
    expect(outer[8]! / DEGREE).toBeCloseTo(330, 9)
  })

  test('upright all along: C stays where the pass before left it', () => {
    const axes = plan(turning, row([30, 0], [30, 90], [30, 170]), row([0], [0.004, 40], [0]))
    near(axes.outer, [-90, 0, 80, 80, 80, 80])
    expect(Math.abs(axes.inner[4]! / DEGREE)).toBeLessThanOrEqual(0.004)
  })

  test('a taper of half a degree turns with every corner, one of 0.004° never', () => {
    const corners = [0, 90, 180, 270]
    const half = plan(turning, row(...corners.map((heading) => [0.5, heading] as const)))
    near(half.outer, [-90, 0, 90, 180])
    const tiny = plan(turning, row(...corners.map((heading) => [0.004, heading] as const)))
    near(tiny.outer, [0, 0, 0, 0])
  })
})

describe('limits', () => {
  test('whole tilt over the mechanical limit: one per edge, at its worst', () => {
    const { problems } = plan(headOf('C-A', { inner: { from: -90, to: 90, speed: 90 } }), [
      { x: 0, y: 0, tilt: 59, edge: 3 },
      { x: 1, y: 0, tilt: 62, edge: 4 },
      { x: 2, y: 0, tilt: 65, edge: 4 },
      { x: 3, y: 0, tilt: 61, edge: 5 },
    ])
    expect(problems.map(({ code, station, edge }) => ({ code, station, edge }))).toEqual([
      { code: 'tilt-over-mechanical', station: 2, edge: 4 },
      // The last station of a pass has no edge of its own.
      { code: 'tilt-over-mechanical', station: 3, edge: -1 },
    ])
    expect(problems[0]!.value / DEGREE).toBeCloseTo(65, 9)
    expect(problems[0]!.limit / DEGREE).toBeCloseTo(60, 9)
  })

  test('crossed tilts have no pole at the vertical: angles of their own, no choice', () => {
    const axes = plan(crossed, row([30, 0], [30, 180], [30, 90], [0]))
    near(axes.outer, [0, 0, 30, 0])
    near(axes.inner, [-30, 30, 0, 0])
  })

  test('crossed tilts out of travel in the middle of an arc', () => {
    const narrow = headOf('A-B', { outer: { from: -25, to: 25, speed: 90 } })
    const arc = { tilt: 30, edge: 2, centre: [0, 0] as const }
    const { path, passes } = pathFrom([
      { x: 50, y: 0, heading: 0, sweep: 180, ...arc },
      { x: -50, y: 0, heading: 180, ...arc },
    ])
    const { problems } = axesAlong(path, passes, narrow)
    expect(problems).toHaveLength(1)
    expect(problems[0]).toMatchObject({
      code: 'travel-exceeded',
      axis: 'A',
      station: 0,
      edge: 2,
      unwindAt: -1,
    })
    expect(problems[0]!.value / DEGREE).toBeCloseTo(30, 9)
  })
})
