import { useState } from 'react'
import type { Setup } from '../../../shared/api/setups.ts'
import { useCurrentUser } from '../../app/current-user.tsx'
import { Section } from '../../app/Page.tsx'
import { Notice } from '../../ui/Notice.tsx'
import { ApproveForm } from './ApproveForm.tsx'
import { ReturnForm } from './ReturnForm.tsx'

/** Approve or return; whoever submitted it sees why it is not theirs to decide. */
export function DecisionForms({ setup }: { setup: Setup }) {
  const me = useCurrentUser()
  // Forms decide on what was on the screen when the review began, not on what may have come since.
  const [seen] = useState(setup)
  const submitted = setup.revision.decisions.findLast(({ kind }) => kind === 'submitted')
  if (submitted?.by.id === me.id)
    return (
      <Notice title="You submitted it">
        Whoever submits a set-up cannot approve it: a second pair of eyes must. Another engineer decides.
      </Notice>
    )
  return (
    <div className="flex flex-col gap-6">
      {setup.version !== seen.version && (
        <Notice tone="breach" title="Changed since you opened it">
          This set-up is not what you looked at any more. Load the page again before you decide.
        </Notice>
      )}
      <Section title="Approve">
        <ApproveForm setup={seen} />
      </Section>
      <Section title="Or send it back">
        <ReturnForm setup={seen} />
      </Section>
    </div>
  )
}
