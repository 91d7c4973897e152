import type { BodyMesh } from '../../shared/solid/types.ts'

/**
 * The mesh with all its line points in one buffer, and the buffers to hand over: a thousand small ones would
 * cost the page more than the picture itself.
 */
export function packMesh(mesh: BodyMesh): { mesh: BodyMesh; buffers: ArrayBuffer[] } {
  const points = new Float64Array(mesh.lines.reduce((sum, line) => sum + line.points.length, 0))
  let at = 0
  const lines = mesh.lines.map((line) => {
    points.set(line.points, at)
    const view = points.subarray(at, (at += line.points.length))
    return { ...line, points: view }
  })
  const arrays = [mesh.positions, mesh.normals, mesh.indices, mesh.faceOfTriangle, points]
  return {
    mesh: { ...mesh, lines },
    buffers: [...new Set(arrays.map(({ buffer }) => buffer as ArrayBuffer))],
  }
}
