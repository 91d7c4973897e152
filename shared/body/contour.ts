import type { Body, Contour, ContourSegment } from './types.ts'
import { offsetAt } from './datum.ts'

/**
 * The body's outline at a depth: lines moved, arcs with their new radius, neighbours met again. The caller
 * keeps within `soundRange`; outside it the plain contour is wrong.
 */
export function contourAt(body: Body, depth: number): Contour {
  const loops = body.loops.map((loop, l) =>
    loop.map((segment, e): ContourSegment => {
      const corner = (at: number) => {
        const n = loop.length
        const before = loop[(at + n - 1) % n]
        const after = loop[at % n]
        if (!before || !after) throw new RangeError('empty loop')
        const [u1, u2] = [before, after].map(({ from, to }) => {
          const length = Math.hypot(to.x - from.x, to.y - from.y)
          return { x: (to.x - from.x) / length, y: (to.y - from.y) / length }
        })
        if (!u1 || !u2) throw new RangeError('empty loop')
        const o1 = offsetAt(body, l, (at + n - 1) % n, depth)
        const o2 = offsetAt(body, l, at % n, depth)
        const sin = u1.x * u2.y - u1.y * u2.x
        const s = (o2 - o1 * (u1.x * u2.x + u1.y * u2.y)) / sin
        return { x: after.from.x + o1 * u1.y + s * u1.x, y: after.from.y - o1 * u1.x + s * u1.y }
      }
      return { ...segment, from: corner(e), to: corner(e + 1), edge: e }
    }),
  )
  return { depth, loops }
}
