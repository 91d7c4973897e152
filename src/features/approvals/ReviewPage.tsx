import { useQuery } from '@tanstack/react-query'
import { useParams } from 'react-router-dom'
import type { Setup } from '../../../shared/api/setups.ts'
import { cautions } from '../../../shared/files/cautions.ts'
import { formatAngle, formatLength } from '../../../shared/units/format.ts'
import { setupQuery } from '../../api/setups.ts'
import { Page, PageBody, PageHead, Section, type Cell } from '../../app/Page.tsx'
import { QueryGate } from '../../app/QueryGate.tsx'
import { useUnit } from '../../app/preferences.ts'
import { ButtonLink } from '../../ui/Button.tsx'
import { Caution } from '../../ui/Caution.tsx'
import { Facts } from '../../ui/Facts.tsx'
import { Notice } from '../../ui/Notice.tsx'
import { ProfileOutline } from '../../ui/ProfileOutline.tsx'
import { formatInstant } from '../../ui/when.ts'
import { boundsOfLoops } from '../../ui/loop-bounds.ts'
import { DecisionForms } from './DecisionForms.tsx'
import { Difference } from './Difference.tsx'
import { ReviewFindings } from './ReviewFindings.tsx'

/** One submitted set-up, everything that a decision needs, and the decision. */
export default function ReviewPage() {
  const { id = '' } = useParams()
  return <QueryGate query={useQuery(setupQuery(id))}>{(setup) => <Review setup={setup} />}</QueryGate>
}

function Review({ setup }: { setup: Setup }) {
  const { revision } = setup
  const { content } = revision
  return (
    <Page>
      <PageHead
        title={`${content.part.number} ${content.part.name}`}
        label="Review"
        cells={useCells(setup)}
      />
      <PageBody>
        <div className="flex flex-wrap gap-2">
          <ButtonLink to={`/setups/${setup.id}?rev=${revision.number}`}>Open on the bench</ButtonLink>
          <ButtonLink to={`/setups/${setup.id}/sheet?rev=${revision.number}`}>Open the sheet</ButtonLink>
          <ButtonLink to={`/parts/${setup.partId}`}>The part</ButtonLink>
          <ButtonLink to="/approvals" look="quiet">
            All that waits
          </ButtonLink>
        </div>
        <div className="grid gap-6 lg:grid-cols-[minmax(0,1fr)_26rem]">
          <div className="flex flex-col gap-6 min-w-0">
            <Section title="What the server finds">
              <ReviewFindings setupId={setup.id} revision={revision.number} hash={revision.hash} />
            </Section>
            <Section title="Changed since the last approval">
              <Difference setup={setup} />
            </Section>
            <Section title="Facts">
              <SetupFacts setup={setup} />
            </Section>
            <Caution>
              <ul className="flex flex-col gap-1">
                {cautions.map((text) => (
                  <li key={text}>{text}</li>
                ))}
              </ul>
            </Caution>
          </div>
          <div className="min-w-0">
            {setup.state === 'submitted' ? (
              <DecisionForms setup={setup} />
            ) : (
              <Notice title="Nothing to decide">
                Revision {revision.number} is {setup.state}. Only what was submitted can be approved or
                returned.
              </Notice>
            )}
          </div>
        </div>
      </PageBody>
    </Page>
  )
}

function useCells(setup: Setup): Cell[] {
  const unit = useUnit()
  const { plate, head } = setup.revision.content
  const limits = `${head.workingLimit === null ? 'none' : formatAngle(head.workingLimit, { bare: true })}/${formatAngle(head.mechanicalLimit)}`
  return [
    { label: 'Set-up', value: setup.name },
    { label: 'Rev', value: `${setup.revision.number} · ${setup.state}` },
    { label: 'Plate', value: `${plate.material} · ${formatLength(plate.thickness, unit)}` },
    { label: 'Head', value: `${head.name} · ${limits}` },
  ]
}

function SetupFacts({ setup }: { setup: Setup }) {
  const unit = useUnit()
  const { revision } = setup
  const { jet, datum, loops, walls, joints, note } = revision.content
  const bevelled = walls.filter(({ facets }) => facets.some(({ tilt }) => tilt !== 0)).length
  const submitted = revision.decisions.findLast(({ kind }) => kind === 'submitted')
  return (
    <div className="grid gap-4 md:grid-cols-[12rem_minmax(0,1fr)]">
      <ProfileOutline
        loops={loops}
        bounds={boundsOfLoops(loops)}
        className="w-full h-40"
        label="Outline of the part"
      />
      <Facts
        facts={[
          ['Bevelled edges', `${bevelled} of ${loops.reduce((sum, loop) => sum + loop.length, 0)}`],
          ['Joints', joints.length],
          ['The drawing gives', datum === 'root' ? 'the root line' : `the ${datum} edge`],
          ['Kerf and taper', `${formatLength(jet.kerf, unit)} · ${formatAngle(jet.taper)} a side`],
          [
            'Stand-off and nozzle',
            `${formatLength(jet.standoff, unit)} · ⌀ ${formatLength(jet.nozzleDiameter, unit)}`,
          ],
          ['Saved', `${formatInstant(revision.savedAt)}, ${revision.savedBy.name}`],
          ...(submitted === undefined
            ? []
            : ([
                ['Submitted', `${formatInstant(submitted.at)}, ${submitted.by.name}`],
                ['Remark', submitted.reason === '' ? 'none' : submitted.reason],
              ] as const)),
          ['Note', note === '' ? 'none' : <span className="whitespace-pre-wrap">{note}</span>],
          ['Content hash', <span className="break-all text-small">{revision.hash}</span>],
        ]}
      />
    </div>
  )
}
