import { useMemo } from 'react'
import { cornerName, edgeKey } from '../../../../shared/walls/names.ts'
import { segmentLength } from '../../../../shared/geometry/segment.ts'
import {
  breachesOf,
  cellsOf,
  tiltLine,
  type Breach,
  type StripCell,
  type StripEdge,
  type StripPoint,
} from '../model/strip.ts'
import { useBench, useContent } from '../model/store.ts'
import { useScene } from '../scene.ts'

export interface Strip {
  readonly loop: number
  readonly edges: readonly StripEdge[]
  readonly cells: readonly StripCell[]
  readonly line: readonly StripPoint[]
  readonly mechanical: number
  readonly working: number | null
  readonly breaches: readonly Breach[]
}

/** A rounding of the solver's is no breach: half of what the labels print, degrees. */
const NO_BREACH = 0.005

/** What the strip draws of one loop, from the evaluation. Nothing is drawn above it before the first answer. */
export function useStrip(loop: number): Strip {
  const { edges: evaluated, corners, head } = useScene()
  const { thickness } = useContent().plate
  const loops = useBench((state) => state.loops)
  return useMemo(() => {
    const edges = (loops[loop] ?? []).map((segment, edge): StripEdge => {
      const known = evaluated.get(edgeKey({ loop, edge }))
      const corner = corners.get(cornerName({ loop, vertex: edge }))
      return {
        edge,
        length: segmentLength(segment),
        tilt: known?.wholeTilt ?? 0,
        cornerTilt: corner?.jetTilt ?? null,
      }
    })
    // The climb to a corner is drawn about as long as the plate is thick; the corner moves will say it exactly.
    const line = evaluated.size === 0 ? [] : tiltLine(edges, thickness)
    const limit = Math.min(head.workingLimit ?? head.mechanicalLimit, head.mechanicalLimit)
    return {
      loop,
      edges,
      cells: cellsOf(edges),
      line,
      mechanical: head.mechanicalLimit,
      working: head.workingLimit,
      breaches: breachesOf(line, limit + NO_BREACH),
    }
  }, [loops, loop, evaluated, corners, head, thickness])
}
