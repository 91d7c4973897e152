import { demoJet, edgeAt, jointOf, wallsOf, type DemoPart } from './demo-part.ts'
import { arc, circle, dxfText, line, text } from './dxf-text.ts'

const INCH = 25.4
const THICKNESS = 0.75 * INCH
const inches = (x: number, y: number) => ({ x: x * INCH, y: y * INCH })

/** Drawn in inches with loose lines and arcs: a notch with two concave corners, one corner rounded. */
export const gusset: DemoPart = {
  number: 'GS-07',
  name: 'Gusset, handrail post',
  fileName: 'GS-07-gusset.dxf',
  pick: 0,
  dxf: dxfText({
    units: 1,
    layers: ['PLATE', 'HOLES', 'TEXT'],
    entities: [
      line(0, 0, 12, 0, 'PLATE'),
      line(12, 0, 12, 3, 'PLATE'),
      line(12, 3, 7, 3, 'PLATE'),
      line(7, 3, 7, 6, 'PLATE'),
      line(7, 6, 4, 9, 'PLATE'),
      line(4, 9, 1, 9, 'PLATE'),
      arc(1, 8, 1, 90, 180, 'PLATE'),
      line(0, 8, 0, 5, 'PLATE'),
      line(0, 5, 1.5, 5, 'PLATE'),
      line(1.5, 5, 1.5, 3.5, 'PLATE'),
      line(1.5, 3.5, 0, 3.5, 'PLATE'),
      line(0, 3.5, 0, 0, 'PLATE'),
      circle(10, 1.5, 0.5, 'HOLES'),
      circle(4.5, 6, 0.5, 'HOLES'),
      text(3, 1, 0.3, 'GS-07 3/4 THK', 'TEXT'),
    ],
  }),
  setups: [
    {
      name: 'Post and deck beam',
      plate: { material: 'S275 JR', thickness: THICKNESS },
      headName: 'North gantry',
      jet: demoJet,
      datum: 'top',
      walls: (loops) => [
        ...wallsOf(
          [edgeAt(loops, inches(9.5, 3)), edgeAt(loops, inches(7, 4.5))],
          { form: 'single-bevel', angle: 30, rootFace: 3, opensTo: 'top' },
          THICKNESS,
        ),
        ...wallsOf([edgeAt(loops, inches(6, 0))], { form: 'tilt', tilt: 25 }, THICKNESS),
      ],
      joints: (loops) => [
        jointOf(edgeAt(loops, inches(9.5, 3)), 'J1', 2, 'square'),
        jointOf(edgeAt(loops, inches(7, 4.5)), 'J2', 2, 'square'),
      ],
      note: 'The two bevels meet in a concave corner, which keeps a fillet of the jet.',
      state: 'submitted',
    },
  ],
}
