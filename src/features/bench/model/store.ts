import { createContext, useContext } from 'react'
import { useStore } from 'zustand'
import { createStore, type StoreApi } from 'zustand/vanilla'
import type { SaveSetup, Setup } from '../../../../shared/api/setups.ts'
import type { EdgeRef } from '../../../../shared/walls/types.ts'
import type { Loop } from '../../../../shared/geometry/types.ts'
import { stepEdge } from './edges.ts'
import * as bench from './state.ts'

/** The bench's state and what may be done to it; one store per opened set-up. */
export interface BenchStore extends bench.BenchState {
  readonly loops: readonly Loop[]
  readonly draft: DraftState
  readonly do: Acts
}

/** When the browser last kept what is on the bench; null while nothing is kept. */
export interface DraftState {
  readonly keptAt: number | null
  /** The browser had no room for it, or forbids it. */
  readonly failed: boolean
}

export interface Acts {
  edit(change: (content: SaveSetup) => SaveSetup, run?: string): void
  settle(): void
  undo(): void
  redo(): void
  select(edge: EdgeRef | null, how: bench.How): void
  selectMany(edges: readonly EdgeRef[]): void
  stand(edge: EdgeRef | null): void
  /** Selects the edge `step` places on from where the keyboard stands. */
  step(step: number, how?: bench.How): void
  understood(field: string, clear: boolean): void
  saved(setup: Setup, sent: SaveSetup): void
  takeTheirs(setup: Setup): void
  keepMine(setup: Setup): void
  /** The row moved on (submitted, say) without a change of content. */
  moved(setup: Setup): void
  continueDraft(content: SaveSetup, version: number): void
  drafted(draft: DraftState): void
}

export type BenchApi = StoreApi<BenchStore>

export function makeBenchStore(
  base: bench.Base,
  loops: readonly Loop[],
  selection: readonly EdgeRef[] = [],
): BenchApi {
  return createStore<BenchStore>()((set, get) => {
    const apply = (next: (state: BenchStore) => bench.BenchState) => set((state) => next(state))
    return {
      ...bench.selectMany(bench.startBench(base), selection),
      loops,
      draft: { keptAt: null, failed: false },
      do: {
        edit: (change, run) => apply((state) => bench.edit(state, change, run ?? null)),
        settle: () => apply(bench.settled),
        undo: () => apply(bench.undone),
        redo: () => apply(bench.redone),
        select: (edge, how) => apply((state) => bench.select(state, loops, edge, how)),
        selectMany: (edges) => apply((state) => bench.selectMany(state, edges)),
        stand: (edge) => apply((state) => bench.stand(state, edge)),
        step: (step, how = 'replace') => get().do.select(stepEdge(loops, get().active, step), how),
        understood: (field, clear) => apply((state) => bench.understood(state, field, clear)),
        saved: (setup, sent) => apply((state) => bench.saved(state, setup, sent)),
        takeTheirs: (setup) => apply((state) => bench.tookTheirs(state, setup)),
        keepMine: (setup) => apply((state) => bench.keptMine(state, setup)),
        moved: (setup) => apply((state) => ({ ...state, base: bench.baseOf(setup, state.base.content) })),
        continueDraft: (content, version) =>
          apply((state) => bench.continued(bench.settled(state), content, version)),
        drafted: (draft) => set({ draft }),
      },
    }
  })
}

export const BenchContext = createContext<BenchApi | null>(null)

export function useBenchApi(): BenchApi {
  const api = useContext(BenchContext)
  if (api === null) throw new Error('outside a bench')
  return api
}

export function useBench<T>(pick: (state: BenchStore) => T): T {
  return useStore(useBenchApi(), pick)
}

export const useContent = () => useBench((state) => state.history.present)
export const useActs = () => useBench((state) => state.do)
