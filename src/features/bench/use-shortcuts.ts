import { useEffect } from 'react'
import { useActs } from './model/store.ts'

type Keys = readonly (readonly [key: string, does: string])[]

/** What the help lists; the handlers stand below, in the wall strip, the edge table and the viewer. */
export const shortcuts: readonly { readonly where: string; readonly keys: Keys }[] = [
  {
    where: 'Anywhere',
    keys: [
      ['Ctrl+S', 'Save'],
      ['Ctrl+Z', 'Undo'],
      ['Ctrl+Shift+Z, Ctrl+Y', 'Redo'],
      ['Ctrl+K', 'Every act by its name, every edge by its number'],
    ],
  },
  {
    where: 'Outside a field',
    keys: [
      ['] and [', 'Next and previous edge'],
      ['e', 'To the edge card’s first number'],
      ['t', 'To the edge table'],
      ['w', 'To the wall strip'],
      ['n', 'To the notes'],
      ['?', 'This help'],
    ],
  },
  {
    where: 'In the wall strip (left, right) and the edge table (up, down)',
    keys: [
      ['Arrow keys', 'Move and select'],
      ['Shift+Arrow', 'Select a range'],
      ['Ctrl+Arrow', 'Move without selecting'],
      ['Space', 'Add or take away'],
      ['Home, End', 'First and last edge'],
      ['Ctrl+A', 'Select all'],
      ['Escape', 'Select none'],
    ],
  },
]

/** Where the letter keys lead: ids of elements on the sheet. */
export const landingIds: Readonly<Record<string, string>> = {
  e: 'bench-card',
  t: 'bench-table',
  w: 'bench-strip',
  n: 'bench-notes',
}

interface Shortcuts {
  readonly save: () => void
  readonly help: () => void
  readonly commands: () => void
  /** A dialog is open: only what it handles itself. */
  readonly quiet: boolean
}

export function useShortcuts({ save, help, commands, quiet }: Shortcuts): void {
  const acts = useActs()
  useEffect(() => {
    function pressed(event: KeyboardEvent) {
      if (quiet || event.defaultPrevented || event.isComposing) return
      const act = event.ctrlKey || event.metaKey ? held(event) : isTyping(event.target) ? null : plain(event)
      if (act === null) return
      event.preventDefault()
      act()
    }
    function held(event: KeyboardEvent): (() => void) | null {
      if (event.altKey) return null
      const key = event.key.toLowerCase()
      if (key === 's') return save
      if (key === 'k') return commands
      if (key === 'y' || (key === 'z' && event.shiftKey)) return acts.redo
      if (key === 'z') return acts.undo
      return null
    }
    function plain(event: KeyboardEvent): (() => void) | null {
      if (event.altKey) return null
      if (event.key === ']') return () => acts.step(1)
      if (event.key === '[') return () => acts.step(-1)
      if (event.key === '?') return help
      const id = landingIds[event.key]
      return id === undefined ? null : () => land(id)
    }
    addEventListener('keydown', pressed)
    return () => removeEventListener('keydown', pressed)
  }, [acts, save, help, commands, quiet])
}

function isTyping(target: EventTarget | null): boolean {
  return (
    target instanceof HTMLElement &&
    (target.isContentEditable || target.matches('input:not([type=radio], [type=checkbox]), textarea, select'))
  )
}

/** What takes the focus in a region, by preference: its own choice, the item the arrow keys stand on, any control. */
const LANDINGS = ['[data-landing]', '[tabindex="0"]', 'input', 'button', 'a[href]']

export function land(id: string): void {
  const region = document.getElementById(id)
  if (region === null) return
  const target = LANDINGS.flatMap((selector) => [...region.querySelectorAll<HTMLElement>(selector)]).find(
    (element) => element.checkVisibility() && !element.matches(':disabled'),
  )
  ;(target ?? region).focus()
  region.scrollIntoView({ block: 'nearest' })
}
