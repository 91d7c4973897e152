import type { Point } from '../geometry/types.ts'
import type { BodyMesh, MeshFace, MeshLine } from './types.ts'

/** Collects a mesh; triangles with two corners on one spot (a seam that ends, a step that closes) are left out. */
export class MeshSink {
  private readonly positions: number[] = []
  private readonly normals: number[] = []
  private readonly indices: number[] = []
  private readonly faceOfTriangle: number[] = []
  private readonly faces: MeshFace[] = []

  get vertexCount(): number {
    return this.positions.length / 3
  }

  vertex({ x, y }: Point, depth: number, nx: number, ny: number, nz: number): void {
    // Adding 0 turns −0 into 0, so that equal positions are equal bit for bit.
    this.positions.push(x + 0, y + 0, 0 - depth)
    this.normals.push(nx, ny, nz)
  }

  face(face: MeshFace): number {
    return this.faces.push(face) - 1
  }

  triangle(face: number, a: number, b: number, c: number): void {
    if (this.samePlace(a, b) || this.samePlace(b, c) || this.samePlace(c, a)) return
    this.indices.push(a, b, c)
    this.faceOfTriangle.push(face)
  }

  finish(lines: MeshLine[], depth: number): BodyMesh {
    return {
      positions: Float64Array.from(this.positions),
      normals: Float64Array.from(this.normals),
      indices: Uint32Array.from(this.indices),
      faceOfTriangle: Uint32Array.from(this.faceOfTriangle),
      faces: this.faces,
      lines,
      depth,
    }
  }

  private samePlace(a: number, b: number): boolean {
    const p = this.positions
    return p[3 * a] === p[3 * b] && p[3 * a + 1] === p[3 * b + 1] && p[3 * a + 2] === p[3 * b + 2]
  }
}
