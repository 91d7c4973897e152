import { useCallback, useState, type UIEvent } from 'react'

/** Rows drawn beyond what is seen, above and below. */
const SPARE_ROWS = 8

interface Rows {
  readonly first: number
  readonly end: number
  readonly onScroll: (event: UIEvent<HTMLElement>) => void
}

/** Which rows of a long list to draw: those in sight and a few more. All rows are equally high. */
export function useRows(count: number, rowHeight: number, viewHeight: number): Rows {
  const [top, setTop] = useState(0)
  const onScroll = useCallback(
    (event: UIEvent<HTMLElement>) => setTop(Math.floor(event.currentTarget.scrollTop / rowHeight)),
    [rowHeight],
  )
  const first = Math.max(0, Math.min(top, count) - SPARE_ROWS)
  const end = Math.min(count, top + Math.ceil(viewHeight / rowHeight) + SPARE_ROWS)
  return { first, end, onScroll }
}
