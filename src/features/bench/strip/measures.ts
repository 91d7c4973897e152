/** Bands of the strip's drawing, px from its top. */
export const CHART = { top: 8, bottom: 104 }
export const WALLS = { top: 108, bottom: 170 }
export const NAMES = 183
export const HEIGHT = 188

/** Narrower cells are drawn together, px. */
export const LEAST_CELL = 2

/** From mm along the perimeter and degrees to px, and back. */
export interface StripScale {
  readonly width: number
  /** Width in sight. */
  readonly view: number
  /** Tilt at the top of the axis. */
  readonly top: number
  readonly x: (s: number) => number
  readonly y: (tilt: number) => number
  readonly mm: (px: number) => number
}
