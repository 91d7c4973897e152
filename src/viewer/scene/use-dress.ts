import { useLayoutEffect, type RefObject } from 'react'
import { readPalette } from '../palette.ts'
import type { Picker } from '../pick/picker.ts'
import type { PartViewerProps } from '../types.ts'
import type { MeshIndex } from './mesh-index.ts'
import type { PartScene } from './part-scene.ts'

/** A mesh that ends this much above the bottom was cut short at its first event, mm. */
const CUT_SHORT = 1e-6

interface Dressing extends Pick<
  PartViewerProps,
  'tiltOf' | 'selection' | 'breaches' | 'theme' | 'thickness'
> {
  readonly part: PartScene
  readonly index: MeshIndex | null
  readonly picker: Picker
  /** The element that bears the theme. */
  readonly wrapper: RefObject<HTMLElement | null>
  /** Asks for a frame. */
  readonly invalidate: () => void
}

/**
 * Passes what React knows to the objects of the scene, in the same commit as the texts over the picture: done
 * inside the canvas, whose tree commits later, every change would draw twice.
 */
export function useDress({
  part,
  index,
  picker,
  wrapper,
  tiltOf,
  selection,
  breaches,
  theme,
  thickness,
  invalidate,
}: Dressing): void {
  useLayoutEffect(() => {
    if (!index) return
    if (part.index !== index) {
      part.shape(index)
      picker.setIndex(index)
    }
    const palette = readPalette(wrapper.current!, theme)
    const cutShort = index.mesh.depth < thickness - CUT_SHORT
    part.dress({ palette, tiltOf, selection, breaches, cutShort })
    invalidate()
  }, [index, part, picker, wrapper, theme, thickness, tiltOf, selection, breaches, invalidate])
}
