import { demoJet, type DemoPart } from './demo-part.ts'
import { block, circle, dxfText, insert, polyline, text } from './dxf-text.ts'

const [TEETH, ROOT, TIP, THICKNESS] = [24, 90, 100, 40]

type Corner = [number, number, number?]

/** Flanks are straight; roots and tips are arcs about the centre, written as bulges. */
function toothedOutline(): Corner[] {
  const pitch = (2 * Math.PI) / TEETH
  const at = (radius: number, angle: number, sweep: number): Corner => [
    radius * Math.cos(angle),
    radius * Math.sin(angle),
    Math.tan(sweep / 4),
  ]
  return Array.from({ length: TEETH }, (_, tooth) => {
    const start = tooth * pitch
    return [
      at(ROOT, start, 0.3 * pitch),
      at(ROOT, start + 0.3 * pitch, 0),
      at(TIP, start + 0.5 * pitch, 0.3 * pitch),
      at(TIP, start + 0.8 * pitch, 0),
    ]
  }).flat()
}

/** Ninety-six edges that must stand square through thick plate: with the taper left in, no tooth would fit. */
export const splineDisc: DemoPart = {
  number: 'SD-02',
  name: 'Spline disc, lifting gear',
  fileName: 'SD-02-spline-disc.dxf',
  pick: 0,
  dxf: dxfText({
    units: 4,
    layers: ['TEETH', 'BORE', 'NOTES'],
    blocks: [
      block('RIB-HOLE', [circle(0, 0, 12, 'BORE')]),
      block('RIB-HOLES', [insert('RIB-HOLE', 55, 0), insert('RIB-HOLE', -55, 0)]),
    ],
    entities: [
      polyline(toothedOutline(), 'TEETH'),
      circle(0, 0, 30, 'BORE'),
      insert('RIB-HOLES', 0, 0),
      insert('RIB-HOLES', 0, 0, [50, 90]),
      text(-20, -72, 8, 'SD-02', 'NOTES'),
    ],
  }),
  setups: [
    {
      name: 'Square teeth',
      plate: { material: '1.4404', thickness: THICKNESS },
      headName: 'North gantry',
      jet: demoJet,
      datum: 'top',
      walls: () => [],
      joints: () => [],
      note: 'All walls are square with the taper tilted away: 0.4° left in would make the teeth 0.56 mm thicker below.',
      state: 'submitted',
    },
  ],
}
