/** CSS px per mm at actual size: CSS defines an inch as 96 px. */
export const PX_PER_MM = 96 / 25.4

export interface StandardScale {
  /** Drawn length by real length. */
  readonly ratio: number
  /** `2 : 1` */
  readonly text: string
}

/** Recommended scales of ISO 5455 (from memory), the largest first. */
export const standardScales: readonly StandardScale[] = [
  ...[50, 20, 10, 5, 2, 1].map((drawn) => ({ ratio: drawn, text: `${drawn} : 1` })),
  ...[2, 5, 10, 20, 50, 100, 200].map((real) => ({ ratio: 1 / real, text: `1 : ${real}` })),
]

/** The largest standard scale that is not over the ratio that fits. */
export function standardScaleWithin(ratio: number): StandardScale | undefined {
  return standardScales.find((scale) => scale.ratio <= ratio)
}
