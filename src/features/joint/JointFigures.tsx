import { jointSection, rootFaceOf } from '../../../shared/joint/section.ts'
import { STEEL_DENSITY, weldMetalPerMetre } from '../../../shared/joint/weld-metal.ts'
import { formatAngle, formatArea, formatLength, formatNumber } from '../../../shared/units/format.ts'
import type { DisplayUnit } from '../../../shared/units/length.ts'
import { Section } from '../../app/Page.tsx'
import { Facts } from '../../ui/Facts.tsx'
import { Notice } from '../../ui/Notice.tsx'
import { AngleTable } from './AngleTable.tsx'
import { allowed, type JointEdge } from './joint-model.ts'

interface JointFiguresProps {
  readonly edge: JointEdge
  readonly thickness: number
  readonly unit: DisplayUnit
}

/** The numbers that the joint should show, with their bands. */
export function JointFigures({ edge, thickness, unit }: JointFiguresProps) {
  const { facets, joint } = edge
  const square = facets.every(({ tilt }) => tilt === 0)
  return (
    <div className="flex flex-col gap-6 min-w-0">
      {!joint && (
        <Notice title={square ? 'Square edge, no joint' : 'No joint given'}>
          {square
            ? 'This edge is cut square and the set-up names no joint for it. There is nothing to fit here; look at the drawing if you expected one.'
            : 'This edge is bevelled, but the set-up does not say what stands opposite. Root opening, groove angle and tolerances are in the welding procedure.'}
        </Notice>
      )}
      {!square && <AngleTable edge={edge} />}
      {joint && <FitUp edge={edge} joint={joint} thickness={thickness} unit={unit} />}
    </div>
  )
}

function FitUp({
  edge,
  joint,
  thickness,
  unit,
}: JointFiguresProps & { joint: NonNullable<JointEdge['joint']> }) {
  const section = jointSection({ facets: edge.facets, thickness, ...joint })
  const rootFace = rootFaceOf(edge.facets, thickness).length
  const { tolerance } = joint
  const length = (mm: number) => formatLength(mm, unit)
  const band = (range: { from: number; to: number } | null, format: (value: number) => string) =>
    range ? `${format(range.from)} to ${format(range.to)}` : '–'
  const grooves = [
    ['Groove angle', section.grooveAngleTop],
    ['Groove angle below', section.grooveAngleBottom],
  ] as const
  const rows = [
    ...grooves
      .filter(([, angle]) => angle > 0)
      .map(([name, angle]) => ({
        name,
        nominal: formatAngle(angle),
        range: band(tolerance ? allowed(angle, tolerance.angle) : null, (value) => formatAngle(value)),
      })),
    {
      name: 'Root face',
      nominal: length(rootFace),
      range: band(tolerance ? allowed(rootFace, tolerance.rootFace) : null, length),
    },
    {
      name: 'Root opening',
      nominal: length(joint.rootOpening),
      range: band(tolerance ? allowed(joint.rootOpening, tolerance.rootOpening) : null, length),
    },
  ]
  return (
    <Section title="As it should fit">
      <table className="w-full text-large">
        <thead>
          <tr className="text-label uppercase text-muted text-left">
            <th scope="col" className="py-1 font-normal">
              What
            </th>
            <th scope="col" className="py-1 font-normal text-right">
              Asked
            </th>
            <th scope="col" className="py-1 font-normal text-right">
              Allowed
            </th>
          </tr>
        </thead>
        <tbody>
          {rows.map(({ name, nominal, range }) => (
            <tr key={name} className="border-t border-rule">
              <th scope="row" className="py-2 pr-2 text-left font-normal text-base">
                {name}
              </th>
              <td className="py-2 pl-2 text-right font-bold whitespace-nowrap">{nominal}</td>
              <td className="py-2 pl-2 text-right text-base">{range}</td>
            </tr>
          ))}
        </tbody>
      </table>
      {!tolerance && (
        <p className="text-small text-muted">
          The set-up gives no tolerance for this joint: take it from the welding procedure.
        </p>
      )}
      <Facts
        facts={[
          ['Groove area', formatArea(section.area, unit, { decimals: unit === 'mm' ? 0 : 3 })],
          ['Weld metal', `${formatNumber(weldMetalPerMetre(section.area))} kg per metre of joint`],
        ]}
      />
      <p className="text-small text-muted">
        To fill the bare groove with steel of {STEEL_DENSITY} kg/m³; cap, spatter and slag come on top.
      </p>
    </Section>
  )
}
