import { BufferAttribute, BufferGeometry, FrontSide, Ray, Vector3 } from 'three'
import { MeshBVH } from 'three-mesh-bvh'
import type { EdgeRef } from '../../../shared/walls/types.ts'
import type { MeshFace } from '../../../shared/solid/types.ts'
import {
  along,
  basisOf,
  projector,
  unproject,
  type Frame,
  type Vec3,
  type ViewState,
} from '../camera/view-state.ts'
import type { MeshIndex } from '../scene/mesh-index.ts'
import { shiftInto } from '../scene/part-geometry.ts'
import type { CutPlane } from '../cut/slice.ts'
import { nearestLine } from './nearest-line.ts'

type Hit = ReturnType<MeshBVH['raycast']>[number]

/** A face nearer than this before a point is the one the point lies on, as a share of the part's radius. */
const CLEAR = 2e-3

/** Answers what is under a pixel. The search tree is built when first asked for, once per mesh. */
export class Picker {
  #index: MeshIndex | null = null
  #tree: MeshBVH | null = null
  #cut: CutPlane | null = null

  setIndex(index: MeshIndex): void {
    this.#index = index
    this.#tree = null
  }

  /** What lies beyond the plane is not there. */
  setCut(plane: CutPlane | null): void {
    this.#cut = plane
  }

  /** The face that is seen from `toward` at a point of the plate's frame, and how far before the point it is. */
  seen(point: Vec3, toward: Vec3): { face: MeshFace; before: number } | null {
    const index = this.#index
    if (!index || index.mesh.indices.length === 0) return null
    this.#tree ??= buildTree(index)
    const far = index.radius * 2 + distance(point, index.centre)
    const start = along(point, toward, far).map(
      (value, axis) => value - index.centre[axis]!,
    ) as unknown as Vec3
    const ray = new Ray(new Vector3(...start), new Vector3(...toward).negate())
    const hit = this.#cut
      ? this.#tree
          .raycast(ray, FrontSide)
          .filter(({ distance: way }) => this.#stays(along(start, toward, -way), index.centre))
          .reduce<Hit | null>((near, other) => (near && near.distance <= other.distance ? near : other), null)
      : this.#tree.raycastFirst(ray, FrontSide)
    if (!hit || hit.faceIndex === null || hit.faceIndex === undefined) return null
    const face = index.mesh.faces[index.mesh.faceOfTriangle[hit.faceIndex]!]
    return face ? { face, before: far - hit.distance } : null
  }

  #stays(point: Vec3, centre: Vec3): boolean {
    if (!this.#cut) return true
    const { normal, at } = this.#cut
    return normal.reduce((sum, value, axis) => sum + value * (point[axis]! + centre[axis]!), -at) <= 0
  }

  /** The edge meant by a pixel: the wall under it, else a rim within `reach` px. */
  edgeAt(view: ViewState, frame: Frame, x: number, y: number, reach: number): EdgeRef | null {
    const index = this.#index
    if (!index) return null
    const face = this.seen(unproject(view, frame, x, y), basisOf(view).toward)?.face
    if (face?.kind === 'wall') return { loop: face.loop, edge: face.edge }
    const rim = face?.kind === 'top' ? 'top' : face?.kind === 'bottom' ? 'bottom' : 'either'
    return nearestLine(index, projector(view, frame), x, y, reach, rim)
  }

  /** Whether a point of an edge's wall, or a wall of that edge before it, is seen from `toward`. */
  sees(edge: EdgeRef, point: Vec3, toward: Vec3): boolean {
    const seen = this.seen(point, toward)
    if (!seen || seen.before <= this.#index!.radius * CLEAR) return true
    const { face } = seen
    return face.kind === 'wall' && face.loop === edge.loop && face.edge === edge.edge
  }
}

function buildTree(index: MeshIndex): MeshBVH {
  const { mesh, centre } = index
  const positions = new Float32Array(mesh.positions.length)
  shiftInto(positions, mesh.positions, centre)
  const geometry = new BufferGeometry()
  geometry.setAttribute('position', new BufferAttribute(positions, 3))
  geometry.setIndex(new BufferAttribute(mesh.indices, 1))
  // Indirect: the triangles keep their order, and with it their row in `faceOfTriangle`.
  return new MeshBVH(geometry, { indirect: true })
}

function distance(a: Vec3, b: Vec3): number {
  return Math.hypot(a[0] - b[0], a[1] - b[1], a[2] - b[2])
}
