import { useLayoutEffect, useState, type RefObject } from 'react'
import type { Insets } from '../types.ts'
import type { ViewControl } from './view-control.ts'
import { frameOf } from './view-state.ts'

/** Keeps the camera's frame in step with an element's size; answers its width, 0 until it is laid out. */
export function useSize(target: RefObject<HTMLElement | null>, insets: Insets, control: ViewControl): number {
  const [width, setWidth] = useState(0)
  const { top, right, bottom, left } = insets
  useLayoutEffect(() => {
    const element = target.current
    if (!element) return
    const measure = () => {
      const { clientWidth, clientHeight } = element
      if (clientWidth === 0 || clientHeight === 0) return
      control.setFrame(frameOf(clientWidth, clientHeight, { top, right, bottom, left }))
      setWidth(clientWidth)
    }
    measure()
    const observer = new ResizeObserver(measure)
    observer.observe(element)
    return () => observer.disconnect()
  }, [target, control, top, right, bottom, left])
  return width
}
