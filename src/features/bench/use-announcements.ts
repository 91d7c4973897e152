import { useEffect, useRef } from 'react'
import { edgeName } from '../../../shared/walls/names.ts'
import type { EdgeRef } from '../../../shared/walls/types.ts'
import { announce } from '../../ui/announce.ts'
import type { MarginNote } from './model/notes.ts'
import { facetsOf } from './model/walls.ts'
import { useBench, useBenchApi } from './model/store.ts'
import { wallWords } from './model/words.ts'
import { useScene } from './scene.ts'

/** Rest before speaking, ms, so that keys held down do not pile sentences up. */
const REST_MS = 300

/** Says what changed elsewhere on the sheet: the selection, and how many findings are open. */
export function useAnnouncements(): void {
  const selection = useBench((state) => state.selection)
  const api = useBenchApi()
  const { notes, unit, result } = useScene()
  const findings = findingWords(notes)
  const first = useRef(true)

  useEffect(() => {
    if (first.current) return
    const timer = setTimeout(() => {
      const { history } = api.getState()
      announce(selectionWords(selection, (edge) => wallWords(facetsOf(history.present, edge), unit)))
    }, REST_MS)
    return () => clearTimeout(timer)
  }, [selection, unit, api])

  useEffect(() => {
    if (first.current) return
    const timer = setTimeout(() => announce(findings), REST_MS)
    return () => clearTimeout(timer)
  }, [findings])

  const ready = result.evaluation !== null
  useEffect(() => {
    if (ready) first.current = false
  }, [ready])
}

export function selectionWords(selection: readonly EdgeRef[], words: (edge: EdgeRef) => string): string {
  const [edge] = selection
  if (edge === undefined) return 'No edge selected'
  if (selection.length === 1) return `${edgeName(edge)}, ${words(edge)}`
  return `${selection.length} edges selected`
}

export function findingWords(notes: readonly MarginNote[]): string {
  if (notes.length === 0) return 'No findings'
  const stops = notes.filter(({ severity }) => severity === 'stop').length
  const count = `${notes.length} ${notes.length === 1 ? 'note' : 'notes'} open`
  return stops === 0 ? count : `${count}, ${stops} of them ${stops === 1 ? 'stops' : 'stop'} the cut`
}
