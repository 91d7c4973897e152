import { useEffect, useId, useRef, type ReactNode } from 'react'

interface DialogProps {
  readonly title: string
  readonly onClose: () => void
  readonly children: ReactNode
  readonly wide?: boolean
}

/**
 * The browser's own modal dialog: focus stays inside, Escape closes it, and focus returns to where it was.
 * Mounted means open.
 */
export function Dialog({ title, onClose, children, wide = false }: DialogProps) {
  const ref = useRef<HTMLDialogElement>(null)
  const heading = useId()
  useEffect(() => {
    const dialog = ref.current
    const before = document.activeElement
    dialog?.showModal()
    return () => {
      dialog?.close()
      if (before instanceof HTMLElement && before.isConnected) before.focus()
    }
  }, [])
  return (
    <dialog
      ref={ref}
      aria-labelledby={heading}
      onCancel={(event) => {
        event.preventDefault()
        onClose()
      }}
      className={`m-auto p-0 bg-sheet text-ink border-2 border-ink backdrop:bg-ink/40 max-h-[calc(100dvh-1.5rem)] w-[calc(100vw-1.5rem)] ${wide ? 'max-w-3xl' : 'max-w-lg'}`}
    >
      <div className="flex items-stretch border-b border-rule bg-panel">
        <h2 id={heading} className="px-4 py-2.5 grow font-medium">
          {title}
        </h2>
        <button
          type="button"
          onClick={onClose}
          aria-label="Close"
          className="px-4 min-w-11 border-l border-rule hover:bg-face cursor-pointer"
        >
          ×
        </button>
      </div>
      <div className="p-4 flex flex-col gap-4">{children}</div>
    </dialog>
  )
}
