import {
  BufferAttribute,
  BufferGeometry,
  DoubleSide,
  Group,
  Mesh,
  MeshBasicMaterial,
  Plane,
  Vector3,
} from 'three'
import { mix, type Palette } from '../palette.ts'
import { LineSet } from '../scene/line-set.ts'
import { shiftInto } from '../scene/part-geometry.ts'
import type { CutPlane, CutSurface } from './slice.ts'

/** How far the cut surface's colour goes from the face's toward the accent of what is selected. */
const ACCENT = 0.22

/** The cut surface and its outline, and the plane that the rest of the picture is cut off at. */
export class CutObject {
  readonly group = new Group()
  readonly lines = new LineSet({ width: 1.8, order: 10 })
  /** In the world's frame, as three wants it: what lies on its far side is not drawn. */
  readonly plane = new Plane()
  readonly #geometry = new BufferGeometry()
  readonly #material = new MeshBasicMaterial({ side: DoubleSide })

  constructor() {
    const surface = new Mesh(this.#geometry, this.#material)
    surface.frustumCulled = false
    this.group.add(surface, this.lines.shown, this.lines.plain)
    this.group.visible = false
  }

  /** `origin`: where the group stands. Null takes the cut away. */
  show(
    cut: { plane: CutPlane; surface: CutSurface } | null,
    origin: readonly [number, number, number],
  ): void {
    this.group.visible = cut !== null
    if (!cut) return
    const { normal, at } = cut.plane
    this.plane.set(new Vector3(...normal).negate(), at)
    const positions = new Float32Array(cut.surface.positions.length)
    shiftInto(positions, cut.surface.positions, origin)
    this.#geometry.dispose()
    this.#geometry.setAttribute('position', new BufferAttribute(positions, 3))
    this.#geometry.setIndex(new BufferAttribute(cut.surface.indices, 1))
    this.lines.fill(cut.surface.outlines, origin)
  }

  dress({ face, select }: Palette): void {
    const [r, g, b] = mix(face, select, ACCENT)
    // Tokens are in the screen's colour space already, and the picture is not tone-mapped.
    this.#material.color.setRGB(r / 255, g / 255, b / 255, 'srgb')
    this.lines.colour(select)
  }

  dispose(): void {
    this.#geometry.dispose()
    this.#material.dispose()
    this.lines.dispose()
  }
}
