import type { ViewState } from './view-state.ts'

/**
 * A view as a short text for a link: azimuth and elevation in degrees, then target x, y, z and span in mm,
 * joined by `_`, which needs no escaping in a URL. A hundredth of a degree or of a millimetre is kept.
 */
const DECIMALS = 2
const DEGREE = Math.PI / 180

/** Bound on a coordinate or a span that a link may carry, mm: a kilometre. */
const FARTHEST = 1e6

export function encodeView(view: ViewState): string {
  return [view.azimuth / DEGREE, view.elevation / DEGREE, ...view.target, view.span].map(short).join('_')
}

/** null for anything that `encodeView` could not have written. */
export function decodeView(code: string): ViewState | null {
  const parts = code.split('_')
  if (parts.length !== 6 || !parts.every((part) => /^-?\d{1,7}(\.\d{1,2})?$/.test(part))) return null
  const [azimuth, elevation, x, y, z, span] = parts.map(Number) as [
    number,
    number,
    number,
    number,
    number,
    number,
  ]
  if (Math.abs(azimuth) > 180 || Math.abs(elevation) > 90 || span <= 0) return null
  if ([x, y, z, span].some((value) => Math.abs(value) > FARTHEST)) return null
  return { azimuth: azimuth * DEGREE, elevation: elevation * DEGREE, target: [x, y, z], span }
}

function short(value: number): string {
  const text = String(Number(value.toFixed(DECIMALS)))
  return text === '-0' ? '0' : text
}
