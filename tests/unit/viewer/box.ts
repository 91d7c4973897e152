import type { BodyMesh, MeshFace, MeshLine } from '../../../shared/solid/types.ts'

/**
 * A plate 100 × 60 × 20 mm with square walls, made by hand: corners counter-clockwise from the origin,
 * edge 0 along the front. Two triangles per face, no vertex shared between faces.
 */
export const BOX = { width: 100, depth: 60, thickness: 20 }

type Xyz = readonly [number, number, number]

export function boxMesh(at: Xyz = [0, 0, 0]): BodyMesh {
  const corners: readonly (readonly [number, number])[] = [
    [0, 0],
    [BOX.width, 0],
    [BOX.width, BOX.depth],
    [0, BOX.depth],
  ]
  const point = (i: number, z: number): Xyz => {
    const [x, y] = corners[i % 4]!
    return [x + at[0], y + at[1], z + at[2]]
  }
  const low = -BOX.thickness
  const quads: { face: MeshFace; normal: Xyz; points: Xyz[] }[] = [
    { face: { kind: 'top' }, normal: [0, 0, 1], points: [0, 1, 2, 3].map((i) => point(i, 0)) },
    { face: { kind: 'bottom' }, normal: [0, 0, -1], points: [3, 2, 1, 0].map((i) => point(i, low)) },
  ]
  const normals: Xyz[] = [
    [0, -1, 0],
    [1, 0, 0],
    [0, 1, 0],
    [-1, 0, 0],
  ]
  const lines: MeshLine[] = []
  for (let edge = 0; edge < 4; edge++) {
    quads.push({
      face: { kind: 'wall', loop: 0, edge, facet: 0 },
      normal: normals[edge]!,
      points: [point(edge, low), point(edge + 1, low), point(edge + 1, 0), point(edge, 0)],
    })
    const run = (a: Xyz, b: Xyz) => new Float64Array([...a, ...b])
    lines.push({ kind: 'top', loop: 0, edge, vertex: null, points: run(point(edge, 0), point(edge + 1, 0)) })
    lines.push({
      kind: 'bottom',
      loop: 0,
      edge,
      vertex: null,
      points: run(point(edge, low), point(edge + 1, low)),
    })
    lines.push({
      kind: 'seam',
      loop: 0,
      edge: null,
      vertex: edge,
      points: run(point(edge, 0), point(edge, low)),
    })
  }
  return {
    positions: new Float64Array(quads.flatMap(({ points }) => points.flat())),
    normals: new Float64Array(quads.flatMap(({ normal, points }) => points.flatMap(() => [...normal]))),
    indices: new Uint32Array(quads.flatMap((_, i) => [0, 1, 2, 0, 2, 3].map((corner) => i * 4 + corner))),
    faceOfTriangle: new Uint32Array(quads.flatMap((_, i) => [i, i])),
    faces: quads.map(({ face }) => face),
    lines,
    depth: BOX.thickness,
  }
}
