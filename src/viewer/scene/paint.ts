import { edgeKey } from '../../../shared/walls/names.ts'
import type { BodyMesh, MeshFace } from '../../../shared/solid/types.ts'
import type { EdgeRef } from '../../../shared/walls/types.ts'
import { mix, type Palette, type Rgb } from '../palette.ts'

/** Share of the selection colour in a selected wall. */
const SELECT_SHARE = 0.14
/** How far the underside stands back from the top face. */
const UNDERSIDE_SHARE = 0.12

export interface PaintInput {
  readonly palette: Palette
  readonly tiltOf: (loop: number, edge: number, facet: number) => number
  readonly selection: readonly EdgeRef[]
  readonly breachedEdges: readonly EdgeRef[]
}

/** Which face a vertex belongs to; vertices are not shared between faces. */
export function faceOfVertices(mesh: BodyMesh): Uint32Array {
  const faces = new Uint32Array(mesh.positions.length / 3)
  for (let corner = 0; corner < mesh.indices.length; corner++) {
    faces[mesh.indices[corner]!] = mesh.faceOfTriangle[Math.floor(corner / 3)]!
  }
  return faces
}

/**
 * Colour of every vertex as RGBA bytes. RGB is the face's colour; A says whether the breach hatch is drawn
 * over it (255) or not (0). `into` must hold four bytes per vertex.
 */
export function paintVertices(
  mesh: BodyMesh,
  faceOfVertex: Uint32Array,
  input: PaintInput,
  into: Uint8Array,
): void {
  const selected = new Set(input.selection.map(edgeKey))
  const breached = new Set(input.breachedEdges.map(edgeKey))
  const table = mesh.faces.map((face) => paintOf(face, input, selected, breached))
  for (let vertex = 0; vertex < faceOfVertex.length; vertex++) {
    const [rgb, hatched] = table[faceOfVertex[vertex]!]!
    into.set(rgb, vertex * 4)
    into[vertex * 4 + 3] = hatched ? 255 : 0
  }
}

function paintOf(
  face: MeshFace,
  { palette, tiltOf }: PaintInput,
  selected: ReadonlySet<string>,
  breached: ReadonlySet<string>,
): readonly [Rgb, boolean] {
  switch (face.kind) {
    case 'top':
      return [palette.face, false]
    case 'bottom':
      return [mix(palette.face, palette.muted, UNDERSIDE_SHARE), false]
    case 'step':
      return [mix(palette.tilt(0), palette.muted, 0.4), false]
    case 'wall': {
      const key = edgeKey(face)
      const own = palette.tilt(tiltOf(face.loop, face.edge, face.facet))
      return [selected.has(key) ? mix(own, palette.select, SELECT_SHARE) : own, breached.has(key)]
    }
  }
}
