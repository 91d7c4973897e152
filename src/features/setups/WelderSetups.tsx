import type { ReactNode } from 'react'
import { useState } from 'react'
import type { SetupRow } from '../../../shared/api/setups.ts'
import { formatLength } from '../../../shared/units/format.ts'
import { useUnit } from '../../app/preferences.ts'
import { ListState, type ListQuery } from '../../ui/ListState.tsx'
import { StateMark } from '../../ui/StateMark.tsx'
import { SetupJoints } from './SetupJoints.tsx'

interface WelderSetupsProps {
  readonly query: ListQuery<SetupRow>
  readonly list: { readonly filtered: boolean; readonly clear: () => void }
  readonly empty: ReactNode
}

/** Set-ups for gloves: those with an approved revision first; a press shows the joints to open. */
export function WelderSetups({ query, list, empty }: WelderSetupsProps) {
  const [openId, setOpenId] = useState<string | null>(null)
  return (
    <ListState query={query} filtered={list.filtered} onClear={list.clear} empty={empty}>
      {({ items }) => (
        <ul className="flex flex-col gap-2">
          {approvedFirst(items).map((setup) => (
            <SetupBlock
              key={setup.id}
              setup={setup}
              open={openId === setup.id}
              onToggle={() => setOpenId(openId === setup.id ? null : setup.id)}
            />
          ))}
        </ul>
      )}
    </ListState>
  )
}

/** Keeps the order within both halves. */
export function approvedFirst<T extends Pick<SetupRow, 'approvedRevision'>>(items: readonly T[]): T[] {
  const approved = items.filter(({ approvedRevision }) => approvedRevision !== null)
  return [...approved, ...items.filter(({ approvedRevision }) => approvedRevision === null)]
}

function SetupBlock({ setup, open, onToggle }: { setup: SetupRow; open: boolean; onToggle: () => void }) {
  const unit = useUnit()
  return (
    <li className={`border bg-panel ${setup.approvedRevision === null ? 'border-rule' : 'border-ink'}`}>
      <button
        type="button"
        aria-expanded={open}
        onClick={onToggle}
        className="w-full min-h-glove px-3 py-2 flex items-center justify-between gap-4 text-left cursor-pointer hover:bg-face"
      >
        <span className="flex flex-col gap-1 min-w-0">
          <span className="text-large font-medium">
            {setup.partNumber} {setup.partName}
          </span>
          <span className="text-muted">
            {setup.name} · {setup.material} · {formatLength(setup.thickness, unit)}
          </span>
          <StateMark {...setup} />
        </span>
        <span aria-hidden="true" className="text-figure">
          {open ? '−' : '+'}
        </span>
      </button>
      {open && <SetupJoints setup={setup} />}
    </li>
  )
}
