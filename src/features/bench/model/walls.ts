import type { SaveSetup } from '../../../../shared/api/setups.ts'
import { edgeKey } from '../../../../shared/walls/names.ts'
import type { EdgeRef } from '../../../../shared/walls/types.ts'
import type { FacetSpec, WallSpec } from '../../../../shared/walls/schema.ts'
import type { JointSpec } from '../../../../shared/setup/schema.ts'

/** Reading and changing walls and joints in the content being edited. mm; degrees, positive outward. */

export type Facets = readonly FacetSpec[]

type Walls = SaveSetup['walls']

const squares = new Map<number, Facets>()

/** The same value for the same thickness, so that a thousand square edges are told apart by nothing. */
export function squareFacets(thickness: number): Facets {
  let facets = squares.get(thickness)
  if (facets === undefined) {
    facets = [{ depth: thickness, tilt: 0 }]
    squares.set(thickness, facets)
  }
  return facets
}

const indexes = new WeakMap<Walls, ReadonlyMap<string, Facets>>()

/** Facets by edge key; made once per list of walls. */
function indexOf(walls: Walls): ReadonlyMap<string, Facets> {
  let index = indexes.get(walls)
  if (index === undefined) {
    index = new Map(walls.map((wall) => [edgeKey(wall), wall.facets]))
    indexes.set(walls, index)
  }
  return index
}

export function facetsOf(content: Pick<SaveSetup, 'walls' | 'plate'>, edge: EdgeRef): Facets {
  return indexOf(content.walls).get(edgeKey(edge)) ?? squareFacets(content.plate.thickness)
}

/** The content with new facets for these edges; square walls are left out, as an unnamed edge is square. */
export function withFacets(
  content: SaveSetup,
  edges: readonly EdgeRef[],
  change: (facets: Facets, edge: EdgeRef) => Facets,
): SaveSetup {
  const index = new Map(indexOf(content.walls))
  let changed = false
  for (const edge of edges) {
    const before = facetsOf(content, edge)
    const after = change(before, edge)
    if (sameFacets(before, after)) continue
    changed = true
    if (isSquare(after)) index.delete(edgeKey(edge))
    else index.set(edgeKey(edge), after)
  }
  return changed ? { ...content, walls: wallsFrom(index) } : content
}

function wallsFrom(index: ReadonlyMap<string, Facets>): WallSpec[] {
  return [...index]
    .map(([key, facets]) => {
      const [loop, edge] = key.split('-').map(Number) as [number, number]
      return { loop, edge, facets: [...facets] }
    })
    .sort((a, b) => a.loop - b.loop || a.edge - b.edge)
}

export function isSquare(facets: Facets): boolean {
  return facets.every(({ tilt, endTilt = tilt }) => tilt === 0 && endTilt === 0)
}

export function sameFacets(a: Facets, b: Facets): boolean {
  return (
    a.length === b.length &&
    a.every(({ depth, tilt, endTilt = tilt }, i) => {
      const other = b[i]!
      return depth === other.depth && tilt === other.tilt && endTilt === (other.endTilt ?? other.tilt)
    })
  )
}

/** One facet at another tilt, along the whole edge; with `endTilt` it blends from the one into the other. */
export function withTilt(facets: Facets, facet: number, tilt: number, endTilt = tilt): Facets {
  return facets.map(({ depth, ...tilts }, i) => {
    if (i !== facet) return { depth, ...tilts }
    return endTilt === tilt ? { depth, tilt } : { depth, tilt, endTilt }
  })
}

/** Heights of the facets, from the top. */
export function heightsOf(facets: Facets): number[] {
  return facets.map(({ depth }, i) => depth - (facets[i - 1]?.depth ?? 0))
}

/** Most height that a facet can take before the one that gives way is gone, mm. */
export function roomFor(facets: Facets, facet: number): number {
  const heights = heightsOf(facets)
  return heights[facet]! + heights[givesWay(facets, facet)]!
}

/** A facet of another height; the facet below gives way, for the last one the facet above. */
export function withHeight(facets: Facets, facet: number, height: number): FacetSpec[] {
  const boundary = Math.min(facet, givesWay(facets, facet))
  const top = facets[boundary - 1]?.depth ?? 0
  const end = facets[boundary + 1]!.depth
  const depth = boundary === facet ? top + height : end - height
  return facets.map((each, i) => (i === boundary ? { ...each, depth } : each))
}

function givesWay(facets: Facets, facet: number): number {
  return facet === facets.length - 1 ? facet - 1 : facet + 1
}

/**
 * The same prep in a plate of another thickness: root faces (upright facets beside a bevel) keep their
 * height, and the bevels share the rest as they did. Where the plate is too thin for that, all shrink alike.
 */
export function inThickness(facets: Facets, thickness: number): Facets {
  const heights = heightsOf(facets)
  const upright = (i: number) => facets[i]!.tilt === 0
  const kept = heights.reduce((sum, height, i) => sum + (upright(i) ? height : 0), 0)
  const old = facets.at(-1)!.depth
  const bevels = old - kept
  const room = thickness - kept
  const scaled = heights.map((height, i) => {
    if (bevels <= 0 || room <= 0) return (height * thickness) / old
    return upright(i) ? height : (height * room) / bevels
  })
  let depth = 0
  return facets.map(({ tilt }, i) => ({
    depth: i === facets.length - 1 ? thickness : (depth += scaled[i]!),
    tilt,
  }))
}

export function withThickness(content: SaveSetup, thickness: number): SaveSetup {
  if (thickness === content.plate.thickness) return content
  return {
    ...content,
    plate: { ...content.plate, thickness },
    walls: content.walls.map((wall) => ({ ...wall, facets: [...inThickness(wall.facets, thickness)] })),
  }
}

/** One value shared by all, or `mixed`. */
export type Shared<T> = { readonly mixed: false; readonly value: T } | { readonly mixed: true }

export function shared<T>(values: readonly T[], same: (a: T, b: T) => boolean = Object.is): Shared<T> {
  const [first, ...rest] = values
  if (values.length === 0 || !rest.every((value) => same(first as T, value))) return { mixed: true }
  return { mixed: false, value: first as T }
}

export function jointOf(content: Pick<SaveSetup, 'joints'>, edge: EdgeRef): JointSpec | null {
  return content.joints.find((joint) => joint.loop === edge.loop && joint.edge === edge.edge) ?? null
}

/** The content with a joint changed (or made) on each of these edges; null takes the joint away. */
export function withJoint(
  content: SaveSetup,
  edges: readonly EdgeRef[],
  change: (joint: JointSpec) => JointSpec | null,
): SaveSetup {
  const keys = new Set(edges.map(edgeKey))
  const others = content.joints.filter((joint) => !keys.has(edgeKey(joint)))
  const changed = edges.flatMap(({ loop, edge }) => {
    const before = jointOf(content, { loop, edge })
    return change(before ?? { loop, edge, label: '', rootOpening: 0, mate: 'same' }) ?? []
  })
  return {
    ...content,
    joints: [...others, ...changed].sort((a, b) => a.loop - b.loop || a.edge - b.edge),
  }
}
