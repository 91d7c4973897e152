/**
 * Runs that go one way. A chain whose pieces all advance in one direction cannot meet itself, however long it is;
 * outlines are mostly made of such runs, so that few pairs of pieces are left to be looked at. Each piece tells by
 * 16 bits in which of 16 directions, 22.5° apart, it advances; a run is told by the bits that its pieces share.
 */

/** Tangent of 22.5°. */
const EIGHTH = Math.SQRT2 - 1

/**
 * Directions in which a heading advances: bit k stands for k × 22.5°. Only those within 67.5° of the whole sector that
 * the heading lies in, so that every piece advances by at least `LEAST_ADVANCE` of its length, whatever the rounding.
 */
export function advanceOf(ux: number, uy: number): number {
  const ax = Math.abs(ux)
  const ay = Math.abs(uy)
  const sub = ay <= ax ? (ay <= EIGHTH * ax ? 0 : 1) : ax > EIGHTH * ay ? 2 : 3
  const sector = ux >= 0 ? (uy >= 0 ? sub : 15 - sub) : uy >= 0 ? 7 - sub : 8 + sub
  return ADVANCES[sector]!
}

/** cos 67.5°. */
export const LEAST_ADVANCE = Math.cos((3 * Math.PI) / 8)

/** Sector s runs from s to s + 1 eighths of a quarter turn; directions s − 2 to s + 3 lie within 67.5° of both ends. */
const ADVANCES = Uint16Array.from({ length: 16 }, (_, s) => {
  let bits = 0
  for (let k = s - 2; k <= s + 3; k++) bits |= 1 << ((k + 16) % 16)
  return bits
})
