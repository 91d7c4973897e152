import type { Setup } from '../../../../shared/api/setups.ts'
import { differenceOf } from '../../../../shared/setup/difference.ts'
import { Button } from '../../../ui/Button.tsx'
import { Dialog } from '../../../ui/Dialog.tsx'
import { formatInstant } from '../../../ui/when.ts'
import { headOf, wholeContent } from '../model/content.ts'
import { editableOf } from '../model/state.ts'
import { useBench, useContent } from '../model/store.ts'
import { useScene } from '../scene.ts'
import { Changes } from './Changes.tsx'

interface ConflictDialogProps {
  readonly theirs: Setup
  readonly onResolve: (choice: 'mine' | 'theirs' | 'later') => void
}

/** Somebody saved in between: both sides against what they began from, and nothing lost whichever is chosen. */
export function ConflictDialog({ theirs, onResolve }: ConflictDialogProps) {
  const { stored, heads, unit } = useScene()
  const mine = useContent()
  const base = useBench((state) => state.base)
  const { revision } = theirs
  const whole = (content: typeof mine) =>
    wholeContent(stored, content, headOf(stored.head, heads, content.headId))
  const began = whole(base.content)
  const theirChanges = differenceOf(began, whole(editableOf(theirs)), unit)
  const myChanges = differenceOf(began, whole(mine), unit)
  return (
    <Dialog wide title={`Revision ${revision.number} was saved meanwhile`} onClose={() => onResolve('later')}>
      <p>
        {revision.savedBy.name} saved revision {revision.number} on {formatInstant(revision.savedAt)}, after
        you began from revision {base.revision}. The state is now {theirs.state}. Choose what goes on; the
        other side stays in the list of revisions or one undo away.
      </p>
      <section className="flex flex-col gap-1">
        <h3 className="text-label uppercase text-muted">What {revision.savedBy.name} changed</h3>
        <Changes changes={theirChanges} none="Nothing in the content." />
      </section>
      <section className="flex flex-col gap-1">
        <h3 className="text-label uppercase text-muted">What you changed</h3>
        <Changes changes={myChanges} none="Nothing in the content." />
      </section>
      <div className="flex flex-wrap gap-2">
        <Button look="main" onClick={() => onResolve('mine')}>
          Save mine as revision {revision.number + 1}
        </Button>
        <Button onClick={() => onResolve('theirs')}>Take theirs</Button>
        <Button onClick={() => onResolve('later')}>Cancel</Button>
      </div>
      <p className="text-small text-muted">
        Saving yours puts it on top as it stands: their changes are not merged into it. After taking theirs,
        undo brings yours back.
      </p>
    </Dialog>
  )
}
