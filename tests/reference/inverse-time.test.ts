import { expect, test } from 'vitest'
import { axesAlong } from '../../shared/head/axes-along.ts'
import { inverseTimeFeed, motionAlong } from '../../shared/head/motion.ts'
import { refine } from '../../shared/head/refine.ts'
import { headSpec, startingMotion } from '../../shared/head/schema.ts'
import { MoveKind } from '../../shared/passes/types.ts'
import { bend, finish, makeWriter, pathOf, put } from '../../shared/passes/writer.ts'

/**
 * Source: RS274/NGC (Kramer, Proctor, Messina, NISTIR 6556, 2000), quoted: with X, Y or Z motion the feed is along the XYZ
 * way as if the rotary axes were still. G93 (seen in open sources): a move takes 1/F minutes; 10 mm at 300 mm/min is F30.
 */
const head = headSpec({ ...startingMotion['C-A'], outer: { from: null, to: null, speed: 360 } })
const STANDOFF = 3

function straight(slope: number, length: number) {
  const w = makeWriter(4)
  put(w, 0, 0, 0, slope, MoveKind.cut, 0, 0)
  put(w, length, 0, 0, slope, MoveKind.cut, 0, 0)
  finish(w)
  return pathOf(w)
}

const passes = [{ loop: 0, first: 0, last: 1, closed: false, level: 0, reasons: [] }]

test.each([
  [10, 300, 30],
  [10, 150, 15],
  [25, 300, 12],
])('%d mm at %d mm/min is F%d', (length, feed, inverse) => {
  for (const slope of [0, 0.5]) {
    const path = straight(slope, length)
    const axes = axesAlong(path, passes, head)
    const wish = { feed: new Float64Array([feed, 0]) }
    expect(inverseTimeFeed(motionAlong(path, passes, axes, head, STANDOFF, wish).minutes[0]!)).toBeCloseTo(
      inverse,
      9,
    )
    const program = refine(path, passes, axes, head, STANDOFF, wish)
    expect(program.count).toBe(2)
    expect(inverseTimeFeed(program.minutes[0]!)).toBeCloseTo(inverse, 9)
    expect(program.feed[0]).toBeCloseTo(feed, 9)
  }
})

test('round a corner the lines of a program add up to the time of the move', () => {
  const w = makeWriter(4)
  put(w, 20, 0, 0.5, 0, MoveKind.cut, 0, 0)
  bend(w, Math.PI / 2, 0, 0)
  put(w, 0, 20, 0, 0.5, MoveKind.cut, 0, 0)
  finish(w)
  const path = pathOf(w)
  const axes = axesAlong(path, passes, head)
  const program = refine(path, passes, axes, head, STANDOFF, { feed: new Float64Array([300, 0]) })
  let minutes = 0
  for (let i = 0; i + 1 < program.count; i++) minutes += 1 / inverseTimeFeed(program.minutes[i]!)
  expect(program.count).toBeGreaterThan(8)
  expect(minutes).toBeCloseTo((20 * Math.PI) / 2 / 300, 9)
})
