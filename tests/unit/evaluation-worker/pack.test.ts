import { expect, it } from 'vitest'
import type { BodyMesh } from '../../../shared/solid/types.ts'
import { packMesh } from '../../../src/evaluation/pack.ts'

const line = (...points: number[]): BodyMesh['lines'][number] => ({
  kind: 'top',
  loop: 0,
  edge: 0,
  vertex: null,
  points: new Float64Array(points),
})

const mesh: BodyMesh = {
  positions: new Float64Array([0, 0, 0]),
  normals: new Float64Array([0, 0, 1]),
  indices: new Uint32Array([0, 0, 0]),
  faceOfTriangle: new Uint32Array([0]),
  faces: [{ kind: 'top' }],
  lines: [line(1, 2, 3), line(4, 5, 6, 7, 8, 9)],
  depth: 10,
}

it('hands the mesh over whole, with the points of all lines in one buffer', () => {
  const expected = structuredClone(mesh)
  const packed = packMesh(mesh)
  expect(packed.buffers).toHaveLength(5)
  const received = structuredClone(packed.mesh, { transfer: packed.buffers })
  expect(received).toEqual(expected)
  expect(packed.mesh.positions.length).toBe(0)
  expect(new Set(received.lines.map(({ points }) => points.buffer)).size).toBe(1)
})
