import type { EvaluationRequest } from '../../shared/evaluate/schema.ts'
import type { Vertex } from '../../shared/geometry/types.ts'
import type { FacetSpec } from '../../shared/walls/schema.ts'
import { circle, rectangle, regular, seeded, star } from '../support/plates.ts'

/** Named parts that once were, or might be, hard. Every fault that is found becomes a part here. */

export interface CorpusPart {
  readonly name: string
  /** What is hard about it. */
  readonly why: string
  readonly request: EvaluationRequest
}

type Walls = (loop: number, edge: number) => readonly FacetSpec[] | null

const JET = { kerf: 1.1, taper: 0.4, standoff: 8, nozzleDiameter: 7.14 }
const HEAD = { mechanicalLimit: 60, workingLimit: 55 }

function part(
  name: string,
  why: string,
  thickness: number,
  loops: readonly (readonly Vertex[])[],
  walls: Walls,
  more: Partial<EvaluationRequest> = {},
): CorpusPart {
  return {
    name,
    why,
    request: {
      plate: { thickness },
      loops: loops.map((loop) => [...loop]),
      walls: loops.flatMap((vertices, loop) =>
        vertices.flatMap((_, edge) => {
          const facets = walls(loop, edge)
          return facets ? [{ loop, edge, facets: [...facets] }] : []
        }),
      ),
      jet: JET,
      head: HEAD,
      ...more,
    },
  }
}

const tilted = (thickness: number, tilt: number): readonly FacetSpec[] => [{ depth: thickness, tilt }]

/** A rectangle with round corners, counter-clockwise from the start of its lower side. */
function rounded(width: number, height: number, radius: number): Vertex[] {
  const bulge = Math.tan(Math.PI / 8)
  return [
    { x: radius, y: 0 },
    { x: width - radius, y: 0, bulge },
    { x: width, y: radius },
    { x: width, y: height - radius, bulge },
    { x: width - radius, y: height },
    { x: radius, y: height, bulge },
    { x: 0, y: height - radius },
    { x: 0, y: radius, bulge },
  ]
}

/** A slot as a hole: two straight sides and two half circles, clockwise. */
function slot(x: number, y: number, length: number, width: number): Vertex[] {
  const r = width / 2
  return [
    { x, y: y - r },
    { x, y: y + r, bulge: 0 },
    { x: x + length, y: y + r, bulge: -1 },
    { x: x + length, y: y - r },
  ].map((vertex, i) => (i === 0 ? { ...vertex, bulge: -1 } : vertex))
}

/** Teeth round a circle: four corners each. */
function toothed(teeth: number, inner: number, outer: number): Vertex[] {
  return Array.from({ length: 4 * teeth }, (_, i) => {
    const radius = i % 4 === 1 || i % 4 === 2 ? outer : inner
    const heading = (2 * Math.PI * (i + 0.15 * (i % 2))) / (4 * teeth)
    return { x: radius * Math.cos(heading), y: radius * Math.sin(heading) }
  })
}

const doubleBevel: readonly FacetSpec[] = [
  { depth: 8, tilt: 35 },
  { depth: 12, tilt: 0 },
  { depth: 20, tilt: -35 },
]

