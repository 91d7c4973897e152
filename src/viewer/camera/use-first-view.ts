import { useEffect, useRef } from 'react'
import { edgeKey } from '../../../shared/walls/names.ts'
import type { EdgeRef } from '../../../shared/walls/types.ts'
import type { MeshIndex } from '../scene/mesh-index.ts'
import { edgeView } from './edge-view.ts'
import { standardView } from './standard-views.ts'
import { decodeView, encodeView } from './view-code.ts'
import type { ViewControl } from './view-control.ts'

interface Wanted {
  readonly index: MeshIndex | null
  readonly sized: boolean
  readonly control: ViewControl
  readonly view: string | null
  readonly focusEdge: EdgeRef | null
}

/**
 * Where the camera stands without being moved by hand: at a link's view, at the edge in focus, else fitted
 * once to the first part. An edit never moves it.
 */
export function useFirstView({ index, sized, control, view, focusEdge }: Wanted): void {
  const started = useRef(false)
  const lastView = useRef<string | null>(null)
  const lastFocus = useRef<string | null>(null)
  const focusKey = focusEdge && edgeKey(focusEdge)

  useEffect(() => {
    if (!index || !sized) return
    control.setSize(index.radius * 2)
    const go = (to: Parameters<ViewControl['go']>[0]) => {
      control.go(to, started.current)
      started.current = true
    }
    if (focusKey !== lastFocus.current) {
      lastFocus.current = focusKey
      const lines = focusKey === null ? undefined : index.edges.get(focusKey)
      const toEdge = lines && edgeView(lines, index.radius, control.frame)
      if (toEdge) return go(toEdge)
    }
    if (view !== lastView.current) {
      lastView.current = view
      const linked = view === null ? null : decodeView(view)
      // Our own report of a movement comes back through the link; it must not start another one.
      if (linked && view !== encodeView(control.goal)) return go(linked)
    }
    if (!started.current && index.radius > 0) {
      control.fit([index.mesh.positions], { from: standardView('corner'), glide: false })
      started.current = true
    }
  }, [index, sized, control, view, focusKey])
}
