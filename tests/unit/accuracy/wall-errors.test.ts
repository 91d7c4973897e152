import { describe, expect, it } from 'vitest'
import { bodyErrors, wallErrors } from '../../../shared/accuracy/wall-errors.ts'
import { DEGREE, facets, plate, rectangle } from '../../support/plates.ts'

const sure = { thickness: 0, height: 0, tilt: 0 }

describe('errors of a wall, facet by facet', () => {
  it('gives a root face set from the top the whole of δt', () => {
    const wall = facets([15, 40], [20, 0])
    const { rootFace, facets: rows } = wallErrors(wall, 20, { ...sure, thickness: 0.3 })
    expect(rootFace).toBe(1)
    expect(rows[1]!.length).toEqual({ fromThickness: 0.3, fromHeight: 0, fromTilt: 0, together: 0.3 })
    expect(rows[0]!.length.together).toBe(0)
    // Upright, its bottom edge stays where it is.
    expect(rows[1]!.sideways.together).toBe(0)
  })

  it('leaves a root face between two bevels, and the lower bevel takes δt', () => {
    const wall = facets([8, 30], [12, 0], [20, -30])
    const {
      rootFace,
      facets: rows,
      bottomEdge,
    } = wallErrors(wall, 20, { ...sure, thickness: 0.3, height: 0.2 })
    expect(rootFace).toBe(1)
    expect(rows[1]!.length.together).toBe(0)
    expect(rows[2]!.length).toMatchObject({ fromThickness: 0.3, fromHeight: 0.2 })
    expect(rows[0]!.length).toMatchObject({ fromThickness: 0, fromHeight: 0.2 })
    expect(bottomEdge.fromThickness).toBeCloseTo(0.3 * Math.tan(30 * DEGREE), 12)
    expect(rows[2]!.length.together).toBeCloseTo(Math.hypot(0.3, 0.2), 12)
  })

  it('is what moving the lines does', () => {
    // Lines y = o + w·d of a wall of three facets, each turned about the top face by its own small angle.
    const wall = facets([6, 35], [13, 10], [20, -25])
    const tilts = wall.facets.map(({ tilt }) => tilt)
    const meetings = (angles: readonly number[], height: number) => {
      const lines = tilts.map((tilt, k) => {
        const top = k === 0 ? 0 : wall.facets[k - 1]!.depth
        const reach = tilts
          .slice(0, k)
          .reduce(
            (sum, t, m) => sum + (wall.facets[m]!.depth - (m ? wall.facets[m - 1]!.depth : 0)) * Math.tan(t),
            0,
          )
        const o = reach - top * Math.tan(tilt)
        const w = Math.tan(tilt + angles[k]!)
        // A top face higher by `height`: the line passes o at the machine's zero, `height` under the face.
        return { o: o - height * Math.tan(tilt), w }
      })
      return [0, 1].map((k) => {
        const [a, b] = [lines[k]!, lines[k + 1]!]
        const depth = (b.o - a.o) / (a.w - b.w)
        return { depth, side: a.o + a.w * depth }
      })
    }
    const step = 1e-6
    const at = meetings([0, 0, 0], 0)
    const turned = [0, 1, 2].map((k) =>
      meetings(
        [0, 1, 2].map((m) => (m === k ? step : 0)),
        0,
      ),
    )
    const rss = (of: (m: typeof at) => number) =>
      Math.hypot(...turned.map((moved) => (of(moved) - of(at)) / step))
    const errors = wallErrors(wall, 20, { ...sure, tilt: 1, height: 1 }).facets
    expect(errors[0]!.depth.fromTilt).toBeCloseTo(
      rss((m) => m[0]!.depth),
      3,
    )
    expect(errors[1]!.depth.fromTilt).toBeCloseTo(
      rss((m) => m[1]!.depth),
      3,
    )
    expect(errors[0]!.sideways.fromTilt).toBeCloseTo(
      rss((m) => m[0]!.side),
      3,
    )
    expect(errors[1]!.sideways.fromTilt).toBeCloseTo(
      rss((m) => m[1]!.side),
      3,
    )
    expect(errors[1]!.length.fromTilt).toBeCloseTo(
      rss((m) => m[1]!.depth - m[0]!.depth),
      3,
    )
    const higher = meetings([0, 0, 0], 0.1)
    expect(higher[0]!.depth - at[0]!.depth).toBeCloseTo(0.1 * errors[0]!.depth.fromHeight, 12)
    expect(higher[0]!.side - at[0]!.side).toBeCloseTo(0, 12)
  })

  it('knows no meeting of facets in line, but only where angles are uncertain', () => {
    const wall = facets([5, 20], [20, 20])
    expect(wallErrors(wall, 20, { ...sure, height: 0.1 }).facets[0]!.depth.together).toBe(0.1)
    expect(wallErrors(wall, 20, { ...sure, tilt: 1e-4 }).facets[0]!.depth.together).toBe(Infinity)
  })
})

describe('errors of a body', () => {
  it('works out each distinct wall once and finds the worst edge, at either end of a blend', () => {
    const [square, bevel] = [facets([10, 0]), facets([10, 30])]
    const blend = { facets: [{ depth: 10, tilt: 0, endTilt: -50 * DEGREE }] }
    const uncertainty = { thickness: 0.1, height: 0, tilt: 0 }
    const body = plate(10, [rectangle(0, 0, 80, 50)], (_, e) => [square, bevel, square, bevel][e]!)
    const errors = bodyErrors(body, uncertainty)
    expect([errors.start.length, [...errors.rowOfEdge], errors.worstEdge]).toEqual([2, [0, 1, 0, 1], 1])
    expect(errors.worst).toBeCloseTo(0.1 * Math.tan(30 * DEGREE), 12)
    const blended = plate(10, [rectangle(0, 0, 80, 50)], (_, e) => [square, bevel, blend, bevel][e]!)
    const most = bodyErrors(blended, uncertainty)
    expect(most.worstEdge).toBe(2)
    expect(most.worst).toBeCloseTo(0.1 * Math.tan(50 * DEGREE), 12)
  })
})
