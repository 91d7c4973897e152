import { demoJet, edgeAt, jointOf, wallsOf, type DemoPart } from './demo-part.ts'
import { circle, dxfText, oldPolyline, text } from './dxf-text.ts'

const [WIDTH, HEIGHT, THICKNESS] = [240, 160, 20]

const SIDES = [
  { x: 0, y: HEIGHT / 2 },
  { x: WIDTH, y: HEIGHT / 2 },
]
const ENDS = [
  { x: WIDTH / 2, y: 0 },
  { x: WIDTH / 2, y: HEIGHT },
]

/** Two sides lean out and keep it from lifting, two lean in and keep it from dropping: it stays in its sheet. */
export const trappedPlate: DemoPart = {
  number: 'WP-09',
  name: 'Wedge plate, tide stop',
  fileName: 'WP-09-wedge-plate.dxf',
  pick: 0,
  dxf: dxfText({
    units: 4,
    layers: ['NOTES'],
    entities: [
      oldPolyline([
        [0, 0],
        [WIDTH, 0],
        [WIDTH, HEIGHT],
        [0, HEIGHT],
      ]),
      circle(60, 80, 10),
      circle(180, 80, 10),
      text(100, 20, 8, 'WP-09', 'NOTES'),
    ],
  }),
  setups: [
    {
      name: 'Between the guides',
      plate: { material: 'S355 J2', thickness: THICKNESS },
      headName: 'South gantry',
      jet: demoJet,
      datum: 'top',
      walls: (loops) => [
        ...wallsOf(
          SIDES.map((side) => edgeAt(loops, side)),
          { form: 'tilt', tilt: 25 },
          THICKNESS,
        ),
        ...wallsOf(
          ENDS.map((end) => edgeAt(loops, end)),
          { form: 'tilt', tilt: -25 },
          THICKNESS,
        ),
      ],
      joints: (loops) => SIDES.map((side, i) => jointOf(edgeAt(loops, side), `J${i + 1}`, 2, 'same')),
      note: 'Neither lifts out nor drops: plan relief cuts before nesting.',
      state: 'submitted',
    },
  ],
}
