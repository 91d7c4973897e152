import { triangulate } from '../../../shared/geometry/triangulate.ts'
import type { Point } from '../../../shared/geometry/types.ts'
import type { BodyMesh } from '../../../shared/solid/types.ts'
import type { Vec3 } from '../camera/view-state.ts'

/** A plane: the points p with normal · p = at, mm. What lies beyond it, on the normal's side, is cut away. */
export interface CutPlane {
  readonly normal: Vec3
  readonly at: number
}

/** The cut surface: closed outlines as xyz runs (first point repeated), and triangles that fill them. */
export interface CutSurface {
  readonly outlines: readonly Float64Array[]
  readonly positions: Float64Array
  readonly indices: Uint32Array
  /** mm². */
  readonly area: number
}

/** Cuts a closed mesh by a plane. Seen from the side that is cut away, material lies left of the outlines. */
export function sliceMesh(mesh: BodyMesh, plane: CutPlane): CutSurface {
  const rings = chained(crossings(mesh, plane))
  const { u, v } = axesIn(plane.normal)
  const flat = rings.map((ring) => ring.map((p): Point => ({ x: dot(p, u), y: dot(p, v) })))
  const areas = flat.map(areaOf)
  const positions: number[] = []
  const indices: number[] = []
  for (const [outer, area] of areas.entries()) {
    if (area <= 0) continue
    const holes = areas.flatMap((own, i) => (own < 0 && holderOf(i, flat, areas) === outer ? [i] : []))
    const group = [outer, ...holes]
    const first = positions.length / 3
    for (const ring of group) for (const point of rings[ring]!) positions.push(...point)
    for (const corner of triangulate(group.map((ring) => flat[ring]!))) indices.push(first + corner)
  }
  return {
    outlines: rings.map((ring) => Float64Array.from([...ring, ring[0]!].flat())),
    positions: Float64Array.from(positions),
    indices: Uint32Array.from(indices),
    area: areas.reduce((sum, area) => sum + area, 0),
  }
}

/** Two axes in the plane that make a right-handed set with its normal. */
export function axesIn(normal: Vec3): { readonly u: Vec3; readonly v: Vec3 } {
  const flat = Math.hypot(normal[0], normal[1])
  const u: Vec3 = flat > 1e-6 ? [-normal[1] / flat, normal[0] / flat, 0] : [1, 0, 0]
  return { u, v: cross(normal, u) }
}

interface Crossing {
  readonly from: Vec3
  readonly to: Vec3
}

function crossings({ positions, indices }: BodyMesh, { normal, at }: CutPlane): Crossing[] {
  const found: Crossing[] = []
  const corner = (i: number): Vec3 => [positions[3 * i]!, positions[3 * i + 1]!, positions[3 * i + 2]!]
  const height = (i: number) =>
    positions[3 * i]! * normal[0] + positions[3 * i + 1]! * normal[1] + positions[3 * i + 2]! * normal[2] - at
  for (let t = 0; t < indices.length; t += 3) {
    const ids = [indices[t]!, indices[t + 1]!, indices[t + 2]!] as const
    const heights = ids.map(height)
    // On the plane counts as beyond it: then a triangle is crossed in exactly two of its sides or not at all.
    const beyond = heights.map((h) => h >= 0)
    if (beyond[0] === beyond[1] && beyond[1] === beyond[2]) continue
    const points: Vec3[] = []
    for (let k = 0; k < 3; k++) {
      const m = (k + 1) % 3
      if (beyond[k] !== beyond[m]) {
        points.push(between(corner(ids[k]!), heights[k]!, corner(ids[m]!), heights[m]!))
      }
    }
    const [a, b] = points as [Vec3, Vec3]
    const [p, q, r] = ids.map(corner) as [Vec3, Vec3, Vec3]
    const outward = cross(minus(q, p), minus(r, p))
    const along = cross(normal, outward)
    found.push(dot(minus(b, a), along) > 0 ? { from: a, to: b } : { from: b, to: a })
  }
  return found
}

/** Always worked out from the lower end, so that both triangles at a side find the same point to the bit. */
function between(a: Vec3, heightA: number, b: Vec3, heightB: number): Vec3 {
  if (heightA > heightB) return between(b, heightB, a, heightA)
  const share = heightA / (heightA - heightB)
  return [0, 1, 2].map((i) => a[i]! + share * (b[i]! - a[i]!)) as unknown as Vec3
}

/** Crossings joined end to start into closed rings; an open rest (a mesh that is not closed) is left out. */
function chained(found: readonly Crossing[]): Vec3[][] {
  const keyOf = (p: Vec3) => `${p[0]} ${p[1]} ${p[2]}`
  const starting = new Map<string, Crossing[]>()
  for (const crossing of found) {
    const key = keyOf(crossing.from)
    if (key === keyOf(crossing.to)) continue
    const same = starting.get(key)
    if (same) same.push(crossing)
    else starting.set(key, [crossing])
  }
  const rings: Vec3[][] = []
  for (const first of starting.values()) {
    while (first.length > 0) {
      const ring: Vec3[] = []
      let next = first.pop()
      const start = keyOf(next!.from)
      while (next) {
        ring.push(next.from)
        const key = keyOf(next.to)
        if (key === start) {
          if (ring.length > 2) rings.push(ring)
          break
        }
        next = starting.get(key)?.pop()
      }
    }
  }
  return rings
}

/** The smallest outer ring round a hole. */
function holderOf(hole: number, flat: readonly (readonly Point[])[], areas: readonly number[]): number {
  let holder = -1
  for (const [i, area] of areas.entries()) {
    if (area <= 0 || !holds(flat[i]!, flat[hole]![0]!)) continue
    if (holder < 0 || area < areas[holder]!) holder = i
  }
  return holder
}

function holds(ring: readonly Point[], { x, y }: Point): boolean {
  let inside = false
  for (const [i, a] of ring.entries()) {
    const b = ring[(i + 1) % ring.length]!
    if (a.y > y !== b.y > y && x < a.x + ((y - a.y) / (b.y - a.y)) * (b.x - a.x)) inside = !inside
  }
  return inside
}

function areaOf(ring: readonly Point[]): number {
  let twice = 0
  for (const [i, a] of ring.entries()) {
    const b = ring[(i + 1) % ring.length]!
    twice += a.x * b.y - a.y * b.x
  }
  return twice / 2
}

function dot(a: Vec3, b: Vec3): number {
  return a[0] * b[0] + a[1] * b[1] + a[2] * b[2]
}

function minus(a: Vec3, b: Vec3): Vec3 {
  return [a[0] - b[0], a[1] - b[1], a[2] - b[2]]
}

function cross(a: Vec3, b: Vec3): Vec3 {
  return [a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]]
}
