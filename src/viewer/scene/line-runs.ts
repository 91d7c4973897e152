/** Segments of several polylines, as the line shader takes them. */
export interface Segments {
  /** Start and end xyz of each segment. */
  readonly positions: Float32Array
  /** Distance along its polyline at each segment's start and end, mm; dashes follow it. */
  readonly distances: Float32Array
  readonly count: number
}

type Point = readonly [number, number, number]

/**
 * Polylines (xyz runs) to segments. `origin` is taken off before rounding to single precision, so that a
 * part drawn far from zero does not shiver.
 */
export function segmentsOf(runs: readonly Float64Array[], origin: Point): Segments {
  const count = runs.reduce((sum, run) => sum + Math.max(0, run.length / 3 - 1), 0)
  const positions = new Float32Array(count * 6)
  const distances = new Float32Array(count * 2)
  let segment = 0
  for (const run of runs) {
    let distance = 0
    for (let i = 0; i + 5 < run.length; i += 3) {
      for (let j = 0; j < 6; j++) positions[segment * 6 + j] = run[i + j]! - origin[j % 3]!
      distances[segment * 2] = distance
      distance += Math.hypot(run[i + 3]! - run[i]!, run[i + 4]! - run[i + 1]!, run[i + 5]! - run[i + 2]!)
      distances[segment * 2 + 1] = distance
      segment++
    }
  }
  return { positions, distances, count }
}

/** Middle of the box round xyz runs, and the radius of the sphere round that box; null for none. */
export function boxOf(positions: ArrayLike<number>): { centre: Point; radius: number } | null {
  if (positions.length < 3) return null
  const low: [number, number, number] = [Infinity, Infinity, Infinity]
  const high: [number, number, number] = [-Infinity, -Infinity, -Infinity]
  for (let i = 0; i < positions.length; i++) {
    const value = positions[i]!
    const axis = i % 3
    if (value < low[axis]!) low[axis] = value
    if (value > high[axis]!) high[axis] = value
  }
  const centre: Point = [(low[0] + high[0]) / 2, (low[1] + high[1]) / 2, (low[2] + high[2]) / 2]
  return { centre, radius: Math.hypot(high[0] - low[0], high[1] - low[1], high[2] - low[2]) / 2 }
}
