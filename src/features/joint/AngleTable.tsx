import { formatAngle } from '../../../shared/units/format.ts'
import { Section } from '../../app/Page.tsx'
import { angleRows, type JointEdge } from './joint-model.ts'
import { gaugeSentence } from './gauge.ts'

/** One tilt said three ways, and which of them a gauge reads. */
export function AngleTable({ edge }: { edge: JointEdge }) {
  const rows = angleRows(edge)
  return (
    <Section title="The angle, three ways">
      <table className="w-full">
        <thead>
          <tr className="text-label uppercase text-muted">
            <th scope="col" className="py-1 text-left font-normal">
              <span className="sr-only">Facet</span>
            </th>
            <th scope="col" className="py-1 pl-2 text-right font-normal">
              From vertical
            </th>
            <th scope="col" className="py-1 pl-2 text-right font-normal">
              From plate face
            </th>
            <th scope="col" className="py-1 pl-2 text-right font-normal">
              Included
            </th>
          </tr>
        </thead>
        <tbody>
          {rows.map(({ facet, where, fromVertical, fromPlateFace, included }) => (
            <tr key={facet} className="border-t border-rule">
              <th scope="row" className="py-2 text-left font-normal">
                {where}
              </th>
              <td className="py-2 pl-2 text-right text-large font-bold">{formatAngle(fromVertical)}</td>
              <td className="py-2 pl-2 text-right text-large font-bold">{formatAngle(fromPlateFace)}</td>
              <td className="py-2 pl-2 text-right text-large font-bold">
                {included === null ? '–' : formatAngle(included)}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
      <p>{gaugeSentence(rows[0]!)}</p>
    </Section>
  )
}
