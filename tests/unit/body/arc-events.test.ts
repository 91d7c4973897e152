import { describe, expect, test } from 'vitest'
import { contourAt } from '../../../shared/contours/contour.ts'
import { firstEvent } from '../../../shared/events/event.ts'
import type { Wall } from '../../../shared/walls/types.ts'
import { facets, plate, rectangle, reversed, circle, DEGREE } from '../../support/plates.ts'

const t = 40
const square: Wall = facets([t, 0])
const at = (degrees: number): Wall => facets([t, degrees])
const tan = (degrees: number) => Math.tan(degrees * DEGREE)

/** Closed forms by plane geometry (derived beside each case). */
describe('events with arcs', () => {
  test('a hole whose wall moves inward into the hole vanishes at r / tan β', () => {
    const body = plate(t, [rectangle(0, 0, 100, 100), circle(50, 50, 12, true)], (l) =>
      l === 1 ? at(25) : square,
    )
    const event = firstEvent(body)!
    expect(event).toMatchObject({ kind: 'vanish', loop: 1, edge: 0, other: null })
    expect(event.depth).toBeCloseTo(12 / tan(25), 11)
    expect(event.at.x).toBeCloseTo(50, 9)
    expect(event.at.y).toBeCloseTo(50, 9)
  })

  test('a hole that opens breaks through a straight edge where the web is used up', () => {
    const body = plate(t, [rectangle(0, 0, 100, 100), circle(50, 20, 12, true)], (l, e) =>
      l === 1 ? at(-20) : e === 0 ? at(-10) : square,
    )
    const event = firstEvent(body)!
    expect(event).toMatchObject({ kind: 'break-through', loop: 0, edge: 0 })
    expect(event.other?.loop).toBe(1)
    expect(event.depth).toBeCloseTo(8 / (tan(20) + tan(10)), 11)
    expect(event.at.x).toBeCloseTo(50, 9)
  })

  test('two holes meet on the line of their centres', () => {
    const holes = [circle(30, 50, 8, true), circle(62, 26, 11, true)]
    const body = plate(t, [rectangle(0, 0, 100, 100), ...holes], (l) =>
      l === 0 ? square : at(l === 1 ? -30 : -35),
    )
    const event = firstEvent(body)!
    expect(event).toMatchObject({ kind: 'break-through', loop: 1, other: { loop: 2 } })
    expect(event.depth).toBeCloseTo((40 - 19) / (tan(30) + tan(35)), 11)
  })

  test('an eccentric disc inside a ring: the inner circle reaches the outer from within', () => {
    const body = plate(t, [circle(0, 0, 50), circle(20, 0, 24, true)], (l) => at(l === 0 ? -12 : -15))
    const event = firstEvent(body)!
    expect(event).toMatchObject({ kind: 'break-through', loop: 0, other: { loop: 1 } })
    expect(event.depth).toBeCloseTo(6 / (tan(12) + tan(15)), 11)
    expect(event.at.x).toBeCloseTo(50 - event.depth * tan(12), 9)
  })

  test('a D whose flat side runs into its round side vanishes when the line leaves the circle', () => {
    // The circle has radius 10 about (0, 0); the flat side at x = 2 moves toward x = 10.
    const h = Math.sqrt(96)
    const d = [
      { x: 2, y: -h, bulge: Math.tan(Math.acos(2 / 10) / 2) },
      { x: 2, y: h },
    ]
    const body = plate(t, [d], (_, e) => (e === 1 ? at(-30) : at(0)))
    const event = firstEvent(body)!
    expect(event.kind).toBe('vanish')
    expect(event.depth).toBeCloseTo(8 / tan(30), 9)
    expect(event.at.x).toBeCloseTo(10, 6)
  })

  test('the corner of an arc and a line runs along the line until that vanishes', () => {
    // A quarter disc of radius 20: the arc shrinks by w d, both flat sides lose as much: at their corner all end at 20 / w.
    const quarter = [
      { x: 0, y: 0 },
      { x: 20, y: 0, bulge: Math.tan(Math.PI / 8) },
      { x: 0, y: 20 },
    ]
    const shrink = plate(t, [quarter], (_, e) => (e === 1 ? at(-30) : square))
    expect(firstEvent(shrink)).toMatchObject({ kind: 'vanish', loop: 0, edge: 0 })
    expect(firstEvent(shrink)!.depth).toBeCloseTo(20 / tan(30), 9)
    // With one flat side moving in instead, the arc's end rides on the circle: the other side is used up at 20 / w.
    const ride = plate(t, [quarter], (_, e) => (e === 0 ? at(-30) : square))
    expect(firstEvent(ride)).toMatchObject({ kind: 'vanish' })
    expect(firstEvent(ride)!.depth).toBeCloseTo(20 / tan(30), 9)
    const contour = contourAt(ride, 10)
    const [line, arc] = contour.loops[0]!
    expect(line!.from.y).toBeCloseTo(10 * tan(30), 12)
    expect(Math.hypot(arc!.from.x, arc!.from.y)).toBeCloseTo(20, 12)
    expect(arc!.from.y).toBeCloseTo(10 * tan(30), 12)
  })

  test('a concave corner that rides on an arc runs into the wall below', () => {
    // The quarter circle about (0, 20) starts at the concave corner (20, 20). The line y = x moves down by w, so that
    // the corner rides round the circle: y = x − √2 w d and x² + (y − 20)² = 400. The bottom wall rises: y = v d.
    // Together: d = 40 v / ((v + √2 w)² + v²) (derived).
    const part = [
      { x: 0, y: 0 },
      { x: 60, y: 0 },
      { x: 60, y: 40 },
      { x: 40, y: 40 },
      { x: 20, y: 20, bulge: Math.tan(Math.PI / 8) },
      { x: 0, y: 40 },
    ]
    const body = plate(t, [part], (_, e) => (e === 3 ? at(-35) : e === 0 ? at(-60) : square))
    const event = firstEvent(body)!
    expect(event).toMatchObject({ kind: 'split', loop: 0, edge: 0, other: { loop: 0, edge: 4 } })
    const [v, w] = [tan(60), tan(35)]
    const depth = (40 * v) / ((v + Math.SQRT2 * w) ** 2 + v * v)
    expect(Math.abs(event.depth / depth - 1)).toBeLessThan(1e-11)
    expect(event.at.y).toBeCloseTo(v * depth, 9)
  })

  test('smooth neighbours of unlike tilt leave a step, and the slot closes where its wall reaches the other', () => {
    const slot = reversed([
      { x: 20, y: 20 },
      { x: 60, y: 20, bulge: 1 },
      { x: 60, y: 30 },
      { x: 20, y: 30, bulge: 1 },
    ])
    const body = plate(t, [rectangle(0, 0, 100, 60), slot], (l, e) => (l === 1 && e === 1 ? at(20) : square))
    const steps = contourAt(body, 5).loops[1]!.filter((s) => s.edge === null)
    expect(steps.map((s) => Math.abs(s.to.y - s.from.y))).toEqual([
      expect.closeTo(5 * tan(20), 12),
      expect.closeTo(5 * tan(20), 12),
    ])
    expect(contourAt(body, 0).loops[1]!.filter((s) => s.edge === null)).toHaveLength(0)
    const event = firstEvent(body)!
    expect(event).toMatchObject({ kind: 'split', loop: 1, other: { loop: 1 } })
    expect(event.depth).toBeCloseTo(10 / tan(20), 10)
  })
})
