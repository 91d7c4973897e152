import { useState, type FocusEvent, type KeyboardEvent, type ReactNode } from 'react'

const STEPS: Record<string, (at: number, count: number) => number> = {
  ArrowRight: (at, count) => (at + 1) % count,
  ArrowLeft: (at, count) => (at - 1 + count) % count,
  Home: () => 0,
  End: (_, count) => count - 1,
}

interface ToolbarProps {
  readonly id?: string
  readonly label: string
  readonly className: string
  /** Draws the buttons; the one of this name is the toolbar's single Tab stop. */
  readonly children: (stop: string) => ReactNode
  /** Name of the first button. */
  readonly first: string
}

/** The toolbar pattern: one stop for Tab, arrows go from button to button. Buttons bear `data-stop`. */
export function Toolbar({ id, label, className, first, children }: ToolbarProps) {
  const [stop, setStop] = useState(first)

  const onKeyDown = (event: KeyboardEvent<HTMLDivElement>) => {
    const step = STEPS[event.key]
    if (!step) return
    const buttons = [...event.currentTarget.querySelectorAll<HTMLElement>('[data-stop]')]
    const at = buttons.findIndex((button) => button === document.activeElement)
    if (at < 0) return
    event.preventDefault()
    buttons[step(at, buttons.length)]!.focus()
  }

  const onFocus = (event: FocusEvent<HTMLDivElement>) => {
    const name = (event.target as HTMLElement).dataset.stop
    if (name) setStop(name)
  }

  return (
    <div
      id={id}
      role="toolbar"
      aria-label={label}
      className={className}
      onKeyDown={onKeyDown}
      onFocus={onFocus}
    >
      {children(stop)}
    </div>
  )
}
