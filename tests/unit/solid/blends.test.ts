import { describe, expect, test } from 'vitest'
import type { Point } from '../../../shared/geometry/types.ts'
import { checkMesh } from '../../../shared/solid/check.ts'
import { meshOf } from '../../../shared/solid/mesh.ts'
import { volumeOf } from '../../../shared/solid/volume.ts'
import type { Body, Wall } from '../../../shared/walls/types.ts'
import { DEGREE, circle, plate, rectangle, regular } from '../../support/plates.ts'

const tan = (degrees: number) => Math.tan(degrees * DEGREE)
const blend = (depth: number, from: number, to: number): Wall => ({
  facets: [{ depth, tilt: from * DEGREE, endTilt: to * DEGREE }],
})

describe('volume', () => {
  test('a plate with one twisted side: ∫∫ of the side’s reach, by hand', () => {
    const body = plate(12, [rectangle(5, 5, 80, 50)], (_, e) =>
      e === 1 ? blend(12, 30, -10) : blend(12, 0, 0),
    )
    // Between y = 0 and 50 the side stands out by d·(w₀ + (y/50)(w₁ − w₀)).
    expect(volumeOf(body)!).toBeCloseTo(80 * 50 * 12 + (50 * 144 * (tan(30) + tan(-10))) / 4, 8)
  })

  test('a hexagon, every side twisted, against corners crossed and areas summed one by one', () => {
    const drawn = regular(6, 60)
    const tilts = [10, -5, 25, 0, -20, 15]
    const ends = [20, 5, -25, 30, -10, 0]
    const thickness = 9
    const body = plate(thickness, [drawn], (_, e) => blend(thickness, tilts[e]!, ends[e]!))
    const area = (d: number) => {
      const corners = drawn.map((_, i) =>
        crossing(drawn, (i + 5) % 6, d * tan(ends[(i + 5) % 6]!), i, d * tan(tilts[i]!)),
      )
      return corners.reduce(
        (sum, a, i) => sum + (a.x * corners[(i + 1) % 6]!.y - a.y * corners[(i + 1) % 6]!.x) / 2,
        0,
      )
    }
    const steps = 4000
    let sum = 0
    for (let k = 0; k < steps; k++) sum += (area(((k + 0.5) * thickness) / steps) * thickness) / steps
    expect(volumeOf(body)! / sum).toBeCloseTo(1, 8)
  })

  test('a disc that blends all round, against ½∫∫r² summed', () => {
    const body = plate(10, [circle(0, 0, 30)], (_, e) => (e === 0 ? blend(10, -20, 35) : blend(10, 35, -20)))
    const steps = 400
    let sum = 0
    for (let i = 0; i < steps; i++) {
      for (let k = 0; k < steps; k++) {
        const [share, d] = [(i + 0.5) / steps, (10 * (k + 0.5)) / steps]
        const r = 30 + d * (tan(-20) + share * (tan(35) - tan(-20)))
        sum += (r * r * Math.PI * 10) / (steps * steps)
      }
    }
    expect(volumeOf(body)! / sum).toBeCloseTo(1, 5)
  })
})

/** Where sides i and k of a polygon cross when each is moved out by its own offset (Cramer's rule). */
function crossing(vertices: readonly Point[], i: number, offset: number, k: number, other: number): Point {
  const lineOf = (e: number, out: number) => {
    const [a, b] = [vertices[e]!, vertices[(e + 1) % vertices.length]!]
    const length = Math.hypot(b.x - a.x, b.y - a.y)
    const [nx, ny] = [(b.y - a.y) / length, (a.x - b.x) / length]
    return [nx, ny, nx * a.x + ny * a.y + out] as const
  }
  const [a, b, c] = lineOf(i, offset)
  const [d, e, f] = lineOf(k, other)
  return { x: (c * e - b * f) / (a * e - b * d), y: (a * f - c * d) / (a * e - b * d) }
}

describe('mesh', () => {
  const walls = [blend(10, 0, 30), blend(10, 30, -20), blend(10, -20, 10), blend(10, 10, 0)]
  const body: Body = plate(10, [rectangle(0, 0, 100, 60), circle(50, 30, 10, true)], (l, e) =>
    l === 0 ? walls[e]! : e === 0 ? blend(10, 10, 20) : blend(10, 20, 10),
  )

  test.each([0.1, 0.01])('closed, and within %f mm of the body', (tolerance) => {
    const mesh = meshOf(body, tolerance)!
    const { unmatched, volume } = checkMesh(mesh)
    expect(unmatched).toBe(0)
    // No more than the tolerance over all the walls' area (some 3900 mm²).
    expect(Math.abs(volume - volumeOf(body)!)).toBeLessThan(tolerance * 3900)
  })

  test('normals are those of the triangles, turned a little by the twist', () => {
    const { positions, normals, indices } = meshOf(body, 0.02)!
    const at = (v: number) => [positions[3 * v]!, positions[3 * v + 1]!, positions[3 * v + 2]!] as const
    let checked = 0
    for (let t = 0; t < indices.length; t += 3) {
      const [a, b, c] = [at(indices[t]!), at(indices[t + 1]!), at(indices[t + 2]!)]
      const [ux, uy, uz] = [b[0] - a[0], b[1] - a[1], b[2] - a[2]]
      const [vx, vy, vz] = [c[0] - a[0], c[1] - a[1], c[2] - a[2]]
      const [nx, ny, nz] = [uy * vz - uz * vy, uz * vx - ux * vz, ux * vy - uy * vx]
      const size = Math.hypot(nx, ny, nz)
      for (let k = 0; k < 3; k++) {
        const v = indices[t + k]!
        const along = nx * normals[3 * v]! + ny * normals[3 * v + 1]! + nz * normals[3 * v + 2]!
        // From top to bottom the second side turns by atan(9.4 / 60), 9°, which one triangle spans; chords add a little.
        expect(along / size).toBeGreaterThan(Math.cos(10 * DEGREE))
        checked++
      }
    }
    expect(checked).toBeGreaterThan(1000)
  })
})
