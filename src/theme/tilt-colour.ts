/**
 * The one signed colour scale for tilt: blue where the wall undercuts, ochre where it opens downward, the
 * plate's own tone at zero. Blue against ochre stays apart for the common kinds of colour blindness.
 */
export type Theme = 'paper' | 'tank'

type Rgb = readonly [number, number, number]

const anchors: Record<Theme, { inward: Rgb; zero: Rgb; outward: Rgb }> = {
  paper: { inward: [47, 95, 147], zero: [226, 222, 207], outward: [184, 102, 27] },
  tank: { inward: [106, 165, 232], zero: [44, 58, 66], outward: [236, 160, 90] },
}

/** Tilt at which the scale saturates, degrees. */
export const TILT_SCALE_END = 60

/** Colour of a tilt in degrees (positive outward) as 0–255 components. */
export function tiltRgb(tilt: number, theme: Theme): Rgb {
  const { inward, zero, outward } = anchors[theme]
  const share = Math.min(1, Math.abs(tilt) / TILT_SCALE_END)
  const weight = share === 0 ? 0 : 0.25 + 0.75 * share
  const end = tilt < 0 ? inward : outward
  return [0, 1, 2].map((i) => Math.round(zero[i]! + (end[i]! - zero[i]!) * weight)) as unknown as Rgb
}

export function tiltColour(tilt: number, theme: Theme): string {
  const [r, g, b] = tiltRgb(tilt, theme)
  return `rgb(${r} ${g} ${b})`
}
