import { jointForm } from '../../../shared/joint/form.ts'
import { jointSection } from '../../../shared/joint/section.ts'
import { weldMetalPerMetre } from '../../../shared/joint/weld-metal.ts'
import { describeWall } from '../../../shared/setup/describe.ts'
import { formatArea, formatNumber } from '../../../shared/units/format.ts'
import type { DisplayUnit } from '../../../shared/units/length.ts'
import { PlateSection } from '../../section/PlateSection.tsx'
import { sectionTolerances } from '../../section/tolerances.ts'
import { Heading } from './Heading.tsx'
import { edgeRuns, type PrepGroup } from './sheet-model.ts'

interface PrepSectionsProps {
  readonly groups: readonly PrepGroup[]
  readonly thickness: number
  readonly unit: DisplayUnit
}

/** Less than half of the 186 mm between the margins, in CSS px: break lines stand out a little. */
const WIDTH = 326

/** Each prep once, drawn at a standard scale, with the edges that have it. */
export function PrepSections({ groups, thickness, unit }: PrepSectionsProps) {
  if (groups.length === 0) return null
  return (
    <section className="print:mt-[5mm]">
      <Heading aside="top face up, this plate on the left">Preps and joints</Heading>
      <div className="grid grid-cols-2 pl-[2mm] gap-x-[6mm] gap-y-[5mm]">
        {groups.map((group) => (
          <div key={group.label} className="sheet-keep min-w-0">
            <p className="font-bold">
              {group.label} · {describeWall(group.facets, unit)}
            </p>
            <p>
              {group.joint ? jointForm(group.facets, group.joint.mate) : 'no joint given'} ·{' '}
              {edgeRuns(group.edges)}
            </p>
            <PlateSection
              thickness={thickness}
              facets={group.facets}
              joint={group.joint ?? undefined}
              tolerances={sectionTolerances(group.joint, unit)}
              theme="paper"
              unit={unit}
              width={WIDTH}
              plateHeight={150}
              standardScale
              print
            />
            {group.joint && <Fill group={group} thickness={thickness} unit={unit} />}
          </div>
        ))}
      </div>
    </section>
  )
}

function Fill({ group, thickness, unit }: { group: PrepGroup; thickness: number; unit: DisplayUnit }) {
  const { area } = jointSection({ facets: group.facets, thickness, ...group.joint! })
  return (
    <p className="text-[7.5pt]">
      Groove {formatArea(area, unit, { decimals: unit === 'mm' ? 0 : 3 })}, weld metal{' '}
      {formatNumber(weldMetalPerMetre(area))} kg/m (steel, bare groove)
    </p>
  )
}
