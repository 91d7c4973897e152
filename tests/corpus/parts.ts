import type { EvaluationRequest } from '../../shared/evaluate/schema.ts'
import type { Vertex } from '../../shared/geometry/types.ts'
import type { FacetSpec } from '../../shared/walls/schema.ts'
import { circle, rectangle, regular, seeded, star } from '../support/plates.ts'
import { rounded, slot, spiky, toothed } from './shapes.ts'

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
  part(
    'thin-web-holds',
    'a web of half a millimetre between two holes that just stays',
    20,
    [rectangle(0, 0, 140, 70), circle(45, 35, 18, true), circle(83.25, 35, 18, true)],
    (loop) => (loop === 0 ? null : tilted(20, loop === 1 ? -3 : -2)),
  ),
  part(
    'slot-across',
    'slots with walls that lean toward each other and away',
    25,
    [rectangle(0, 0, 150, 90), slot(35, 30, 70, 14), slot(35, 60, 70, 9)],
    (loop) => (loop === 1 ? tilted(25, 12) : loop === 2 ? tilted(25, -12) : tilted(25, 5)),
  ),
  part(
    'arcs-at-a-hair',
    'lines and arcs that meet at a tenth of a degree, tilts unlike',
    10,
    [
      rounded(160, 100, 30).map((v, i) =>
        v.bulge === undefined ? v : { ...v, bulge: Math.tan(Math.PI / 8 + (i < 4 ? 4e-4 : -4e-4)) },
      ),
    ],
    (_, edge) => tilted(10, edge % 2 === 0 ? 8 : 8.01),
    { head: { mechanicalLimit: 88, workingLimit: null } },
  ),
  part(
    'tiny-notch',
    'edges of 0.01 mm inside a notch that the jet cannot follow',
    8,
    [
      [
        { x: 0, y: 0 },
        { x: 60, y: 0 },
        { x: 60, y: 40 },
        { x: 30.01, y: 40 },
        { x: 30.01, y: 39.99 },
        { x: 30, y: 39.99 },
        { x: 30, y: 40 },
        { x: 0, y: 40 },
      ],
    ],
    () => tilted(8, 10),
  ),
  part('spiky-star', 'sharp points and deep hollows, all inward', 5, [spiky(9, 30, 80)], () =>
    tilted(5, -12),
  ),
  part(
    'ring-double-bevel',
    'a narrow ring with a double bevel inside and out',
    24,
    [circle(0, 0, 80), circle(0, 0, 46, true)],
    () => [
      { depth: 10, tilt: 30 },
      { depth: 13, tilt: 0 },
      { depth: 24, tilt: -30 },
    ],
  ),
  part(
    'tiny-hole-tilted',
    'a hole of 4 mm whose wall leans: the jet has hardly room',
    6,
    [rectangle(0, 0, 60, 40), circle(20, 20, 2, true), circle(42, 20, 2, true)],
    (loop) => (loop === 0 ? null : tilted(6, loop === 1 ? 8 : -20)),
  ),
  part(
    'slides-out',
    'walls that lean the same way: the part slides out along them',
    20,
    [rectangle(0, 0, 100, 70), circle(50, 35, 15, true)],
    (loop, edge) => (loop > 0 ? null : edge === 0 ? tilted(20, 30) : edge === 2 ? tilted(20, -35) : null),
  ),
  part('trapped', 'double bevel all round: no single way leads out', 16, [rectangle(0, 0, 90, 60)], () => [
    { depth: 7, tilt: 35 },
    { depth: 9, tilt: 0 },
    { depth: 16, tilt: -35 },
  ]),
  part(
    'sheet-0.5-steep',
    'half a millimetre with walls to 80°',
    0.5,
    [regular(5, 40)],
    (_, edge) => tilted(0.5, edge % 2 === 0 ? 80 : 78),
    { head: { mechanicalLimit: 90, workingLimit: null } },
  ),
  part(
    'block-450-slow',
    'the thickest, cut so slowly that the kerf does not close',
    450,
    [rectangle(0, 0, 500, 400), circle(250, 200, 90, true)],
    (loop, edge) => tilted(450, loop === 1 ? 2 : edge % 2 === 0 ? 6 : -5),
    { jet: { ...JET, taper: -0.02 } },
  ),
]
