import { useSyncExternalStore } from 'react'

export type Layout = 'desk' | 'tablet' | 'phone'

/** The same widths as in `bench.css`. */
const DESK = '(min-width: 1200px)'
const PHONE = '(max-width: 639px)'

function subscribe(changed: () => void): () => void {
  const queries = [matchMedia(DESK), matchMedia(PHONE)]
  for (const query of queries) query.addEventListener('change', changed)
  return () => {
    for (const query of queries) query.removeEventListener('change', changed)
  }
}

function read(): Layout {
  return matchMedia(DESK).matches ? 'desk' : matchMedia(PHONE).matches ? 'phone' : 'tablet'
}

/** How the sheet is laid out now. */
export const useLayout = (): Layout => useSyncExternalStore(subscribe, read)
