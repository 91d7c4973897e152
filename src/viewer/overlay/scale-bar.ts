/** Longest scale bar, px. */
export const LONGEST_BAR = 130

/** The longest 1–2–5 number of units whose bar is no longer than the limit. */
export function barLength(
  pixelsPerMm: number,
  unit: number,
  longest = LONGEST_BAR,
): { value: number; pixels: number } {
  const most = longest / (pixelsPerMm * unit)
  const decade = 10 ** Math.floor(Math.log10(most))
  const step = [5, 2, 1].find((factor) => factor * decade <= most) ?? 1
  // Powers of ten below one are not exact in binary; the text must not show it.
  const value = Number((step * decade).toPrecision(1))
  return { value, pixels: value * unit * pixelsPerMm }
}