export const corpus: readonly CorpusPart[] = [
  part('square-45', 'equal walls: seams in closed form', 20, [rectangle(0, 0, 120, 80)], () =>
    tilted(20, 45),
  ),
  part(
    'mixed-preps',
    'a facet of its own on every edge',
    20,
    [rectangle(0, 0, 200, 120), circle(60, 60, 14, true), circle(140, 60, 14, true)],
    (loop, edge) =>
      loop > 0
        ? null
        : (
            [
              tilted(20, 30),
              doubleBevel,
              [
                { depth: 16, tilt: 45 },
                { depth: 20, tilt: 0 },
              ],
              null,
            ] as const
          )[edge]!,
  ),
  part(
    'thin-web',
    'two holes whose walls break through',
    25,
    [rectangle(0, 0, 160, 80), circle(60, 40, 20, true), circle(104.5, 40, 20, true)],
    (loop) => (loop === 0 ? null : tilted(25, loop === 1 ? -8 : -5)),
  ),
  part(
    'narrow-slot',
    'a slot little wider than the jet',
    15,
    [rounded(120, 60, 10), slot(30, 30, 60, 2.4)],
    (loop, edge) => (loop === 1 && edge === 1 ? tilted(15, 3) : null),
  ),
  part(
    'near-tangent-arcs',
    'round corners that miss their tangent by less than a drawing says',
    12,
    [rounded(140, 90, 15).map((v, i) => (i === 2 ? { ...v, x: v.x + 2e-3 } : v))],
    () => tilted(12, -20),
  ),
  part(
    'tiny-edges',
    'edges of 0.01 mm between long ones',
    10,
    [
      [
        { x: 0, y: 0 },
        { x: 100, y: 0 },
        { x: 100.01, y: 0.01 },
        { x: 100.01, y: 60 },
        { x: 100, y: 60.01 },
        { x: 0, y: 60.01 },
      ],
    ],
    () => tilted(10, 25),
  ),
  part(
    'near-collinear',
    'corners that turn by thousandths of a degree',
    18,
    [
      [
        { x: 0, y: 0 },
        { x: 50, y: 0.002 },
        { x: 100, y: 0 },
        { x: 100, y: 70 },
        { x: 50, y: 70.003 },
        { x: 0, y: 70 },
      ],
    ],
    () => tilted(18, 30),
  ),
  part('concave-star', 'deep concave corners, both signs', 6, [star(seeded(11), 14, 40, 90)], (_, edge) =>
    tilted(6, [12, -9, 5, -14][edge % 4]!),
  ),
  part(
    'ring',
    'a ring flange bevelled inside and out',
    30,
    [circle(0, 0, 110), circle(0, 0, 70, true)],
    (loop) => [
      { depth: 26, tilt: loop === 0 ? 30 : 22 },
      { depth: 30, tilt: 0 },
    ],
  ),
  part(
    'tilt-89',
    'a wall almost flat',
    2,
    [rectangle(0, 0, 900, 700)],
    (_, edge) => tilted(2, edge === 0 ? 89 : edge === 2 ? -89 : 0),
    { head: { mechanicalLimit: 90, workingLimit: null } },
  ),
  part('sheet-0.5', 'a plate of half a millimetre', 0.5, [toothed(12, 30, 36)], () => tilted(0.5, -20)),
  part('block-450', 'the thickest that is cut', 450, [rounded(600, 500, 80)], (_, edge) =>
    tilted(450, edge % 2 === 0 ? 4 : 3),
  ),
  part('hexagon-inward', 'seams that run inward', 40, [regular(6, 120)], () => tilted(40, -30)),
  part(
    'spline-disc',
    'taper removal on many small edges',
    12,
    [toothed(24, 70, 78), circle(0, 0, 25, true)],
    () => null,
  ),
  part(
    'vanishing-tab',
    'a narrow tab that shrinks to nothing within the plate',
    30,
    [
      [
        { x: 0, y: 0 },
        { x: 120, y: 0 },
        { x: 120, y: 50 },
        { x: 70, y: 50 },
        { x: 70, y: 70 },
        { x: 50, y: 70 },
        { x: 50, y: 50 },
        { x: 0, y: 50 },
      ],
    ],
    () => tilted(30, -25),
  ),
  part(
    'blended-side',
    'a wall that goes from one neighbour’s tilt to the other’s, on a line and on an arc',
    16,
    [rounded(180, 120, 25)],
    (_, edge) =>
      edge === 0
        ? [{ depth: 16, tilt: 10, endTilt: 30 }]
        : edge === 5
          ? [{ depth: 16, tilt: 30, endTilt: 10 }]
          : tilted(16, edge > 0 && edge < 5 ? 30 : 10),
  ),
  part(
    'bottom-datum',
    'the drawing is the bottom edge',
    16,
    [rounded(150, 100, 20), circle(75, 50, 18, true)],
    (loop, edge) => (loop === 0 ? tilted(16, edge % 2 === 0 ? 20 : -20) : tilted(16, 10)),
    { datum: 'bottom' },
  ),
  part(
    'root-datum',
    'the drawing is the root',
    20,
    [rectangle(0, 0, 160, 110)],
    (_, edge) => (edge % 2 === 0 ? doubleBevel : null),
    { datum: 'root' },
  ),
]
