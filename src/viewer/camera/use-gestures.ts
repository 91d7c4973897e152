import { useEffect, type RefObject } from 'react'
import type { ViewControl } from './view-control.ts'

/** Radians of turn per pixel of drag: half a turn over 450 px. */
const TURN_PER_PIXEL = Math.PI / 450
/** Zoom per pixel of wheel, as an exponent; a notch of 100 is a quarter closer. */
const ZOOM_PER_PIXEL = 0.0022
/** A trackpad's pinch sends small steps with ctrl. */
const PINCH_PER_PIXEL = 0.012
/** Pixels in a line and a page, for wheels that count in them. */
const WHEEL_UNITS = [1, 16, 400]
/** How far a press may wander and still be a click, px. */
const STILL = { mouse: 4, touch: 9 }

export interface GestureHandlers {
  /** A click or tap at a pixel of the element. */
  readonly onTap: (x: number, y: number, toggle: boolean, coarse: boolean) => void
  /** The pointer hovers there, or null when it left or a movement began. At most once a frame. */
  readonly onHover: (at: { x: number; y: number } | null) => void
}

interface Press {
  x: number
  y: number
  readonly startX: number
  readonly startY: number
}

/**
 * Turning, moving and zooming with the pointer: drag turns; right drag, shift and drag, or two fingers
 * move; wheel and pinch zoom where the pointer is.
 */
export function useGestures(
  target: RefObject<HTMLElement | null>,
  control: ViewControl,
  handlers: GestureHandlers,
  options: { readonly wheelNeedsFocus: boolean },
): void {
  const { onTap, onHover } = handlers
  const { wheelNeedsFocus } = options
  useEffect(() => {
    const element = target.current
    if (!element) return
    const presses = new Map<number, Press>()
    let moved = false
    let moving = false
    let hoverFrame = 0

    const at = (event: MouseEvent) => {
      const box = element.getBoundingClientRect()
      return { x: event.clientX - box.left, y: event.clientY - box.top }
    }

    const down = (event: PointerEvent) => {
      if (event.target instanceof Element && event.target.closest('button')) return
      if (event.pointerType === 'mouse' && event.button === 1) event.preventDefault()
      const { x, y } = at(event)
      if (presses.size === 0) {
        moved = false
        moving = event.button === 2 || event.button === 1 || event.shiftKey
      }
      presses.set(event.pointerId, { x, y, startX: x, startY: y })
      element.setPointerCapture(event.pointerId)
    }

    const move = (event: PointerEvent) => {
      const press = presses.get(event.pointerId)
      const { x, y } = at(event)
      if (!press) {
        if (event.pointerType !== 'touch' && event.buttons === 0) hoverSoon({ x, y })
        return
      }
      const dx = x - press.x
      const dy = y - press.y
      if (presses.size === 1) {
        const still = event.pointerType === 'touch' ? STILL.touch : STILL.mouse
        if (!moved && Math.hypot(x - press.startX, y - press.startY) < still) return
        begin()
        if (moving) control.pan(dx, dy)
        else control.orbit(-dx * TURN_PER_PIXEL, dy * TURN_PER_PIXEL)
      } else if (presses.size === 2) {
        begin()
        const other = [...presses.values()].find((candidate) => candidate !== press)!
        const before = Math.hypot(press.x - other.x, press.y - other.y)
        const after = Math.hypot(x - other.x, y - other.y)
        control.pan(dx / 2, dy / 2)
        if (before > 0 && after > 0) control.zoom(after / before, (x + other.x) / 2, (y + other.y) / 2)
      }
      press.x = x
      press.y = y
    }

    const up = (event: PointerEvent) => {
      const press = presses.get(event.pointerId)
      if (!press) return
      presses.delete(event.pointerId)
      const tapped = event.type === 'pointerup' && !moved && presses.size === 0 && event.button === 0
      if (tapped) {
        onTap(
          press.x,
          press.y,
          event.shiftKey || event.ctrlKey || event.metaKey,
          event.pointerType === 'touch',
        )
      }
    }

    const begin = () => {
      if (!moved) hoverSoon(null)
      moved = true
    }

    const hoverSoon = (place: { x: number; y: number } | null) => {
      cancelAnimationFrame(hoverFrame)
      hoverFrame = requestAnimationFrame(() => onHover(place))
    }

    const leave = () => hoverSoon(null)

    const wheel = (event: WheelEvent) => {
      if (wheelNeedsFocus && !event.ctrlKey && !element.contains(document.activeElement)) return
      event.preventDefault()
      const { x, y } = at(event)
      const pixels = event.deltaY * (WHEEL_UNITS[event.deltaMode] ?? 1)
      control.zoom(Math.exp(-pixels * (event.ctrlKey ? PINCH_PER_PIXEL : ZOOM_PER_PIXEL)), x, y)
    }

    const menu = (event: Event) => event.preventDefault()

    element.addEventListener('pointerdown', down)
    element.addEventListener('pointermove', move)
    element.addEventListener('pointerup', up)
    element.addEventListener('pointercancel', up)
    element.addEventListener('pointerleave', leave)
    element.addEventListener('wheel', wheel, { passive: false })
    element.addEventListener('contextmenu', menu)
    return () => {
      cancelAnimationFrame(hoverFrame)
      element.removeEventListener('pointerdown', down)
      element.removeEventListener('pointermove', move)
      element.removeEventListener('pointerup', up)
      element.removeEventListener('pointercancel', up)
      element.removeEventListener('pointerleave', leave)
      element.removeEventListener('wheel', wheel)
      element.removeEventListener('contextmenu', menu)
    }
  }, [target, control, onTap, onHover, wheelNeedsFocus])
}
