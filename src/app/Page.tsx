import { useEffect, type ReactNode } from 'react'

type Tone = 'plain' | 'breach' | 'select' | 'good'

export interface Cell {
  readonly label: string
  readonly value: ReactNode
  readonly tone?: Tone
}

const tones: Record<Tone, string> = {
  plain: '',
  breach: 'text-breach',
  select: 'text-select',
  good: 'text-good',
}

interface PageHeadProps {
  /** What the sheet shows; the page's heading and the browser tab's title. */
  readonly title: string
  /** The heading cell's label, for instance PART. */
  readonly label?: string
  readonly cells?: readonly Cell[]
  /** Buttons and links at the row's end. */
  readonly actions?: ReactNode
}

/** The sheet's title block: one ruled row of cells, the first of which is the page's heading. */
export function PageHead({ title, label = 'Sheet', cells = [], actions }: PageHeadProps) {
  useEffect(() => {
    document.title = `${title} · Undercant`
  }, [title])
  return (
    <header className="flex flex-wrap gap-px bg-rule border-b border-rule print:hidden">
      <div className="px-3 py-1.5 max-xl:grow bg-panel max-w-full sm:min-w-40">
        <p className="text-label uppercase text-muted" aria-hidden="true">
          {label}
        </p>
        <h1 className="font-medium break-words">{title}</h1>
      </div>
      {cells.map((cell) => (
        <div key={cell.label} className="px-3 py-1.5 bg-panel max-xl:grow min-w-0">
          <p className="text-label uppercase text-muted">{cell.label}</p>
          <div className={`font-medium ${tones[cell.tone ?? 'plain']}`}>{cell.value}</div>
        </div>
      ))}
      <div className="grow px-3 py-1.5 flex flex-wrap items-center sm:justify-end gap-2 bg-panel max-sm:empty:hidden">
        {actions}
      </div>
    </header>
  )
}

interface PageProps {
  readonly children: ReactNode
  /** Fills the window's height below the shell's row and does not scroll itself: for the bench. */
  readonly fill?: boolean
}

/** A page under the shell's row: a `PageHead`, then `PageBody` or, with `fill`, what the page likes. */
export function Page({ children, fill = false }: PageProps) {
  return (
    <div data-fill={fill || undefined} className={fill ? 'flex flex-col flex-1 min-h-0' : 'flex flex-col'}>
      {children}
    </div>
  )
}

/** The padded middle of an ordinary page. */
export function PageBody({ children, narrow = false }: { children: ReactNode; narrow?: boolean }) {
  return (
    <div className={`px-3 sm:px-6 py-5 flex flex-col gap-6 w-full ${narrow ? 'max-w-3xl' : 'max-w-[96rem]'}`}>
      {children}
    </div>
  )
}

/** A block of a page with its heading in small capitals over a hairline. */
export function Section({
  title,
  aside,
  children,
}: {
  title: string
  aside?: ReactNode
  children: ReactNode
}) {
  return (
    <section className="flex flex-col gap-3 min-w-0">
      <div className="flex flex-wrap justify-between items-baseline gap-x-4 border-b border-rule pb-1">
        <h2 className="text-label uppercase text-muted">{title}</h2>
        {aside !== undefined && <div className="text-small text-muted">{aside}</div>}
      </div>
      {children}
    </section>
  )
}
