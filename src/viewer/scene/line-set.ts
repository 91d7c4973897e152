import {
  BufferAttribute,
  BufferGeometry,
  Color,
  DynamicDrawUsage,
  GreaterDepth,
  InstancedInterleavedBuffer,
  InterleavedBufferAttribute,
  LessEqualDepth,
  LineBasicMaterial,
  LineSegments,
  type Plane,
} from 'three'
import { LineMaterial } from 'three/examples/jsm/lines/LineMaterial.js'
import { LineSegments2 } from 'three/examples/jsm/lines/LineSegments2.js'
import { LineSegmentsGeometry } from 'three/examples/jsm/lines/LineSegmentsGeometry.js'
import type { Rgb } from '../palette.ts'
import { segmentsOf } from './line-runs.ts'

/** Room that a grown buffer gets beyond what it needs, so that typing does not reallocate each time. */
const HEADROOM = 1.25

/** Dash and gap of a hidden line, px. */
const DASH = { dash: 5, gap: 4 }

/**
 * Above this many segments a set is drawn as the graphics card's own one-pixel lines, and its hidden part not
 * at all: a ruled line costs six triangles a segment and twice that with its hidden part.
 */
export const RULED_UP_TO = 6_000

/** Lines at least this wide get ends that close their corners, px; on thinner ones nobody would see them. */
const CAPPED_FROM = 2
/** The two triangles between a segment's ends, of the six that the geometry has with its caps. */
const BODY_ONLY = [2, 4, 3, 4, 5, 3]

export interface LineStyle {
  /** Width where the line is in sight, px; 0 draws no such line. */
  readonly width: number
  readonly opacity?: number
  /** The same lines where something stands before them; absent: not drawn. */
  readonly hidden?: { readonly width: number; readonly opacity: number }
  /** Drawn later over earlier ones. */
  readonly order: number
}

/**
 * All lines of one style as one object: a buffer that is refilled, drawn once where it is in sight and once
 * more, dashed, where it is hidden (the depth test turned round).
 */
export class LineSet {
  readonly shown: LineSegments2
  readonly behind: LineSegments2 | null
  /** The same lines without width, for many. */
  readonly plain: LineSegments
  readonly #geometry = new LineSegmentsGeometry()
  readonly #plainGeometry = new BufferGeometry()
  readonly #plainMaterial = new LineBasicMaterial({ transparent: true, depthWrite: false })
  readonly #materials: LineMaterial[] = []
  #capacity = 0
  #positions = new InstancedInterleavedBuffer(new Float32Array(0), 6, 1)
  #distances = new InstancedInterleavedBuffer(new Float32Array(0), 2, 1)

  constructor(style: LineStyle) {
    if (style.width < CAPPED_FROM) this.#geometry.setIndex(BODY_ONLY)
    this.#reserve(1)
    this.#plainMaterial.opacity = style.opacity ?? 1
    this.plain = new LineSegments(this.#plainGeometry, this.#plainMaterial)
    this.plain.renderOrder = style.order
    this.plain.frustumCulled = false
    this.plain.visible = false
    this.shown = this.#object(
      new LineMaterial({ linewidth: style.width, opacity: style.opacity ?? 1, depthFunc: LessEqualDepth }),
      style.order,
    )
    this.behind = style.hidden
      ? this.#object(
          new LineMaterial({
            linewidth: style.hidden.width,
            opacity: style.hidden.opacity,
            depthFunc: GreaterDepth,
            dashed: true,
            dashSize: DASH.dash,
            gapSize: DASH.gap,
          }),
          style.order - 0.5,
        )
      : null
  }

  /** Replaces the lines by these polylines. */
  fill(runs: readonly Float64Array[], origin: readonly [number, number, number]): void {
    const { positions, distances, count } = segmentsOf(runs, origin)
    if (count > this.#capacity) this.#reserve(Math.ceil(count * HEADROOM))
    this.#positions.array.set(positions)
    this.#distances.array.set(distances)
    this.#positions.needsUpdate = true
    this.#distances.needsUpdate = true
    this.#geometry.instanceCount = count
    if (count > RULED_UP_TO) this.#fillPlain(count)
    this.omit(false)
  }

  colour([r, g, b]: Rgb): void {
    const colour = new Color(`rgb(${r},${g},${b})`)
    this.#plainMaterial.color = colour
    for (const material of this.#materials) material.color = colour
  }

  /** Draws the lines only on the near side of these planes. */
  clip(planes: Plane[]): void {
    this.#plainMaterial.clippingPlanes = planes
    for (const material of this.#materials) material.clippingPlanes = planes
  }

  /** Leaves the lines, or only their hidden part, out of the picture without forgetting them. */
  omit(omitted: boolean, omittedBehind = omitted): void {
    const count = omitted ? 0 : this.#geometry.instanceCount
    const many = count > RULED_UP_TO
    this.plain.visible = many
    this.shown.visible = count > 0 && !many
    if (this.behind) this.behind.visible = count > 0 && !many && !omittedBehind
  }

  /** Keeps dashes the same length on screen at any zoom. */
  scale(pixelsPerMm: number): void {
    for (const material of this.#materials) material.dashScale = pixelsPerMm
  }

  dispose(): void {
    this.#geometry.dispose()
    this.#plainGeometry.dispose()
    this.#plainMaterial.dispose()
    for (const material of this.#materials) material.dispose()
  }

  /** Start and end in turn is how both kinds of line want their points, so the array is shared. */
  #fillPlain(count: number): void {
    const positions = this.#plainGeometry.getAttribute('position')
    if (positions?.array === this.#positions.array) positions.needsUpdate = true
    else {
      this.#plainGeometry.dispose()
      this.#plainGeometry.setAttribute('position', new BufferAttribute(this.#positions.array, 3))
    }
    this.#plainGeometry.setDrawRange(0, count * 2)
  }

  #object(material: LineMaterial, order: number): LineSegments2 {
    material.transparent = true
    material.depthWrite = false
    this.#materials.push(material)
    const object = new LineSegments2(this.#geometry, material)
    object.renderOrder = order
    object.frustumCulled = false
    object.visible = false
    return object
  }

  #reserve(capacity: number): void {
    // Frees the old buffers on the graphics side; they are made anew at the next frame.
    this.#geometry.dispose()
    this.#capacity = capacity
    this.#positions = new InstancedInterleavedBuffer(new Float32Array(capacity * 6), 6, 1)
    this.#distances = new InstancedInterleavedBuffer(new Float32Array(capacity * 2), 2, 1)
    this.#positions.setUsage(DynamicDrawUsage)
    this.#distances.setUsage(DynamicDrawUsage)
    const attribute = (buffer: InstancedInterleavedBuffer, size: number, offset: number) =>
      new InterleavedBufferAttribute(buffer, size, offset)
    this.#geometry.setAttribute('instanceStart', attribute(this.#positions, 3, 0))
    this.#geometry.setAttribute('instanceEnd', attribute(this.#positions, 3, 3))
    this.#geometry.setAttribute('instanceDistanceStart', attribute(this.#distances, 1, 0))
    this.#geometry.setAttribute('instanceDistanceEnd', attribute(this.#distances, 1, 1))
    this.#geometry.instanceCount = 0
  }
}
