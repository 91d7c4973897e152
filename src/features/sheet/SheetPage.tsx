import { useSuspenseQuery } from '@tanstack/react-query'
import { useParams } from 'react-router-dom'
import { contoursUrl, edgesUrl, revisionEvaluationQuery } from '../../api/setups.ts'
import { PageHead } from '../../app/Page.tsx'
import { revisionText } from '../../revision/standing.ts'
import { useShownRevision } from '../../revision/use-revision.ts'
import { StandingBanner } from '../../revision/StandingBanner.tsx'
import { Button, ButtonAnchor, ButtonLink } from '../../ui/Button.tsx'
import { Paper } from './Paper.tsx'
import './sheet.css'

/** The set-up sheet (its own frame, because paper breaks into pages only through plain blocks): what the machine and the welder get on paper. */
export default function SheetPage() {
  const { id = '' } = useParams()
  const { setup, revision, standing } = useShownRevision(id)
  const { data } = useSuspenseQuery(revisionEvaluationQuery(id, revision.number))
  return (
    <div className="flex flex-col print:block">
      <PageHead
        title={`${revision.content.part.number} ${revision.content.part.name}`}
        label="Set-up sheet"
        cells={[
          { label: 'Set-up', value: setup.name },
          {
            label: 'Rev',
            value: revisionText(revision, standing),
            tone: standing.approval && standing.supersededBy === null ? 'good' : 'breach',
          },
        ]}
        actions={
          <>
            <Button look="main" onClick={() => window.print()}>
              Print
            </Button>
            <ButtonAnchor href={contoursUrl(id, revision.number)} download>
              Contours, DXF
            </ButtonAnchor>
            <ButtonAnchor href={edgesUrl(id, revision.number)} download>
              Edges, CSV
            </ButtonAnchor>
            <ButtonLink to={`/setups/${id}`} look="quiet">
              Bench
            </ButtonLink>
          </>
        }
      />
      <div className="px-3 sm:px-6 py-5 flex flex-col gap-6 print:block print:p-0">
        <div className="print:hidden flex flex-col gap-3 max-w-3xl">
          <StandingBanner
            revision={revision}
            standing={standing}
            linkTo={(number) => `/setups/${id}/sheet?rev=${number}`}
          />
          <p className="text-muted">
            A4 upright. Print at actual size (100 %, not “fit to page”), then measure the scale bar: it must
            be 100 mm long.
          </p>
        </div>
        <div
          className="shrink-0 overflow-x-auto print:overflow-visible"
          role="region"
          aria-label="The sheet as it prints"
          tabIndex={0}
        >
          <Paper setup={setup} revision={revision} standing={standing} evaluation={data.evaluation} />
        </div>
      </div>
    </div>
  )
}
