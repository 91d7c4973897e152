import { useCallback, useEffect } from 'react'
import { useNavigate, useSearchParams } from 'react-router-dom'
import { writeEdges } from './model/link.ts'
import { useBench } from './model/store.ts'

/** Rest after the last change before the address follows, ms: browsers refuse many changes in a row. */
const REST_MS = 250

/** The selection in the address, so that a link or a reload shows the same edges. */
export function useLink(): void {
  const selection = useBench((state) => state.selection)
  const [search, setSearch] = useSearchParams()
  const wanted = writeEdges(selection)
  const shown = search.get('edges')
  useEffect(() => {
    if (wanted === shown) return
    const timer = setTimeout(() => {
      setSearch((before) => withParam(before, 'edges', wanted), { replace: true, preventScrollReset: true })
    }, REST_MS)
    return () => clearTimeout(timer)
  }, [wanted, shown, setSearch])
}

/** The camera in the address, once it has come to rest. */
export function useViewLink(): [view: string | null, keep: (view: string) => void] {
  const [search] = useSearchParams()
  const navigate = useNavigate()
  // Reads the address itself: a function that changed with it would draw the picture anew.
  const keep = useCallback(
    (view: string) => {
      const next = withParam(new URLSearchParams(location.search), 'view', view)
      void navigate({ search: next.toString() }, { replace: true, preventScrollReset: true })
    },
    [navigate],
  )
  return [search.get('view'), keep]
}

function withParam(search: URLSearchParams, name: string, value: string | null): URLSearchParams {
  const next = new URLSearchParams(search)
  if (value === null) next.delete(name)
  else next.set(name, value)
  return next
}
