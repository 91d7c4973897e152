import type { Bounds, VertexLoop } from '../../shared/geometry/types.ts'

/**
 * Bounds that hold the loops, for fitting a picture: exact for lines; an arc counts with the box of its whole
 * sagitta, which may be a little larger than the arc. Measures on screens come from the server instead.
 */
export function boundsOfLoops(loops: readonly VertexLoop[]): Bounds {
  let [minX, minY, maxX, maxY] = [Infinity, Infinity, -Infinity, -Infinity]
  const take = (x: number, y: number) => {
    minX = Math.min(minX, x)
    minY = Math.min(minY, y)
    maxX = Math.max(maxX, x)
    maxY = Math.max(maxY, y)
  }
  for (const loop of loops)
    for (const [i, from] of loop.entries()) {
      const to = loop[(i + 1) % loop.length]!
      const bulge = from.bulge ?? 0
      // The sagitta is bulge · chord / 2, to the right of the chord when counter-clockwise.
      const [sideX, sideY] = [((to.y - from.y) * bulge) / 2, (-(to.x - from.x) * bulge) / 2]
      take(from.x, from.y)
      take(from.x + sideX, from.y + sideY)
      take(to.x + sideX, to.y + sideY)
    }
  return { minX, minY, maxX, maxY }
}
