import { demoJet, jointOf, loopEdgesAt, wallsOf, type DemoPart } from './demo-part.ts'
import { block, circle, dxfText, insert, text } from './dxf-text.ts'

const [OUTER, INNER, BOLTS, THICKNESS] = [200, 130, 165, 20]
const HOLES = 8

/** Bevelled round its outside and its bore; each bolt hole is a block turned about the centre. */
export const ringFlange: DemoPart = {
  number: 'RF-11',
  name: 'Ring flange, pile head',
  fileName: 'RF-11-ring-flange.dxf',
  pick: 0,
  dxf: dxfText({
    units: 4,
    layers: ['CUT', 'DRILL', 'NOTES'],
    blocks: [block('HOLE-ON-CIRCLE', [circle(BOLTS, 0, 9, 'DRILL')])],
    entities: [
      circle(0, 0, OUTER, 'CUT'),
      circle(0, 0, INNER, 'CUT'),
      ...Array.from({ length: HOLES }, (_, i) => insert('HOLE-ON-CIRCLE', 0, 0, [50, (i * 360) / HOLES])),
      text(-40, -6, 12, 'RF-11', 'NOTES'),
    ],
  }),
  setups: [
    {
      name: 'Shell and sleeve',
      plate: { material: 'S355 J2', thickness: THICKNESS },
      headName: 'South gantry',
      jet: demoJet,
      datum: 'top',
      walls: (loops) => [
        ...wallsOf(
          loopEdgesAt(loops, { x: 0, y: OUTER }),
          { form: 'single-bevel', angle: 30, rootFace: 3, opensTo: 'top' },
          THICKNESS,
        ),
        ...wallsOf(
          loopEdgesAt(loops, { x: 0, y: INNER }),
          { form: 'single-bevel', angle: 35, rootFace: 2, opensTo: 'top' },
          THICKNESS,
        ),
      ],
      joints: (loops) => [
        ...loopEdgesAt(loops, { x: 0, y: OUTER }).map((edge) => jointOf(edge, 'J1', 2, 'square')),
        ...loopEdgesAt(loops, { x: 0, y: INNER }).map((edge) => jointOf(edge, 'J2', 2, 'square')),
      ],
      note: 'Bolt holes stay square.',
      state: 'approved',
    },
  ],
}
