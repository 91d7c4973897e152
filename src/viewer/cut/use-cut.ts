import { useLayoutEffect, useMemo } from 'react'
import type { Picker } from '../pick/picker.ts'
import type { MeshIndex } from '../scene/mesh-index.ts'
import type { PartScene } from '../scene/part-scene.ts'
import { sliceMesh, type CutPlane } from './slice.ts'

interface Cutting {
  readonly part: PartScene
  readonly picker: Picker
  readonly index: MeshIndex | null
  readonly plane: CutPlane | null
  /** Asks for a frame. */
  readonly invalidate: () => void
}

/** Cuts the drawn part open at a plane; answers the area of the cut surface, mm². */
export function useCut({ part, picker, index, plane, invalidate }: Cutting): number {
  const surface = useMemo(() => (index && plane ? sliceMesh(index.mesh, plane) : null), [index, plane])
  useLayoutEffect(() => {
    part.cut(plane && surface && { plane, surface })
    picker.setCut(plane)
    invalidate()
  }, [part, picker, plane, surface, invalidate])
  return surface?.area ?? 0
}
