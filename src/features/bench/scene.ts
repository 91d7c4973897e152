import { createContext, useContext, type RefObject } from 'react'
import type { Head } from '../../../shared/api/heads.ts'
import type { Setup } from '../../../shared/api/setups.ts'
import type { EvaluatedCorner, EvaluatedEdge } from '../../../shared/evaluate/schema.ts'
import type { HeadSnapshot, SetupContent } from '../../../shared/setup/schema.ts'
import type { DisplayUnit } from '../../../shared/units/length.ts'
import type { EvaluationState } from '../../evaluation/index.ts'
import type { Theme } from '../../theme/tilt-colour.ts'
import type { ViewContext } from '../../viewer/index.ts'
import type { MarginNote } from './model/notes.ts'

/** What every part of the bench shows, beside the content and the selection that the store holds. */
export interface Scene {
  readonly setup: Setup
  /** The newest revision's set-up when an older one is shown; null on the newest. */
  readonly newest: Setup | null
  readonly stored: SetupContent
  readonly heads: readonly Head[]
  readonly head: HeadSnapshot
  readonly readOnly: boolean
  readonly unit: DisplayUnit
  readonly theme: Theme
  readonly result: EvaluationState
  /** Evaluated edges and corners by key; empty until the first answer. */
  readonly edges: ReadonlyMap<string, EvaluatedEdge>
  readonly corners: ReadonlyMap<string, EvaluatedCorner>
  /** Keys of edges and names of corners that pass a limit, as the findings have it. */
  readonly breaches: ReadonlySet<string>
  readonly notes: readonly MarginNote[]
  readonly chosenNote: number | null
  readonly chooseNote: (number: number | null) => void
  /** The camera of the part in 3D; null until it is there. */
  readonly viewContextRef: RefObject<ViewContext | null>
  readonly keepViewContext: (context: ViewContext) => void
}

export const SceneContext = createContext<Scene | null>(null)

export function useScene(): Scene {
  const scene = useContext(SceneContext)
  if (scene === null) throw new Error('outside a bench')
  return scene
}

/** The lowest limit that counts for this head. */
export function limitOf({ workingLimit, mechanicalLimit }: HeadSnapshot): number {
  return Math.min(workingLimit ?? mechanicalLimit, mechanicalLimit)
}
