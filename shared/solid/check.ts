import type { BodyMesh } from './types.ts'

/** The mesh's own checker. */
export interface MeshCheck {
  /** Directed edges whose opposite does not occur as often, positions told apart bit by bit; 0 when watertight. */
  readonly unmatched: number
  /** Directed edges that occur more than once: only where the body touches itself, at an event. */
  readonly repeated: number
  /** Enclosed volume, mm³; positive when triangles face outward. */
  readonly volume: number
}

export function checkMesh({ positions, indices }: BodyMesh): MeshCheck {
  const spots = new Map<string, number>()
  const spotOf = Array.from({ length: positions.length / 3 }, (_, v) => {
    const key = `${positions[3 * v]},${positions[3 * v + 1]},${positions[3 * v + 2]}`
    const spot = spots.get(key) ?? spots.size
    spots.set(key, spot)
    return spot
  })
  const edges = new Map<number, number>()
  const keyOf = (a: number, b: number) => a * spots.size + b
  let volume = 0
  for (let t = 0; t < indices.length; t += 3) {
    const corners = [indices[t]!, indices[t + 1]!, indices[t + 2]!] as const
    for (let k = 0; k < 3; k++) {
      const key = keyOf(spotOf[corners[k]!]!, spotOf[corners[(k + 1) % 3]!]!)
      edges.set(key, (edges.get(key) ?? 0) + 1)
    }
    // Told from the first vertex, so that a part far from the origin loses no digits.
    const at = (v: number, axis: number) => positions[3 * v + axis]! - positions[axis]!
    const [a, b, c] = corners
    volume +=
      (at(a, 0) * (at(b, 1) * at(c, 2) - at(b, 2) * at(c, 1)) -
        at(a, 1) * (at(b, 0) * at(c, 2) - at(b, 2) * at(c, 0)) +
        at(a, 2) * (at(b, 0) * at(c, 1) - at(b, 1) * at(c, 0))) /
      6
  }
  let unmatched = 0
  let repeated = 0
  for (const [key, times] of edges) {
    const opposite = keyOf(key % spots.size, Math.floor(key / spots.size))
    unmatched += Math.max(0, times - (edges.get(opposite) ?? 0))
    if (times > 1) repeated++
  }
  return { unmatched, repeated, volume }
}
