import {
  Color,
  DynamicDrawUsage,
  GreaterDepth,
  InstancedInterleavedBuffer,
  InterleavedBufferAttribute,
  LessEqualDepth,
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
  readonly #geometry = new LineSegmentsGeometry()
  readonly #materials: LineMaterial[] = []
  #capacity = 0
  #positions = new InstancedInterleavedBuffer(new Float32Array(0), 6, 1)
  #distances = new InstancedInterleavedBuffer(new Float32Array(0), 2, 1)

  constructor(style: LineStyle) {
    this.#reserve(1)
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
    this.shown.visible = count > 0
    if (this.behind) this.behind.visible = count > 0
  }

  colour([r, g, b]: Rgb): void {
    for (const material of this.#materials) material.color = new Color(`rgb(${r},${g},${b})`)
  }

  /** Keeps dashes the same length on screen at any zoom. */
  scale(pixelsPerMm: number): void {
    for (const material of this.#materials) material.dashScale = pixelsPerMm
  }

  dispose(): void {
    this.#geometry.dispose()
    for (const material of this.#materials) material.dispose()
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
