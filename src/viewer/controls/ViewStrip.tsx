import { useId, useState, type ReactNode } from 'react'
import { ACTS, type Act, type ActContext, type ActGroup } from './acts.ts'
import { Arrow } from './Arrow.tsx'
import { Toolbar } from './Toolbar.tsx'

interface ViewStripProps {
  readonly context: ActContext
  readonly hasSelection: boolean
  /** Only the acts most used stay in sight; the rest open above. */
  readonly folded: boolean
  readonly compact: boolean
}

const GROUPS: readonly ActGroup[] = ['look from', 'fit', 'zoom', 'turn', 'move', 'cut open']
const FIRST = ACTS.filter((act) => act.first)
const MORE = 'more'

/** A button for every act of the camera, as a strip of ruled cells. */
export function ViewStrip({ context, hasSelection, folded, compact }: ViewStripProps) {
  const [open, setOpen] = useState(false)
  const panel = useId()

  const cells = (acts: readonly Act[], stop: string, alone = false) =>
    acts.map((act) => (
      <Cell
        key={act.name}
        act={act}
        alone={alone}
        compact={compact}
        stops={stop === act.name}
        disabled={act.needsSelection === true && !hasSelection}
        onPress={() => act.run(context)}
      />
    ))
  const groups = (stop: string, wide: boolean) =>
    GROUPS.map((group) => (
      <Group key={group} name={group} wide={wide}>
        {cells(
          ACTS.filter((act) => act.group === group),
          stop,
        )}
      </Group>
    ))

  if (!folded) {
    return (
      <Toolbar label="view" first={ACTS[0]!.name} className="flex flex-wrap border-t border-rule bg-panel">
        {(stop) => groups(stop, false)}
      </Toolbar>
    )
  }
  return (
    <div className="relative">
      {open && (
        <Toolbar
          id={panel}
          label="every view act"
          first={ACTS[0]!.name}
          className="absolute inset-x-0 bottom-full z-10 max-h-[70cqh] overflow-auto border-t border-rule bg-panel"
        >
          {(stop) => groups(stop, true)}
        </Toolbar>
      )}
      <Toolbar label="view" first={FIRST[0]!.name} className="flex flex-wrap border-t border-rule bg-panel">
        {(stop) => (
          <>
            {cells(FIRST, stop, true)}
            <button
              type="button"
              data-stop={MORE}
              tabIndex={stop === MORE ? 0 : -1}
              aria-expanded={open}
              aria-controls={open ? panel : undefined}
              onClick={() => setOpen(!open)}
              className={`ml-auto border-l ${cellClass(compact)}`}
            >
              {open ? 'less' : MORE}
            </button>
          </>
        )}
      </Toolbar>
    </div>
  )
}

function Group({ name, wide, children }: { name: ActGroup; wide: boolean; children: ReactNode }) {
  return (
    <div
      role="group"
      aria-label={name}
      className={`flex items-stretch border-rule ${wide ? 'w-full flex-wrap border-b last:border-b-0' : 'border-r'}`}
    >
      <span
        aria-hidden="true"
        className={`self-center px-2 text-[0.625rem] tracking-wide text-muted ${wide ? 'w-20' : ''}`}
      >
        {name}
      </span>
      {children}
    </div>
  )
}

interface CellProps {
  readonly act: Act
  /** Without its group's word beside it. */
  readonly alone: boolean
  readonly compact: boolean
  readonly stops: boolean
  readonly disabled: boolean
  readonly onPress: () => void
}

function Cell({ act, alone, compact, stops, disabled, onPress }: CellProps) {
  return (
    <button
      type="button"
      data-stop={act.name}
      tabIndex={stops ? 0 : -1}
      aria-label={act.name}
      aria-keyshortcuts={shortcut(act.key)}
      title={act.key ? `${act.name} (${act.key})` : act.name}
      aria-disabled={disabled}
      onClick={() => !disabled && onPress()}
      className={cellClass(compact)}
    >
      {act.arrow ? (
        <Arrow heading={act.arrow} bent={act.group === 'turn'} />
      ) : (
        (alone && act.alone) || act.text
      )}
    </button>
  )
}

function cellClass(compact: boolean): string {
  const size = compact
    ? 'min-h-glove min-w-glove'
    : 'min-h-8 min-w-8 pointer-coarse:min-h-11 pointer-coarse:min-w-11'
  return (
    `${size} cursor-pointer border-rule px-2 text-small text-ink hover:bg-face ` +
    'aria-disabled:cursor-default aria-disabled:text-muted aria-disabled:opacity-60 focus-visible:-outline-offset-2'
  )
}

const SPOKEN: Record<string, string> = {
  '←': 'ArrowLeft',
  '→': 'ArrowRight',
  '↑': 'ArrowUp',
  '↓': 'ArrowDown',
  '−': '-',
  shift: 'Shift',
}

/** The key in the words of `aria-keyshortcuts`; it acts while the picture has the focus. */
function shortcut(key: string | undefined): string | undefined {
  return key
    ?.split(' ')
    .map((part) => SPOKEN[part] ?? part)
    .join('+')
}
