import { demoJet, edgeAt, wallsOf, type DemoPart } from './demo-part.ts'
import { arc, circle, dxfText, line } from './dxf-text.ts'

const [LENGTH, HALF, THICKNESS] = [220, 45, 25]

/** The web between the window and the front edge, mm: a wall that leans in by 35° has used it up at 17 mm depth. */
const WEB = 12

export const linkPlate: DemoPart = {
  number: 'LP-05',
  name: 'Link plate, expansion joint',
  fileName: 'LP-05-link-plate.dxf',
  pick: 0,
  dxf: dxfText({
    units: 4,
    layers: ['CUT'],
    entities: [
      line(-HALF, -HALF, LENGTH + HALF, -HALF, 'CUT'),
      line(LENGTH + HALF, -HALF, LENGTH + HALF, 0, 'CUT'),
      arc(LENGTH, 0, HALF, 0, 90, 'CUT'),
      line(LENGTH, HALF, 0, HALF, 'CUT'),
      arc(0, 0, HALF, 90, 180, 'CUT'),
      line(-HALF, 0, -HALF, -HALF, 'CUT'),
      line(70, -HALF + WEB, 150, -HALF + WEB, 'CUT'),
      line(150, -HALF + WEB, 150, 15, 'CUT'),
      line(150, 15, 70, 15, 'CUT'),
      line(70, 15, 70, -HALF + WEB, 'CUT'),
      circle(0, 0, 15, 'CUT'),
      circle(LENGTH, 0, 15, 'CUT'),
    ],
  }),
  setups: [
    {
      name: 'Front edge undercut',
      plate: { material: 'S355 J2', thickness: THICKNESS },
      headName: 'South gantry',
      jet: demoJet,
      datum: 'top',
      walls: (loops) =>
        wallsOf([edgeAt(loops, { x: LENGTH / 2, y: -HALF })], { form: 'tilt', tilt: -35 }, THICKNESS),
      joints: () => [],
      note: 'The web in front of the window does not carry this undercut.',
      state: 'draft',
    },
  ],
}
