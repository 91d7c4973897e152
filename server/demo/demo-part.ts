import type { EdgeRef } from '../../shared/walls/types.ts'
import type { Datum } from '../../shared/walls/types.ts'
import type { JetSpec } from '../../shared/evaluate/schema.ts'
import type { WallSpec } from '../../shared/walls/schema.ts'
import { segmentFromVertices } from '../../shared/geometry/bulge.ts'
import { pointAt } from '../../shared/geometry/segment.ts'
import type { Point, VertexLoop } from '../../shared/geometry/types.ts'
import { prepFacets, type Prep } from '../../shared/prep/preps.ts'
import type { JointSpec, SetupContent } from '../../shared/setup/schema.ts'

/** Invented work for an invented shop: Saltmarsh Works cuts plate for a tidal footbridge. */

export interface DemoSetup {
  readonly name: string
  readonly plate: SetupContent['plate']
  readonly headName: string
  readonly jet: JetSpec
  readonly datum: Datum
  /** For the loops as the importer returned them: outline first, then holes. */
  readonly walls: (loops: readonly VertexLoop[]) => WallSpec[]
  readonly joints: (loops: readonly VertexLoop[]) => JointSpec[]
  readonly note: string
  readonly state: 'draft' | 'submitted' | 'approved'
}

export interface DemoPart {
  readonly number: string
  readonly name: string
  readonly fileName: string
  readonly dxf: string
  /** Index into the parts that the importer finds, largest first. */
  readonly pick: number
  readonly setups: readonly DemoSetup[]
}

/** Starting values as many shops would write them down; each measures its own. mm, taper in degrees per side. */
export const demoJet: JetSpec = { kerf: 1.1, taper: 0.4, standoff: 3, nozzleDiameter: 7.14 }

/** The edge whose middle lies nearest a place of the drawing, mm: holds however the importer numbers edges. */
export function edgeAt(loops: readonly VertexLoop[], place: Point): EdgeRef {
  let best: (EdgeRef & { gap: number }) | null = null
  loops.forEach((loop, l) => {
    loop.forEach((vertex, e) => {
      const middle = pointAt(segmentFromVertices(vertex, loop[(e + 1) % loop.length] ?? vertex), 0.5)
      const gap = Math.hypot(middle.x - place.x, middle.y - place.y)
      if (best === null || gap < best.gap) best = { loop: l, edge: e, gap }
    })
  })
  if (best === null) throw new Error('the demo part has no edges')
  const { loop, edge } = best
  return { loop, edge }
}

/** Every edge of the loop that passes nearest a place. */
export function loopEdgesAt(loops: readonly VertexLoop[], place: Point): EdgeRef[] {
  const { loop } = edgeAt(loops, place)
  return (loops[loop] ?? []).map((_, edge) => ({ loop, edge }))
}

/** Walls of one prep for some edges; a square prep needs none. */
export function wallsOf(edges: readonly EdgeRef[], prep: Prep, thickness: number): WallSpec[] {
  const made = prepFacets(prep, thickness)
  if (made.kind === 'error') throw new Error(`the demo's prep is not sound: ${made.message}`)
  if (made.facets.length === 0) return []
  return edges.map(({ loop, edge }) => ({ loop, edge, facets: [...made.facets] }))
}

export function jointOf(
  edge: EdgeRef,
  label: string,
  rootOpening: number,
  mate: JointSpec['mate'],
): JointSpec {
  return {
    ...edge,
    label,
    rootOpening,
    mate,
    tolerance: {
      angle: { plus: 2.5, minus: 2.5 },
      rootOpening: { plus: 1.5, minus: 1 },
      rootFace: { plus: 1, minus: 1 },
    },
  }
}
