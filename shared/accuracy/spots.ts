/**
 * Round and oval spots on the plate's plane, in columns: each stands for a section of the jet, of the nozzle's tip, or
 * (of no width) for a point of the outline. A spot reaches
 *     x·e + width·√(1 + (slope·e)²) + pad
 * in the direction e: the oval that a tilted cylinder of that half-width leaves on a level plane, and a pad all round.
 */
export interface Spots {
  count: number
  x: Float64Array
  y: Float64Array
  width: Float64Array
  p: Float64Array
  q: Float64Array
  pad: Float64Array
  loop: Int32Array
}

export function makeSpots(capacity: number): Spots {
  const numbers = () => new Float64Array(capacity)
  return {
    count: 0,
    x: numbers(),
    y: numbers(),
    width: numbers(),
    p: numbers(),
    q: numbers(),
    pad: numbers(),
    loop: new Int32Array(capacity),
  }
}

export function putSpot(
  spots: Spots,
  loop: number,
  x: number,
  y: number,
  width = 0,
  p = 0,
  q = 0,
  pad = 0,
): void {
  if (spots.count === spots.x.length) grow(spots)
  const i = spots.count++
  spots.x[i] = x
  spots.y[i] = y
  spots.width[i] = width
  spots.p[i] = p
  spots.q[i] = q
  spots.pad[i] = pad
  spots.loop[i] = loop
}

function grow(spots: Spots): void {
  const capacity = Math.max(64, 2 * spots.x.length)
  const numbers = (old: Float64Array) => {
    const out = new Float64Array(capacity)
    out.set(old)
    return out
  }
  spots.x = numbers(spots.x)
  spots.y = numbers(spots.y)
  spots.width = numbers(spots.width)
  spots.p = numbers(spots.p)
  spots.q = numbers(spots.q)
  spots.pad = numbers(spots.pad)
  const loops = new Int32Array(capacity)
  loops.set(spots.loop)
  spots.loop = loops
}

/** How far each of the given spots reaches in the direction (ex, ey), of unit length. */
export function reachOf(spots: Spots, among: Uint32Array, ex: number, ey: number): Float64Array {
  const { x, y, width, p, q, pad } = spots
  const out = new Float64Array(among.length)
  for (let k = 0; k < out.length; k++) {
    const i = among[k]!
    const lean = p[i]! * ex + q[i]! * ey
    out[k] = x[i]! * ex + y[i]! * ey + width[i]! * Math.sqrt(1 + lean * lean) + pad[i]!
  }
  return out
}
