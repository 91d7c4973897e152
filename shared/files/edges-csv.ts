import { cornerName, edgeKey, edgeName } from '../walls/names.ts'
import type { EvaluatedCorner, Evaluation } from '../evaluate/schema.ts'
import type { FacetSpec } from '../walls/schema.ts'
import { anglesThreeWays } from '../joint/angles.ts'
import { rootFaceOf } from '../joint/section.ts'
import { describeWall } from '../setup/describe.ts'
import type { SetupContent } from '../setup/schema.ts'
import { csvText, type Cell } from './csv.ts'
import { cautions } from './cautions.ts'

/**
 * The edges of a set-up as a table: one row per facet, from the top face down. mm and degrees, full digits.
 * The angle is given three ways; the groove angle is for the joint that the edge belongs to, blank without one.
 * The last column holds the cautions, in the first row.
 */
export function edgesCsv(content: SetupContent, evaluation: Evaluation): string {
  const walls = new Map(content.walls.map((wall) => [edgeKey(wall), wall.facets]))
  const joints = new Map(content.joints.map((joint) => [edgeKey(joint), joint]))
  const corners = new Map(
    evaluation.corners.map((corner) => [edgeKey({ loop: corner.loop, edge: corner.vertex }), corner]),
  )
  const square: FacetSpec[] = [{ depth: content.plate.thickness, tilt: 0 }]
  const rows = evaluation.edges.flatMap((edge, row) => {
    const facets = walls.get(edgeKey(edge)) ?? square
    const joint = joints.get(edgeKey(edge))
    const next = { loop: edge.loop, vertex: (edge.edge + 1) % (content.loops[edge.loop]?.length ?? 1) }
    const start = corners.get(edgeKey(edge))
    const end = corners.get(edgeKey({ loop: next.loop, edge: next.vertex }))
    return facets.map((facet, i): Cell[] => {
      const angles = anglesThreeWays(facet.tilt, joint?.mate === 'same' ? facet.tilt : 0)
      return [
        edgeName(edge),
        edge.loop,
        edge.edge,
        prepText(facets, i),
        i + 1,
        facets[i - 1]?.depth ?? 0,
        facet.depth,
        facet.tilt,
        angles.fromPlateFace,
        joint ? angles.grooveAngle : null,
        rootFaceOf(facets, content.plate.thickness).length,
        joint?.label ?? null,
        joint?.rootOpening ?? null,
        edge.jetTilts[i] ?? null,
        edge.bottomOffset,
        edge.topLength,
        edge.bottomLength,
        edge.metalPath,
        cornerName({ loop: edge.loop, vertex: edge.edge }),
        cornerTilt(start),
        cornerName(next),
        cornerTilt(end),
        row === 0 && i === 0 ? cautions.join(' ') : null,
      ]
    })
  })
  return csvText([HEADER, ...rows])
}

const HEADER: readonly string[] = [
  'Edge',
  'Loop (0 is the outer one)',
  'Edge index (from 0)',
  'Prep',
  'Facet (from the top)',
  'From depth (mm)',
  'To depth (mm)',
  'Angle from vertical (deg; positive outward with depth)',
  'Angle from plate face (deg)',
  'Groove angle of both plates (deg)',
  'Root face (mm)',
  'Joint',
  'Root opening (mm)',
  'Jet tilt (deg)',
  'Bottom offset (mm; positive outward)',
  'Top length (mm)',
  'Bottom length (mm)',
  'Jet path through the metal (mm)',
  'Start corner',
  'Start corner jet tilt (deg)',
  'End corner',
  'End corner jet tilt (deg)',
  'Cautions',
]

function cornerTilt(corner: EvaluatedCorner | undefined): number | null {
  return corner?.jetTilt ?? null
}

/** Begins with a word: a cell that begins with a sign would have to be guarded against running as a formula. */
function prepText(facets: readonly FacetSpec[], facet: number): string {
  const words = describeWall(facets)
  const prep = words === 'square' ? words : `wall ${words}`
  return facets.length === 1 ? prep : `${prep} (facet ${facet + 1} of ${facets.length})`
}
