import { Group, Mesh } from 'three'
import { edgeKey } from '../../../shared/walls/names.ts'
import type { CornerRef, EdgeRef } from '../../../shared/walls/types.ts'
import type { Basis } from '../camera/view-state.ts'
import { CutObject } from '../cut/cut-object.ts'
import type { CutPlane, CutSurface } from '../cut/slice.ts'
import { mix, type Palette } from '../palette.ts'
import { CornerDiscs } from './corner-discs.ts'
import { FaceMaterial } from './face-material.ts'
import { LineSet } from './line-set.ts'
import { cornerPoint, type MeshIndex } from './mesh-index.ts'
import { PartGeometry } from './part-geometry.ts'
import { paintVertices } from './paint.ts'

/** How far lines stand before the faces they lie on, px: half a thick line, so that none sinks in. */
const LINE_LIFT = 1.5
/** How far behind a face a line must be before it counts as hidden, px. */
const HIDDEN_LIFT = 4

/** Seams closer together than this on screen would only blacken the walls, px. */
const CROWDED = 4
/** Hidden seams closer together than this would only grey the face before them, px. */
const CROWDED_BEHIND = 24

export interface Dress {
  readonly palette: Palette
  readonly tiltOf: (loop: number, edge: number, facet: number) => number
  readonly selection: readonly EdgeRef[]
  readonly breaches: { readonly edges: readonly EdgeRef[]; readonly corners: readonly CornerRef[] }
  /** The mesh stops at the first event, above the bottom face. */
  readonly cutShort: boolean
}

