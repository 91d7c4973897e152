import { describe, expect, test } from 'vitest'
import { contourArea } from '../../../shared/contours/check.ts'
import { contourAt } from '../../../shared/contours/contour.ts'
import { meshOf } from '../../../shared/solid/mesh.ts'
import { volumeOf } from '../../../shared/solid/volume.ts'
import { sliceMesh } from '../../../src/viewer/cut/slice.ts'
import { circle, facets, plate, rectangle } from '../../support/plates.ts'

const body = plate(
  20,
  [rectangle(0, 0, 120, 80), circle(40, 40, 15, true), circle(85, 40, 10, true)],
  (loop, edge) => (loop === 0 ? facets([12, 25 - 5 * edge], [20, 0]) : facets([20, -10])),
)
const mesh = meshOf(body, 1e-3)!
const coarse = meshOf(body, 0.02)!

describe('a plane through a bevelled plate with two holes', () => {
  test.each([0.5, 7, 12, 19.5])('flat, at depth %f: the area of the contour there', (depth) => {
    const cut = sliceMesh(mesh, { normal: [0, 0, 1], at: -depth })
    expect(cut.outlines).toHaveLength(3)
    expect(cut.area).toBeCloseTo(contourArea(contourAt(body, depth)), 0)
    expect(triangleArea(cut)).toBeCloseTo(cut.area, 6)
  })

  test('upright through both holes: three pieces, and their areas add up to the volume', () => {
    expect(sliceMesh(mesh, { normal: [0, 1, 0], at: 40 }).outlines).toHaveLength(3)
    let volume = 0
    const [from, to, steps] = [-12, 132, 600]
    for (let i = 0; i < steps; i++) {
      const at = from + ((i + 0.5) * (to - from)) / steps
      volume += (sliceMesh(coarse, { normal: [1, 0, 0], at }).area * (to - from)) / steps
    }
    expect(volume / volumeOf(body)!).toBeCloseTo(1, 3)
  })

  test('aslant: triangles fill the outlines; beside the part there is nothing', () => {
    const [x, y, z] = [0.48, 0.6, 0.64]
    const cut = sliceMesh(mesh, { normal: [x, y, z], at: 48 })
    expect(cut.area).toBeGreaterThan(500)
    expect(triangleArea(cut)).toBeCloseTo(cut.area, 6)
    expect(sliceMesh(mesh, { normal: [1, 0, 0], at: 500 }).outlines).toHaveLength(0)
  })
})

function triangleArea({ positions, indices }: { positions: Float64Array; indices: Uint32Array }): number {
  let area = 0
  const at = (i: number, axis: number) => positions[3 * indices[i]! + axis]!
  for (let t = 0; t < indices.length; t += 3) {
    const [a, b] = [1, 2].map((k) => [0, 1, 2].map((axis) => at(t + k, axis) - at(t, axis)))
    area +=
      Math.hypot(
        a![1]! * b![2]! - a![2]! * b![1]!,
        a![2]! * b![0]! - a![0]! * b![2]!,
        a![0]! * b![1]! - a![1]! * b![0]!,
      ) / 2
  }
  return area
}
