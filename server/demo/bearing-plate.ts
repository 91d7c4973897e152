import { demoJet, edgeAt, jointOf, wallsOf, type DemoPart } from './demo-part.ts'
import { block, circle, dxfText, insert, polyline, text } from './dxf-text.ts'

const [WIDTH, HEIGHT, THICKNESS] = [320, 220, 25]

/** Middles of the four sides. */
const [FRONT, RIGHT, BACK, LEFT] = [
  { x: WIDTH / 2, y: 0 },
  { x: WIDTH, y: HEIGHT / 2 },
  { x: WIDTH / 2, y: HEIGHT },
  { x: 0, y: HEIGHT / 2 },
] as const

/** Four sides, four preps, bolt holes from a block inserted in an array, a slot with rounded ends. */
export const bearingPlate: DemoPart = {
  number: 'BP-04',
  name: 'Bearing plate, north abutment',
  fileName: 'BP-04-bearing-plate.dxf',
  pick: 0,
  dxf: dxfText({
    units: 4,
    layers: ['OUTLINE', 'HOLES', 'NOTES'],
    blocks: [block('BOLT-22', [circle(0, 0, 11, 'HOLES')])],
    entities: [
      polyline(
        [
          [0, 0],
          [WIDTH, 0],
          [WIDTH, HEIGHT],
          [0, HEIGHT],
        ],
        'OUTLINE',
      ),
      insert('BOLT-22', 60, 60, [70, 3], [71, 2], [44, 100], [45, 100]),
      polyline(
        [
          [130, 95],
          [190, 95, 1],
          [190, 125],
          [130, 125, 1],
        ],
        'HOLES',
      ),
      text(10, 10, 6, 'BP-04  25 THK', 'NOTES'),
    ],
  }),
  setups: [
    {
      name: 'Seat to abutment',
      plate: { material: 'S355 J2', thickness: THICKNESS },
      headName: 'North gantry',
      jet: demoJet,
      datum: 'top',
      walls: (loops) => [
        ...wallsOf(
          [edgeAt(loops, FRONT)],
          { form: 'single-bevel', angle: 30, rootFace: 4, opensTo: 'top' },
          THICKNESS,
        ),
        ...wallsOf(
          [edgeAt(loops, RIGHT)],
          { form: 'double-bevel', topAngle: 30, bottomAngle: 30, topDepth: 11, rootFace: 3 },
          THICKNESS,
        ),
        ...wallsOf(
          [edgeAt(loops, BACK)],
          { form: 'single-v', grooveAngle: 45, rootFace: 2, opensTo: 'top' },
          THICKNESS,
        ),
        ...wallsOf([edgeAt(loops, LEFT)], { form: 'tilt', tilt: -15 }, THICKNESS),
      ],
      joints: (loops) => [
        jointOf(edgeAt(loops, FRONT), 'J1', 3, 'square'),
        jointOf(edgeAt(loops, RIGHT), 'J2', 2, 'square'),
        jointOf(edgeAt(loops, BACK), 'J3', 2, 'same'),
      ],
      note: 'Front and right edges are welded on site: leave the root faces as cut.',
      state: 'approved',
    },
  ],
}
