import { useState, type ReactNode } from 'react'

interface RegionProps {
  readonly id: string
  readonly title: ReactNode
  readonly aside?: ReactNode
  readonly className?: string
  readonly children: ReactNode
}

/** A named part of the sheet. On a phone its heading folds it away; on wider screens it is always open. */
export function Region({ id, title, aside, className = '', children }: RegionProps) {
  const [open, setOpen] = useState(true)
  return (
    <section
      id={id}
      tabIndex={-1}
      aria-labelledby={`${id}-title`}
      className={`min-w-0 outline-none ${className}`}
    >
      <div className="flex flex-wrap items-center justify-between gap-x-4 border-b border-rule sm:border-0 pb-1">
        <h2 id={`${id}-title`} className="text-label text-muted uppercase">
          <span className="max-sm:hidden">{title}</span>
          <button
            type="button"
            className="sm:hidden flex items-center gap-2 min-h-11 uppercase cursor-pointer"
            aria-expanded={open}
            aria-controls={`${id}-body`}
            onClick={() => setOpen(!open)}
          >
            <span aria-hidden="true">{open ? '−' : '+'}</span>
            {title}
          </button>
        </h2>
        {aside !== undefined && <div className="grow text-right text-small text-muted">{aside}</div>}
      </div>
      <div id={`${id}-body`} className={open ? '' : 'max-sm:hidden'}>
        {children}
      </div>
    </section>
  )
}
