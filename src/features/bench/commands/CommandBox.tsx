import { useEffect, useId, useMemo, useRef, useState } from 'react'
import { controlClass } from '../../../ui/Field.tsx'
import { Dialog } from '../../../ui/Dialog.tsx'
import { useScene } from '../scene.ts'
import { matching, type Command } from './commands.ts'
import { useCommands } from './use-commands.ts'

interface CommandBoxProps {
  /** The acts of the whole set-up; the rest is the bench's own. */
  readonly ofSetup: readonly Command[]
  readonly onClose: () => void
}

/** More than these are not listed at once: typing narrows them. */
const MOST_SHOWN = 60

/** Every act by its name: type a part of it, choose with the arrow keys, Enter does it. */
export function CommandBox({ ofSetup, onClose }: CommandBoxProps) {
  const commands = useCommands(ofSetup, useScene().viewContextRef)
  const [typed, setTyped] = useState('')
  const [at, setAt] = useState(0)
  const list = useId()
  const field = useRef<HTMLInputElement>(null)
  // The dialog gives the focus to its first button; what is typed next belongs in the field.
  useEffect(() => field.current?.focus(), [])
  const found = useMemo(() => matching(commands, typed).slice(0, MOST_SHOWN), [commands, typed])
  const active = found[Math.min(at, found.length - 1)]
  const idOf = (command: Command) => `${list}-${command.id}`

  function run(command: Command | undefined) {
    if (command === undefined || command.off) return
    onClose()
    // After the box has closed and the focus is back: an act may move it or open a dialog of its own.
    setTimeout(command.run)
  }

  function move(step: number) {
    const next = (Math.min(at, found.length - 1) + step + found.length) % Math.max(1, found.length)
    setAt(next)
    const command = found[next]
    if (command) document.getElementById(idOf(command))?.scrollIntoView({ block: 'nearest' })
  }

  return (
    <Dialog title="What to do" onClose={onClose}>
      <input
        type="text"
        role="combobox"
        aria-label="Name of an act, or of an edge"
        aria-expanded="true"
        aria-controls={list}
        aria-autocomplete="list"
        aria-activedescendant={active && idOf(active)}
        autoComplete="off"
        spellCheck={false}
        ref={field}
        placeholder="undo, parallel, e12, look from the top …"
        value={typed}
        onChange={(event) => {
          setTyped(event.target.value)
          setAt(0)
        }}
        onKeyDown={(event) => {
          if (event.key === 'ArrowDown') move(1)
          else if (event.key === 'ArrowUp') move(-1)
          else if (event.key === 'Enter') run(active)
          else return
          event.preventDefault()
        }}
        className={controlClass}
      />
      <ul
        id={list}
        role="listbox"
        aria-label="Acts"
        className="flex flex-col max-h-[55dvh] overflow-y-auto border border-rule"
      >
        {found.map((command, i) => (
          <li
            key={command.id}
            id={idOf(command)}
            role="option"
            aria-selected={command === active}
            aria-disabled={Boolean(command.off)}
            onClick={() => run(command)}
            onPointerMove={() => setAt(i)}
            className={`flex flex-wrap items-baseline gap-x-3 px-3 py-1.5 cursor-pointer border-l-4 ${
              command === active ? 'bg-face border-select' : 'border-transparent'
            } ${command.off ? 'text-muted cursor-default' : ''}`}
          >
            <span className="text-label uppercase text-muted w-20">{command.group}</span>
            <span className="grow">{command.name}</span>
            <span className="text-small text-muted">{command.off ?? command.key}</span>
          </li>
        ))}
        {found.length === 0 && (
          <li className="px-3 py-2 text-muted">Nothing of that name. Type fewer letters.</li>
        )}
      </ul>
      <p role="status" className="sr-only">
        {found.length === 0 ? 'No act of that name' : `${found.length} acts`}
      </p>
    </Dialog>
  )
}
