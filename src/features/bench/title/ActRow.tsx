import { useState } from 'react'
import { useMay } from '../../../app/current-user.tsx'
import { Button } from '../../../ui/Button.tsx'
import { ErrorNotice } from '../../../ui/Notice.tsx'
import { CommandBox } from '../commands/CommandBox.tsx'
import type { Command } from '../commands/commands.ts'
import { useActs, useBench } from '../model/store.ts'
import { ConflictDialog } from '../save/ConflictDialog.tsx'
import { LeaveGuard } from '../save/LeaveGuard.tsx'
import { SubmitDialog } from '../save/SubmitDialog.tsx'
import { useSave } from '../save/use-save.ts'
import { useScene } from '../scene.ts'
import { useShortcuts } from '../use-shortcuts.ts'
import { KeysDialog } from './KeysDialog.tsx'
import { SetupDialog } from './SetupDialog.tsx'
import { TakeAway } from './TakeAway.tsx'

type Open = 'setup' | 'submit' | 'take-away' | 'keys' | 'commands' | null

/** What can be done with the whole set-up. */
export function ActRow() {
  const { setup, newest, readOnly } = useScene()
  const maySubmit = useMay('submitSetup') && newest === null
  const acts = useActs()
  const back = useBench((state) => state.history.past.length)
  const forth = useBench((state) => state.history.future.length)
  const saving = useSave()
  const [open, setOpen] = useState<Open>(null)
  const close = () => setOpen(null)
  const mayBeSubmitted = setup.state === 'draft' || setup.state === 'returned'

  useShortcuts({
    save: () => void saving.save(),
    help: () => setOpen('keys'),
    commands: () => setOpen('commands'),
    quiet: open !== null || saving.conflict !== null,
  })

  return (
    <>
      <div role="group" aria-label="Set-up" className="flex flex-wrap items-center gap-2 px-3 py-1">
        {!readOnly && (
          <>
            <Button onClick={acts.undo} disabled={back === 0} title="Ctrl+Z">
              Undo
            </Button>
            <Button onClick={acts.redo} disabled={forth === 0} title="Ctrl+Shift+Z">
              Redo
            </Button>
            <Button
              look="main"
              title={saving.blocked ?? 'Ctrl+S'}
              disabled={!saving.dirty || saving.blocked !== null}
              busy={saving.saving && 'Saving…'}
              onClick={() => void saving.save()}
            >
              Save
            </Button>
          </>
        )}
        {maySubmit && mayBeSubmitted && (
          <Button
            disabled={saving.blocked !== null || saving.saving}
            onClick={() => void submitAfterSave().catch(() => undefined)}
          >
            {saving.dirty ? 'Save and submit…' : 'Submit…'}
          </Button>
        )}
        <Button onClick={() => setOpen('setup')}>Plate, head, jet…</Button>
        <Button onClick={() => setOpen('take-away')}>Take away…</Button>
        <Button onClick={() => setOpen('commands')} title="Ctrl+K">
          Do…
        </Button>
        <Button onClick={() => setOpen('keys')} aria-label="Keys and help">
          ?
        </Button>
        {readOnly && <span className="text-muted">To look at only</span>}
        {saving.blocked !== null && !readOnly && (
          <span role="status" className="text-breach">
            {saving.blocked}
          </span>
        )}
      </div>
      {saving.error !== null && (
        <div className="order-last w-full px-3 pb-2">
          <ErrorNotice
            error={saving.error}
            actions={<Button onClick={() => void saving.save()}>Save again</Button>}
          />
        </div>
      )}
      {saving.conflict !== null && <ConflictDialog theirs={saving.conflict} onResolve={saving.resolve} />}
      {open === 'setup' && <SetupDialog onClose={close} />}
      {open === 'submit' && <SubmitDialog onClose={close} />}
      {open === 'take-away' && <TakeAway unsaved={saving.dirty} onClose={close} />}
      {open === 'keys' && <KeysDialog onClose={close} />}
      {open === 'commands' && <CommandBox ofSetup={commands()} onClose={close} />}
      <LeaveGuard saving={saving} />
    </>
  )

  function commands(): Command[] {
    const readOnlyWord = readOnly ? 'to look at only' : null
    const act = (name: string, run: () => void, more: Partial<Command> = {}): Command => ({
      id: `setup-${name.replace(/[^a-z]+/gi, '-')}`,
      group: 'set-up',
      name,
      run,
      ...more,
    })
    return [
      act('undo', acts.undo, { key: 'Ctrl+Z', off: back === 0 ? 'nothing to undo' : readOnlyWord }),
      act('redo', acts.redo, { key: 'Ctrl+Shift+Z', off: forth === 0 ? 'nothing to redo' : readOnlyWord }),
      act('save', () => void saving.save(), {
        key: 'Ctrl+S',
        off: readOnlyWord ?? saving.blocked ?? (saving.dirty ? null : 'nothing to save'),
      }),
      ...(maySubmit && mayBeSubmitted
        ? [
            act('submit for approval', () => void submitAfterSave().catch(() => undefined), {
              off: saving.blocked,
            }),
          ]
        : []),
      act('plate, head, jet', () => setOpen('setup')),
      act('take away: drawing, table, sheet', () => setOpen('take-away')),
      act('keys and help', () => setOpen('keys'), { key: '?' }),
    ]
  }

  async function submitAfterSave() {
    if (!saving.dirty || (await saving.save()) !== null) setOpen('submit')
  }
}