/** Every object of the drawn part. React says what to show; this owns how, and the memory for it. */
export class PartScene {
  readonly group = new Group()
  readonly #part = new PartGeometry()
  readonly #faces = new FaceMaterial()
  readonly #discs = new CornerDiscs()
  readonly #cut = new CutObject()
  readonly #lines = {
    level: new LineSet({ width: 0.9, opacity: 0.5, order: 2 }),
    seam: new LineSet({ width: 1.1, opacity: 0.85, hidden: { width: 0.9, opacity: 0.22 }, order: 3 }),
    bottom: new LineSet({ width: 1.2, hidden: { width: 1, opacity: 0.45 }, order: 4 }),
    top: new LineSet({ width: 1.7, hidden: { width: 1.1, opacity: 0.4 }, order: 5 }),
    breach: new LineSet({ width: 2.2, hidden: { width: 1.4, opacity: 0.6 }, order: 6 }),
    hover: new LineSet({ width: 2.2, opacity: 0.75, hidden: { width: 1.6, opacity: 0.5 }, order: 7 }),
    thinSelect: new LineSet({ width: 1.6, hidden: { width: 1.2, opacity: 0.4 }, order: 8 }),
    select: new LineSet({ width: 4, hidden: { width: 2.4, opacity: 0.6 }, order: 9 }),
  }
  #index: MeshIndex | null = null
  #hovered: string | null = null

  constructor() {
    const faces = new Mesh(this.#part.geometry, this.#faces)
    faces.frustumCulled = false
    this.group.add(faces, this.#discs.object, this.#cut.group)
    for (const set of Object.values(this.#lines)) {
      this.group.add(set.shown, set.plain)
      if (set.behind) this.group.add(set.behind)
    }
    this.group.visible = false
  }

  get index(): MeshIndex | null {
    return this.#index
  }

  /** Refills the buffers for another shape. */
  shape(index: MeshIndex): void {
    this.#index = index
    this.#part.fill(index.mesh, index.centre)
    this.group.position.set(...index.centre)
    for (const kind of ['top', 'bottom', 'level', 'seam'] as const) {
      this.#lines[kind].fill(index.runs[kind], index.centre)
    }
    this.#lines.hover.fill([], index.centre)
    this.#hovered = null
    this.group.visible = true
  }

  /** Paints, and draws what is selected or breached. */
  dress({ palette, tiltOf, selection, breaches, cutShort }: Dress): void {
    const index = this.#index
    if (!index) return
    const input = { palette, tiltOf, selection, breachedEdges: breaches.edges }
    this.#part.paint((into) => paintVertices(index.mesh, index.faceOfVertex, input, into))
    this.#faces.dress(palette)
    const lines = this.#lines
    for (const kind of ['top', 'seam'] as const) lines[kind].colour(palette.ink)
    lines.level.colour(palette.ink)
    lines.bottom.colour(cutShort ? palette.breach : palette.ink)
    for (const kind of ['select', 'hover'] as const) lines[kind].colour(palette.select)
    lines.thinSelect.colour(mix(palette.select, palette.ink, 0.15))
    lines.breach.colour(palette.breach)
    this.#discs.colour(palette.breach, palette.sheet)
    this.#cut.dress(palette)

    const chosen = selection.flatMap((edge) => index.edges.get(edgeKey(edge)) ?? [])
    const broken = breaches.edges.flatMap((edge) => index.edges.get(edgeKey(edge)) ?? [])
    lines.select.fill(
      chosen.flatMap((edge) => edge.top),
      index.centre,
    )
    lines.thinSelect.fill(
      chosen.flatMap((edge) => [...edge.bottom, ...edge.level]),
      index.centre,
    )
    lines.breach.fill(
      broken.flatMap((edge) => edge.top),
      index.centre,
    )
    this.#discs.fill(
      breaches.corners.flatMap((corner) => wrap(cornerPoint(index, corner))),
      index.centre,
    )
  }

  /** Cuts the part open, or makes it whole again. */
  cut(cut: { plane: CutPlane; surface: CutSurface } | null): void {
    this.#cut.show(cut, this.#index?.centre ?? [0, 0, 0])
    const planes = cut ? [this.#cut.plane] : []
    this.#faces.clippingPlanes = planes
    for (const set of Object.values(this.#lines)) set.clip(planes)
  }

  /** Outlines the edge under the pointer; answers whether that is another one than before. */
  hover(edge: EdgeRef | null): boolean {
    const key = edge && edgeKey(edge)
    if (!this.#index || key === this.#hovered) return false
    this.#hovered = key
    const lines = key === null ? undefined : this.#index.edges.get(key)
    this.#lines.hover.fill(lines ? [...lines.top, ...lines.bottom] : [], this.#index.centre)
    return true
  }

  /** Before each frame: lines move toward the eye by a pixel or so, which an orthographic view cannot see. */
  face({ toward }: Basis, pixelsPerMm: number, pixelRatio: number): void {
    for (const set of Object.values(this.#lines)) {
      set.scale(pixelsPerMm)
      lift(set.shown, toward, LINE_LIFT / pixelsPerMm)
      lift(set.plain, toward, LINE_LIFT / pixelsPerMm)
      if (set.behind) lift(set.behind, toward, HIDDEN_LIFT / pixelsPerMm)
    }
    lift(this.#cut.lines.shown, toward, LINE_LIFT / pixelsPerMm)
    lift(this.#cut.lines.plain, toward, LINE_LIFT / pixelsPerMm)
    const apart = (this.#index?.meanEdge ?? 0) * pixelsPerMm
    this.#lines.seam.omit(apart < CROWDED, apart < CROWDED_BEHIND)
    this.#lines.level.omit(apart < CROWDED)
    // Nothing stands before the face that is turned to the eye, so its rim has no hidden part.
    this.#lines.top.omit(false, toward[2] > 0)
    this.#lines.bottom.omit(false, toward[2] < 0)
    this.#faces.setPixelRatio(pixelRatio)
    this.#discs.setPixelRatio(pixelRatio)
  }

  dispose(): void {
    this.#part.dispose()
    this.#faces.dispose()
    this.#discs.dispose()
    this.#cut.dispose()
    for (const set of Object.values(this.#lines)) set.dispose()
  }
}

function lift(object: { position: Group['position'] }, toward: Basis['toward'], distance: number): void {
  object.position.set(toward[0] * distance, toward[1] * distance, toward[2] * distance)
}

function wrap<T>(value: T | null): T[] {
  return value === null ? [] : [value]
}
