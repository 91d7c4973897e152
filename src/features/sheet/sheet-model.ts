import { edgeKey, edgeName } from '../../../shared/walls/names.ts'
import type { EdgeRef } from '../../../shared/walls/types.ts'
import type { Evaluation } from '../../../shared/evaluate/schema.ts'
import type { FacetSpec } from '../../../shared/walls/schema.ts'
import { anglesThreeWays, type AngleThreeWays } from '../../../shared/joint/angles.ts'
import type { JointSpec, SetupContent } from '../../../shared/setup/schema.ts'

/** What the set-up sheet lists, from a revision's content and the server's evaluation. mm and degrees. */

/** One facet, cut in one pass. */
export interface SheetPass extends Omit<AngleThreeWays, 'grooveAngle'> {
  /** Groove angle with the other plate; null where no joint says what stands opposite. */
  readonly included: number | null
  /** Tilt to command, taper tilted away; null where the evaluation has none. */
  readonly jetTilt: number | null
}

export interface SheetRow extends EdgeRef {
  readonly name: string
  readonly topLength: number | null
  readonly bottomLength: number | null
  readonly bottomOffset: number | null
  readonly metalPath: number | null
  readonly facets: readonly FacetSpec[]
  readonly joint: JointSpec | null
  readonly passes: readonly SheetPass[]
}

/** Every edge, in order of loop and edge. */
export function sheetRows(content: SetupContent, evaluation: Evaluation): SheetRow[] {
  const walls = new Map(content.walls.map((wall) => [edgeKey(wall), wall.facets]))
  const joints = new Map(content.joints.map((joint) => [edgeKey(joint), joint]))
  const evaluated = new Map(evaluation.edges.map((edge) => [edgeKey(edge), edge]))
  const square: readonly FacetSpec[] = [{ depth: content.plate.thickness, tilt: 0 }]
  return content.loops.flatMap((vertices, loop) =>
    vertices.map((_, edge): SheetRow => {
      const ref = { loop, edge }
      const key = edgeKey(ref)
      const facets = walls.get(key) ?? square
      const joint = joints.get(key) ?? null
      const found = evaluated.get(key)
      return {
        ...ref,
        name: edgeName(ref),
        topLength: found?.topLength ?? null,
        bottomLength: found?.bottomLength ?? null,
        bottomOffset: found?.bottomOffset ?? null,
        metalPath: found?.metalPath ?? null,
        facets,
        joint,
        passes: facets.map(({ tilt }, facet) => {
          const { fromVertical, fromPlateFace, grooveAngle } = anglesThreeWays(
            tilt,
            joint?.mate === 'same' ? tilt : 0,
          )
          const jetTilt = found?.jetTilts[facet] ?? null
          return { fromVertical, fromPlateFace, included: joint ? grooveAngle : null, jetTilt }
        }),
      }
    }),
  )
}

/** Up to here every edge has a row; beyond, plain square edges are gathered in one. */
export const MOST_ROWS = 60

export function isPlain({ facets, joint }: Pick<SheetRow, 'facets' | 'joint'>): boolean {
  return joint === null && facets.every(({ tilt }) => tilt === 0)
}

export interface TableRows {
  readonly listed: readonly SheetRow[]
  /** Square edges without a joint that have no row of their own. */
  readonly gathered: readonly SheetRow[]
}

export function tableRows(rows: readonly SheetRow[]): TableRows {
  if (rows.length <= MOST_ROWS) return { listed: rows, gathered: [] }
  return { listed: rows.filter((row) => !isPlain(row)), gathered: rows.filter(isPlain) }
}

/** Edges that share one prep and one joint, to be drawn once. */
export interface PrepGroup {
  /** `A`, `B`, …, in the order in which the preps are met round the part. */
  readonly label: string
  readonly facets: readonly FacetSpec[]
  readonly joint: JointSpec | null
  readonly edges: readonly SheetRow[]
}

export function prepGroups(rows: readonly SheetRow[]): PrepGroup[] {
  const groups = new Map<string, SheetRow[]>()
  for (const row of rows) {
    if (isPlain(row)) continue
    const key = JSON.stringify([
      row.facets.map(({ depth, tilt }) => [depth, tilt]),
      row.joint && [row.joint.mate, row.joint.rootOpening, row.joint.tolerance ?? null],
    ])
    const group = groups.get(key)
    if (group) group.push(row)
    else groups.set(key, [row])
  }
  return [...groups.values()].map((edges, i) => ({
    label: letters(i),
    facets: edges[0]!.facets,
    joint: edges[0]!.joint,
    edges,
  }))
}

/** 0 → A, 25 → Z, 26 → AA. */
export function letters(index: number): string {
  const last = String.fromCharCode(65 + (index % 26))
  return index < 26 ? last : letters(Math.floor(index / 26) - 1) + last
}

/** `e1, e3–e6, h1.e2`: three and more neighbours as a run. */
export function edgeRuns(edges: readonly EdgeRef[]): string {
  const runs: EdgeRef[][] = []
  for (const edge of edges) {
    const run = runs.at(-1)
    const last = run?.at(-1)
    if (run && last && last.loop === edge.loop && last.edge + 1 === edge.edge) run.push(edge)
    else runs.push([edge])
  }
  return runs
    .flatMap((run) =>
      run.length > 2 ? [`${edgeName(run[0]!)}–${edgeName(run.at(-1)!)}`] : run.map((edge) => edgeName(edge)),
    )
    .join(', ')
}
