import { describeWall } from '../../../shared/setup/describe.ts'
import { formatAngle, formatLength } from '../../../shared/units/format.ts'
import type { DisplayUnit } from '../../../shared/units/length.ts'
import { Heading } from './Heading.tsx'
import { edgeRuns, tableRows, type PrepGroup, type SheetRow } from './sheet-model.ts'

interface EdgeTableProps {
  readonly rows: readonly SheetRow[]
  readonly groups: readonly PrepGroup[]
  readonly unit: DisplayUnit
}

const COLUMNS = [
  'Edge',
  'Length top',
  'Length bottom',
  'Prep',
  'Bottom offset',
  'Path in metal',
  'Pass',
  'From vertical',
  'From face',
  'Included',
  'Jet tilt',
] as const

/** Every edge with its angles three ways; a line for each pass. */
export function EdgeTable({ rows, groups, unit }: EdgeTableProps) {
  const { listed, gathered } = tableRows(rows)
  const letterOf = new Map(groups.flatMap(({ label, edges }) => edges.map((edge) => [edge.name, label])))
  return (
    <section className="print:mt-[5mm]">
      <Heading aside="tilts in degrees, + opens downward; included: both plates of the joint">Edges</Heading>
      <table className="w-full border-collapse text-[7.5pt]">
        <thead>
          <tr className="border-b border-black align-bottom">
            {COLUMNS.map((column) => (
              <th
                key={column}
                scope="col"
                className={`font-normal text-[6.5pt] leading-tight px-[1mm] py-[0.5mm] ${column === 'Prep' ? 'text-left pl-[3mm]' : column === 'Edge' ? 'text-left' : 'text-right'}`}
              >
                {column}
              </th>
            ))}
          </tr>
        </thead>
        {listed.map((row) => (
          <EdgeLines key={row.name} row={row} letter={letterOf.get(row.name)} unit={unit} />
        ))}
        {gathered.length > 0 && (
          <tbody className="border-b border-neutral-400">
            <tr>
              <td colSpan={COLUMNS.length} className="px-[1mm] py-[0.8mm]">
                {gathered.length} square edges without a joint: {edgeRuns(gathered)}
              </td>
            </tr>
          </tbody>
        )}
      </table>
    </section>
  )
}

interface EdgeLinesProps {
  readonly row: SheetRow
  readonly letter: string | undefined
  readonly unit: DisplayUnit
}

function EdgeLines({ row, letter, unit }: EdgeLinesProps) {
  const length = (mm: number | null) =>
    mm === null ? '–' : formatLength(mm, unit, { bare: true, fixed: true })
  const angle = (degrees: number | null, sign = false) =>
    degrees === null ? '–' : formatAngle(degrees, { sign })
  const span = row.passes.length
  const number = 'px-[1mm] py-[0.3mm] text-right whitespace-nowrap'
  return (
    <tbody className="border-b border-neutral-400 align-top">
      {row.passes.map((pass, i) => (
        <tr key={i}>
          {i === 0 && (
            <>
              <th scope="rowgroup" rowSpan={span} className="px-[1mm] py-[0.3mm] text-left font-bold">
                {row.name}
              </th>
              <td rowSpan={span} className={number}>
                {length(row.topLength)}
              </td>
              <td rowSpan={span} className={number}>
                {length(row.bottomLength)}
              </td>
              <td rowSpan={span} className="pl-[3mm] pr-[1mm] py-[0.3mm]">
                {letter && <strong>{letter} </strong>}
                {describeWall(row.facets, unit)}
                {row.joint && <span className="block">joint {row.joint.label || 'without a number'}</span>}
              </td>
              <td rowSpan={span} className={number}>
                {length(row.bottomOffset)}
              </td>
              <td rowSpan={span} className={number}>
                {length(row.metalPath)}
              </td>
            </>
          )}
          <td className={number}>{i + 1}</td>
          <td className={number}>{angle(pass.fromVertical)}</td>
          <td className={number}>{angle(pass.fromPlateFace)}</td>
          <td className={number}>{angle(pass.included)}</td>
          <td className={`${number} font-bold`}>{angle(pass.jetTilt, true)}</td>
        </tr>
      ))}
    </tbody>
  )
}
