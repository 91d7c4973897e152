import { edgeKey } from '../../../shared/walls/names.ts'
import type { BodyMesh } from '../../../shared/solid/types.ts'
import type { CornerRef, EdgeRef } from '../../../shared/walls/types.ts'
import { boxOf } from './line-runs.ts'
import { faceOfVertices } from './paint.ts'

/** The lines of one edge. */
export interface EdgeLines {
  readonly edge: EdgeRef
  readonly top: Float64Array[]
  readonly bottom: Float64Array[]
  readonly level: Float64Array[]
  /** Length of the top line, mm. */
  length: number
}

/** What the viewer looks up in a mesh again and again. */
export interface MeshIndex {
  readonly mesh: BodyMesh
  readonly centre: readonly [number, number, number]
  /** Radius of the sphere round the box of the part, mm; 0 for an empty mesh. */
  readonly radius: number
  readonly faceOfVertex: Uint32Array
  /** Mean length of the top lines, mm. */
  readonly meanEdge: number
  readonly edges: ReadonlyMap<string, EdgeLines>
  readonly runs: Readonly<Record<'top' | 'bottom' | 'level' | 'seam', Float64Array[]>>
}

export function indexMesh(mesh: BodyMesh): MeshIndex {
  const box = boxOf(mesh.positions)
  const edges = new Map<string, EdgeLines>()
  const runs = {
    top: [] as Float64Array[],
    bottom: [] as Float64Array[],
    level: [] as Float64Array[],
    seam: [] as Float64Array[],
  }
  for (const { kind, loop, edge, points } of mesh.lines) {
    runs[kind].push(points)
    if (kind === 'seam' || edge === null) continue
    const key = edgeKey({ loop, edge })
    let lines = edges.get(key)
    if (!lines) edges.set(key, (lines = { edge: { loop, edge }, top: [], bottom: [], level: [], length: 0 }))
    lines[kind].push(points)
    if (kind === 'top') lines.length += lengthOf(points)
  }
  const total = [...edges.values()].reduce((sum, { length }) => sum + length, 0)
  return {
    mesh,
    meanEdge: edges.size === 0 ? 0 : total / edges.size,
    centre: box?.centre ?? [0, 0, 0],
    radius: box?.radius ?? 0,
    faceOfVertex: faceOfVertices(mesh),
    edges,
    runs,
  }
}

/** Where a corner stands on the top face: where its edge starts. */
export function cornerPoint(index: MeshIndex, { loop, vertex }: CornerRef): [number, number, number] | null {
  const run = index.edges.get(edgeKey({ loop, edge: vertex }))?.top[0]
  return run && run.length >= 3 ? [run[0]!, run[1]!, run[2]!] : null
}

export function lengthOf(run: Float64Array): number {
  let length = 0
  for (let i = 3; i + 2 < run.length; i += 3) {
    length += Math.hypot(run[i]! - run[i - 3]!, run[i + 1]! - run[i - 2]!, run[i + 2]! - run[i - 1]!)
  }
  return length
}
