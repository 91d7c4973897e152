import { useEffect } from 'react'
import { useBlocker } from 'react-router-dom'
import { Button } from '../../../ui/Button.tsx'
import { Dialog } from '../../../ui/Dialog.tsx'
import type { Saving } from './use-save.ts'

/** Asks before unsaved work is left; within the bench (another view, another edge) nothing is asked. */
export function LeaveGuard({ saving }: { saving: Saving }) {
  const { dirty, blocked, save } = saving
  const blocker = useBlocker(
    ({ currentLocation, nextLocation }) => dirty && currentLocation.pathname !== nextLocation.pathname,
  )
  useEffect(() => {
    if (!dirty) return
    const ask = (event: BeforeUnloadEvent) => event.preventDefault()
    addEventListener('beforeunload', ask)
    return () => removeEventListener('beforeunload', ask)
  }, [dirty])
  if (blocker.state !== 'blocked') return null
  return (
    <Dialog title="There are unsaved changes" onClose={() => blocker.reset()}>
      <p>A draft of them is kept in this browser and offered when you come back. Nobody else sees it.</p>
      <div className="flex flex-wrap gap-2">
        <Button
          look="main"
          disabled={blocked !== null}
          busy={saving.saving && 'Saving…'}
          onClick={() => void save().then((answer) => (answer ? blocker.proceed() : blocker.reset()))}
        >
          Save and leave
        </Button>
        <Button onClick={() => blocker.proceed()}>Leave with a draft</Button>
        <Button onClick={() => blocker.reset()}>Stay</Button>
      </div>
    </Dialog>
  )
}
