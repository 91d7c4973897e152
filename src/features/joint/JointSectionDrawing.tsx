import { jointForm } from '../../../shared/joint/form.ts'
import type { DisplayUnit } from '../../../shared/units/length.ts'
import { describeWall } from '../../../shared/setup/describe.ts'
import { Section } from '../../app/Page.tsx'
import { useTheme } from '../../app/preferences.ts'
import { PlateSection } from '../../section/PlateSection.tsx'
import { sectionTolerances } from '../../section/tolerances.ts'
import type { JointEdge } from './joint-model.ts'

interface JointSectionDrawingProps {
  readonly edge: JointEdge
  readonly thickness: number
  readonly unit: DisplayUnit
}

/** Both plates to scale; one plate alone where no joint says what stands opposite. */
export function JointSectionDrawing({ edge, thickness, unit }: JointSectionDrawingProps) {
  const theme = useTheme()
  const { facets, joint } = edge
  const form = joint ? jointForm(facets, joint.mate) : describeWall(facets, unit)
  return (
    <Section title="Section" aside={form}>
      <PlateSection
        thickness={thickness}
        facets={facets}
        joint={joint ? { mate: joint.mate, rootOpening: joint.rootOpening } : undefined}
        theme={theme}
        unit={unit}
        tolerances={sectionTolerances(joint, unit)}
        plateHeight={220}
      />
      <p className="text-small text-muted">
        {joint
          ? `This plate on the left, ${joint.mate === 'same' ? 'the other with the same prep' : 'the other with a square edge'} on the right; both top faces up. Drawn to scale.`
          : 'This plate alone, top face up. Drawn to scale.'}
      </p>
    </Section>
  )
}
