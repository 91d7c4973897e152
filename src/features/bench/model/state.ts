import type { SaveSetup, Setup } from '../../../../shared/api/setups.ts'
import type { EdgeRef } from '../../../../shared/walls/types.ts'
import type { Loop } from '../../../../shared/geometry/types.ts'
import { rangeBetween, sameEdge, toggleEdge } from './edges.ts'
import { record, redo, settle, startHistory, undo, type History } from './history.ts'

/** What the bench knows about one set-up; every change is a pure function from one state to the next. */
export interface BenchState {
  readonly base: Base
  readonly history: History<SaveSetup>
  readonly selection: readonly EdgeRef[]
  /** The edge that the keyboard stands on; always shown, selected or not. */
  readonly active: EdgeRef | null
  /** Where a shift-range begins. */
  readonly anchor: EdgeRef | null
  /** Fields whose text is not understood; saving waits for them. */
  readonly unclear: ReadonlySet<string>
}

/** What the server holds, as far as this page knows: the next save goes on top of it. */
export interface Base {
  readonly version: number
  readonly revision: number
  /** Content that counts as saved. */
  readonly content: SaveSetup
}

export type How = 'replace' | 'toggle' | 'range'

/** The fields of a set-up that a person may change. */
export function editableOf(setup: NamedContent): SaveSetup {
  const { plate, jet, datum, walls, joints, note, head } = setup.revision.content
  return { name: setup.name, headId: head.id, plate, jet, datum, walls, joints, note }
}
type NamedContent = { readonly name: string; readonly revision: Pick<Setup['revision'], 'content'> }

export function baseOf(setup: Setup, content: SaveSetup = editableOf(setup)): Base {
  return { version: setup.version, revision: setup.revision.number, content }
}

export function startBench(base: Base): BenchState {
  return {
    base,
    history: startHistory(base.content),
    selection: [],
    active: null,
    anchor: null,
    unclear: new Set(),
  }
}

export function edit(
  state: BenchState,
  change: (content: SaveSetup) => SaveSetup,
  run: string | null = null,
): BenchState {
  const history = record(state.history, change(state.history.present), run)
  return history === state.history ? state : { ...state, history }
}

export const settled = (state: BenchState): BenchState => withHistory(state, settle(state.history))
export const undone = (state: BenchState): BenchState => withHistory(state, undo(state.history))
export const redone = (state: BenchState): BenchState => withHistory(state, redo(state.history))

function withHistory(state: BenchState, history: History<SaveSetup>): BenchState {
  return history === state.history ? state : { ...state, history }
}

/** After a save: what was sent counts as saved; the steps back stay, and so does what was typed meanwhile. */
export function saved(state: BenchState, setup: Setup, sent: SaveSetup): BenchState {
  return { ...settled(state), base: baseOf(setup, sent) }
}

/** The other side's content on the bench as one step, so that stepping back brings one's own again. */
export function tookTheirs(state: BenchState, setup: Setup): BenchState {
  const base = baseOf(setup)
  return { ...edit(settled(state), () => base.content), base, unclear: new Set() }
}

/** One's own content goes on top of theirs at the next save. */
export function keptMine(state: BenchState, setup: Setup): BenchState {
  return { ...state, base: baseOf(setup) }
}

/** A kept draft goes on: one step from what the server holds, saved against the version that it began on. */
export function continued(state: BenchState, content: SaveSetup, version: number): BenchState {
  return { ...edit(state, () => content), base: { ...state.base, version } }
}

export function select(
  state: BenchState,
  loops: readonly Loop[],
  edge: EdgeRef | null,
  how: How,
): BenchState {
  if (edge === null) return { ...state, selection: [], anchor: null }
  if (how === 'toggle') {
    return { ...state, selection: toggleEdge(state.selection, edge), active: edge, anchor: edge }
  }
  if (how === 'range') {
    const from = state.anchor ?? state.active ?? edge
    return { ...state, selection: rangeBetween(loops, from, edge), active: edge, anchor: from }
  }
  const only = state.selection[0]
  const same = state.selection.length === 1 && only !== undefined && sameEdge(only, edge)
  return same && state.active !== null && sameEdge(state.active, edge)
    ? state
    : { ...state, selection: [edge], active: edge, anchor: edge }
}

export function selectMany(state: BenchState, edges: readonly EdgeRef[]): BenchState {
  const [first = null] = edges
  const active = state.active && edges.some((edge) => sameEdge(edge, state.active!)) ? state.active : first
  return { ...state, selection: edges, active: active ?? state.active, anchor: active }
}

/** Moves where the keyboard stands without touching the selection. */
export function stand(state: BenchState, edge: EdgeRef | null): BenchState {
  return { ...state, active: edge }
}

export function understood(state: BenchState, field: string, clear: boolean): BenchState {
  if (clear === !state.unclear.has(field)) return state
  const unclear = new Set(state.unclear)
  if (clear) unclear.delete(field)
  else unclear.add(field)
  return { ...state, unclear }
}
