import { TILT_SCALE_END, tiltRgb, type Theme } from '../theme/tilt-colour.ts'

/** Colour as 0–255 components. */
export type Rgb = readonly [number, number, number]

const TOKENS = ['sheet', 'panel', 'face', 'ink', 'muted', 'rule', 'select', 'breach'] as const

/** The theme's tokens as numbers, and the tilt scale. */
export type Palette = Readonly<Record<(typeof TOKENS)[number], Rgb>> & {
  readonly theme: Theme
  readonly tilt: (degrees: number) => Rgb
}

/** Reads the tokens as they apply to an element that bears `data-theme`. */
export function readPalette(element: Element, theme: Theme): Palette {
  const style = getComputedStyle(element)
  const entries = TOKENS.map((name) => [name, parseHex(style.getPropertyValue(`--${name}`))] as const)
  const colours = Object.fromEntries(entries) as Record<(typeof TOKENS)[number], Rgb>
  return { ...colours, theme, tilt: (degrees) => tiltRgb(clampTilt(degrees), theme) }
}

/** `#rrggbb` to components; mid-grey for anything else, so that a missing token is seen but not fatal. */
export function parseHex(text: string): Rgb {
  const match = /^#([0-9a-f]{2})([0-9a-f]{2})([0-9a-f]{2})$/i.exec(text.trim())
  if (!match) return [128, 128, 128]
  return [parseInt(match[1]!, 16), parseInt(match[2]!, 16), parseInt(match[3]!, 16)]
}

export function mix(a: Rgb, b: Rgb, share: number): Rgb {
  return [0, 1, 2].map((i) => Math.round(a[i]! + (b[i]! - a[i]!) * share)) as unknown as Rgb
}

/** A tilt that is not a number (an edge that is just being typed) is drawn as square. */
function clampTilt(degrees: number): number {
  if (!Number.isFinite(degrees)) return 0
  return Math.min(TILT_SCALE_END, Math.max(-TILT_SCALE_END, degrees))
}
