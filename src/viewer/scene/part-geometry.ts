import { BufferAttribute, BufferGeometry, DynamicDrawUsage } from 'three'
import type { BodyMesh } from '../../../shared/solid/types.ts'

const HEADROOM = 1.25

type Point = readonly [number, number, number]

/**
 * The one owner of the faces' buffers: made once, refilled for each mesh, grown with room to spare,
 * disposed with the viewer.
 */
export class PartGeometry {
  readonly geometry = new BufferGeometry()
  #vertices = 0
  #indices = 0

  constructor() {
    this.#reserve(1, 3)
  }

  /** Takes the mesh's shape; `origin` is taken off first, in double precision. */
  fill(mesh: BodyMesh, origin: Point): void {
    const vertices = mesh.positions.length / 3
    if (vertices > this.#vertices || mesh.indices.length > this.#indices) {
      this.#reserve(Math.ceil(vertices * HEADROOM), Math.ceil(mesh.indices.length * HEADROOM))
    }
    shiftInto(this.#attribute('position').array as Float32Array, mesh.positions, origin)
    ;(this.#attribute('normal').array as Float32Array).set(mesh.normals)
    const index = this.geometry.index!
    ;(index.array as Uint32Array).set(mesh.indices)
    for (const buffer of [this.#attribute('position'), this.#attribute('normal'), index]) {
      buffer.needsUpdate = true
    }
    this.geometry.setDrawRange(0, mesh.indices.length)
  }

  /** Lets `write` change the RGBA bytes of the vertices. */
  paint(write: (into: Uint8Array) => void): void {
    const paint = this.#attribute('paint')
    write(paint.array as Uint8Array)
    paint.needsUpdate = true
  }

  dispose(): void {
    this.geometry.dispose()
  }

  #attribute(name: 'position' | 'normal' | 'paint'): BufferAttribute {
    return this.geometry.getAttribute(name) as BufferAttribute
  }

  #reserve(vertices: number, indices: number): void {
    this.geometry.dispose()
    this.#vertices = vertices
    this.#indices = indices
    const dynamic = (attribute: BufferAttribute) => attribute.setUsage(DynamicDrawUsage)
    this.geometry.setAttribute('position', dynamic(new BufferAttribute(new Float32Array(vertices * 3), 3)))
    this.geometry.setAttribute('normal', dynamic(new BufferAttribute(new Float32Array(vertices * 3), 3)))
    this.geometry.setAttribute('paint', dynamic(new BufferAttribute(new Uint8Array(vertices * 4), 4, true)))
    this.geometry.setIndex(dynamic(new BufferAttribute(new Uint32Array(indices), 1)))
  }
}

/** Single-precision copy of xyz positions with the origin taken off first. */
export function shiftInto(into: Float32Array, positions: Float64Array, origin: Point): void {
  for (let i = 0; i < positions.length; i++) into[i] = positions[i]! - origin[i % 3]!
}
