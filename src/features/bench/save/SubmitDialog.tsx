import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query'
import { useState } from 'react'
import { differenceOf } from '../../../../shared/setup/difference.ts'
import { revisionQuery, submitSetupMutation } from '../../../api/setups.ts'
import { announce } from '../../../ui/announce.ts'
import { Button } from '../../../ui/Button.tsx'
import { Dialog } from '../../../ui/Dialog.tsx'
import { controlClass, Field } from '../../../ui/Field.tsx'
import { ErrorNotice, Notice } from '../../../ui/Notice.tsx'
import { severityWord } from '../model/notes.ts'
import { useActs } from '../model/store.ts'
import { useScene } from '../scene.ts'
import { Changes } from './Changes.tsx'

/** The last look before asking for approval: what changed since the last approved one, and what is open. */
export function SubmitDialog({ onClose }: { onClose: () => void }) {
  const { setup, notes, result } = useScene()
  const acts = useActs()
  const submit = useMutation(submitSetupMutation(useQueryClient()))
  const [remark, setRemark] = useState('')
  const stops = notes.filter(({ severity }) => severity === 'stop')
  const { number, hash } = setup.revision

  async function ask() {
    const body = remark.trim() === '' ? { hash } : { hash, remark: remark.trim() }
    const answer = await submit.mutateAsync({ id: setup.id, body, ifMatch: setup.version })
    acts.moved(answer)
    announce(`Revision ${number} is submitted`)
    onClose()
  }

  return (
    <Dialog wide title={`Submit revision ${number} for approval`} onClose={onClose}>
      <section className="flex flex-col gap-1">
        <h3 className="text-label uppercase text-muted">
          {setup.approvedRevision === null
            ? 'No revision has been approved yet'
            : `Changed since the approved revision ${setup.approvedRevision}`}
        </h3>
        {setup.approvedRevision !== null && <SinceApproved approved={setup.approvedRevision} />}
      </section>
      <section className="flex flex-col gap-1">
        <h3 className="text-label uppercase text-muted">Open notes</h3>
        {notes.length === 0 && <p className="text-muted">{result.pending ? 'Being computed…' : 'None.'}</p>}
        <ol className="flex flex-col">
          {notes.map((note) => (
            <li
              key={note.number}
              className={`border-t border-rule py-1 ${note.severity === 'stop' ? 'text-breach' : ''}`}
            >
              {note.number}. {severityWord[note.severity]}: {note.message}
            </li>
          ))}
        </ol>
      </section>
      {stops.length > 0 && (
        <Notice tone="breach">
          {stops.length === 1 ? 'One note stops' : `${stops.length} notes stop`} the cut, so the set-up cannot
          be submitted. Cure what stops it first.
        </Notice>
      )}
      <Field label="Remark for the engineer (may stay empty)">
        {(control) => (
          <textarea
            {...control}
            rows={2}
            maxLength={1_000}
            value={remark}
            onChange={(event) => setRemark(event.target.value)}
            className={controlClass}
          />
        )}
      </Field>
      {submit.isError && <ErrorNotice error={submit.error} />}
      <div className="flex flex-wrap gap-2">
        <Button
          look="main"
          disabled={stops.length > 0 || result.pending}
          busy={submit.isPending && 'Submitting…'}
          onClick={() => void ask().catch(() => undefined)}
        >
          Submit revision {number}
        </Button>
        <Button onClick={onClose}>Not yet</Button>
      </div>
    </Dialog>
  )
}

function SinceApproved({ approved }: { approved: number }) {
  const { setup, unit } = useScene()
  const before = useQuery(revisionQuery(setup.id, approved))
  if (before.isPending) return <p className="text-muted">Reading revision {approved}…</p>
  if (before.isError) return <ErrorNotice error={before.error} />
  return (
    <Changes
      changes={differenceOf(before.data.content, setup.revision.content, unit)}
      none="Nothing in the content."
    />
  )
}
