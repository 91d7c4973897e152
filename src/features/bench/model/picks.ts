import type { Loop } from '../../../../shared/geometry/types.ts'
import type { EdgeRef } from '../../../../shared/walls/types.ts'
import { parallelTo, sameLength, sameLoop, smoothChain } from './edges.ts'

type Pick = (loops: readonly Loop[], seeds: readonly EdgeRef[]) => EdgeRef[]

/** Ways from the selected edges to all that are like them. */
export const picks: readonly { readonly label: string; readonly pick: Pick }[] = [
  { label: 'same loop', pick: sameLoop },
  { label: 'same length', pick: sameLength },
  { label: 'parallel', pick: parallelTo },
  { label: 'smooth chain', pick: smoothChain },
]
