import { useParams } from 'react-router-dom'
import { parseEdgeKey } from '../../../shared/walls/names.ts'
import { formatLength } from '../../../shared/units/format.ts'
import { Page, PageBody, PageHead } from '../../app/Page.tsx'
import { useUnit } from '../../app/preferences.ts'
import { revisionText } from '../../revision/standing.ts'
import { useShownRevision } from '../../revision/use-revision.ts'
import { StandingBanner } from '../../revision/StandingBanner.tsx'
import { EdgeList } from './EdgeList.tsx'
import { EdgeTurns } from './EdgeTurns.tsx'
import { JointCaution } from './JointCaution.tsx'
import { JointFigures } from './JointFigures.tsx'
import { JointPart } from './JointPart.tsx'
import { JointSectionDrawing } from './JointSectionDrawing.tsx'
import { NoSuchEdge } from './NoSuchEdge.tsx'
import { edgesWithPrep, jointEdgeOf } from './joint-model.ts'
import { jointPath } from './joint-path.ts'

/** The joint as it should fit, for the welder: one edge of one revision. */
export default function JointPage() {
  const { id = '', edge: key = '' } = useParams()
  const unit = useUnit()
  const { revision, standing } = useShownRevision(id)
  const { content } = revision
  const ref = parseEdgeKey(key)
  const edge = ref && jointEdgeOf(content, ref)
  const edges = edgesWithPrep(content)
  const place = (to: { readonly loop: number; readonly edge: number }) => jointPath(id, to, revision.number)
  const cells = [
    {
      label: 'Rev',
      value: revisionText(revision, standing),
      tone: standing.approval && standing.supersededBy === null ? ('good' as const) : ('breach' as const),
    },
    { label: 'Edge', value: edge?.name ?? key },
    { label: 'Plate', value: `${content.plate.material} · ${formatLength(content.plate.thickness, unit)}` },
    { label: 'Joint', value: edge?.joint?.label || 'none given' },
  ]
  return (
    <Page>
      <PageHead title={`${content.part.number} ${content.part.name}`} label="Part" cells={cells} />
      <PageBody>
        <StandingBanner
          revision={revision}
          standing={standing}
          linkTo={(number) => jointPath(id, ref ?? { loop: 0, edge: 0 }, number)}
        />
        {edge ? (
          <>
            <div className="grid gap-6 md:grid-cols-2 items-start">
              <JointSectionDrawing edge={edge} thickness={content.plate.thickness} unit={unit} />
              <JointFigures edge={edge} thickness={content.plate.thickness} unit={unit} />
            </div>
            <EdgeTurns edges={edges} edge={edge} place={place} />
            <div className="grid gap-6 md:grid-cols-2 items-start">
              <JointPart content={content} edge={edge} unit={unit} />
              <EdgeList edges={edges} current={edge} place={place} unit={unit} />
            </div>
          </>
        ) : (
          <>
            <NoSuchEdge edgeKey={key} loops={content.loops} />
            <EdgeList edges={edges} current={null} place={place} unit={unit} />
          </>
        )}
        <JointCaution />
      </PageBody>
    </Page>
  )
}
