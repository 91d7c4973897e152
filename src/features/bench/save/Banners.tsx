import { useNavigate } from 'react-router-dom'
import type { Decision } from '../../../../shared/api/setups.ts'
import { useMay } from '../../../app/current-user.tsx'
import { Button, ButtonLink } from '../../../ui/Button.tsx'
import { formatInstant } from '../../../ui/when.ts'
import { clockText } from '../model/draft.ts'
import { sameContent } from '../model/content.ts'
import { useActs, useBench, useContent } from '../model/store.ts'
import { useScene } from '../scene.ts'
import { Banner } from './Banner.tsx'
import { useDraft } from './use-draft.ts'

/** What a person must know before touching anything: an old revision, a decision, a draft, a newer save. */
export function Banners() {
  return (
    <div className="grow basis-96 flex flex-col empty:hidden">
      <OldRevision />
      <StateBanner />
      <DraftOffer />
      <SavedElsewhere />
      <NotComputed />
    </div>
  )
}

function OldRevision() {
  const { setup, newest } = useScene()
  const navigate = useNavigate()
  if (newest === null) return null
  const { number, state } = setup.revision
  return (
    <Banner
      title={`Revision ${number} · ${state}`}
      actions={
        <Button onClick={() => void navigate({ search: '' })}>
          Open revision {newest.revision.number}, the newest
        </Button>
      }
    >
      An older revision, to look at only. It was saved by {setup.revision.savedBy.name} on{' '}
      {formatInstant(setup.revision.savedAt)}.
    </Banner>
  )
}

function StateBanner() {
  const { setup, newest, readOnly } = useScene()
  const mayApprove = useMay('approveSetup')
  const last = setup.revision.decisions.at(-1)
  if (newest !== null || last === undefined || setup.state === 'draft') return null
  const review = setup.state === 'submitted' && mayApprove && (
    <ButtonLink look="main" to={`/approvals/${setup.id}`}>
      Review: approve or return
    </ButtonLink>
  )
  return (
    <Banner
      tone={setup.state === 'approved' ? 'good' : 'plain'}
      title={`Revision ${setup.revision.number} · ${setup.state}`}
      actions={review || undefined}
    >
      {decisionText(last)}
      {!readOnly && setup.state !== 'returned' && ' A saved change begins a new draft.'}
    </Banner>
  )
}

function decisionText({ kind, by, at, reason }: Decision): string {
  const said = reason === '' ? '' : ` “${reason}”`
  return `${kind[0]!.toUpperCase()}${kind.slice(1)} by ${by.name} on ${formatInstant(at)}.${said}`
}

function DraftOffer() {
  const { found, goOn, discard } = useDraft()
  const base = useBench((state) => state.base)
  if (found === null) return null
  return (
    <Banner
      title="Unsaved changes"
      actions={
        <>
          <Button look="main" onClick={goOn}>
            Continue with them
          </Button>
          <Button onClick={discard}>Discard them</Button>
        </>
      }
    >
      Unsaved changes from {dayAndClock(found.keptAt)} were kept{' '}
      {found.place === 'browser' ? 'in this browser' : 'on the server'}.
      {found.version !== base.version &&
        ` The set-up has moved on since: they began on revision ${found.revision}. Saving will show both sides.`}
    </Banner>
  )
}

/** `14:02`, or with its day when that was not today. */
function dayAndClock(at: number): string {
  const today = new Date().toDateString() === new Date(at).toDateString()
  return today ? clockText(at).slice(0, 5) : formatInstant(new Date(at).toISOString())
}

function SavedElsewhere() {
  const { setup, newest } = useScene()
  const base = useBench((state) => state.base)
  const content = useContent()
  const acts = useActs()
  if (newest !== null || setup.version <= base.version) return null
  const clean = sameContent(content, base.content)
  return (
    <Banner
      title="Changed elsewhere"
      actions={
        clean ? (
          <Button onClick={() => acts.takeTheirs(setup)}>Show revision {setup.revision.number}</Button>
        ) : undefined
      }
    >
      The set-up was changed meanwhile: revision {setup.revision.number} by {setup.revision.savedBy.name}, now{' '}
      {setup.state}. {clean ? '' : 'Your next save will show both sides.'}
    </Banner>
  )
}

function NotComputed() {
  const { result } = useScene()
  if (result.error === null) return null
  return (
    <Banner tone="breach" title="Not computed">
      {result.error.message} The picture shows the last sound state.
    </Banner>
  )
}
