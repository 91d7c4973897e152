import { useMemo, type RefObject } from 'react'
import { edgeName } from '../../../../shared/walls/names.ts'
import { VIEW_ACTS, type ViewContext } from '../../../viewer/index.ts'
import { allEdges } from '../model/edges.ts'
import { picks } from '../model/picks.ts'
import { useActs, useBench } from '../model/store.ts'
import { land, landingIds } from '../use-shortcuts.ts'
import type { Command } from './commands.ts'

const places: readonly (readonly [name: string, key: string])[] = [
  ['edge card', 'e'],
  ['edge table', 't'],
  ['wall strip', 'w'],
  ['notes', 'n'],
]

/** Every act of the bench: those of the set-up, selection, places, the view, and each edge by its name. */
export function useCommands(
  ofSetup: readonly Command[],
  view: RefObject<ViewContext | null>,
): readonly Command[] {
  const acts = useActs()
  const loops = useBench((state) => state.loops)
  const selection = useBench((state) => state.selection)
  return useMemo(() => {
    const nothing = selection.length === 0 ? 'select an edge first' : null
    const select = (name: string, run: () => void, more: Partial<Command> = {}): Command => ({
      id: `select-${name.replaceAll(' ', '-')}`,
      group: 'select',
      name,
      run,
      ...more,
    })
    return [
      ...ofSetup,
      ...picks.map(({ label, pick }) =>
        select(label, () => acts.selectMany(pick(loops, selection)), { off: nothing }),
      ),
      select('all', () => acts.selectMany(allEdges(loops)), { key: 'Ctrl+A' }),
      select('none', () => acts.select(null, 'replace'), { key: 'Escape', off: nothing }),
      select('next edge', () => acts.step(1), { key: ']' }),
      select('previous edge', () => acts.step(-1), { key: '[' }),
      ...places.map(([name, key]): Command => {
        return { id: `go-${key}`, group: 'go to', name, key, run: () => land(landingIds[key] ?? '') }
      }),
      ...VIEW_ACTS.map((act): Command => {
        return {
          id: `view-${act.name.replaceAll(' ', '-')}`,
          group: 'view',
          name: act.name,
          key: act.key,
          off: act.needsSelection ? nothing : null,
          run: () => view.current && act.run(view.current),
        }
      }),
      ...allEdges(loops).map((edge): Command => {
        const name = edgeName(edge)
        return { id: `edge-${name}`, group: 'edge', name, run: () => acts.select(edge, 'replace') }
      }),
    ]
  }, [ofSetup, view, acts, loops, selection])
}
