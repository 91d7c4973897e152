/** CSS px per mm at actual size: CSS defines an inch as 96 px. */
export const PX_PER_MM = 96 / 25.4

/** Recommended scales of ISO 5455 (from memory): drawing : object. */
const STANDARD: readonly (readonly [number, number])[] = [
  [50, 1],
  [20, 1],
  [10, 1],
  [5, 1],
  [2, 1],
  [1, 1],
  [1, 2],
  [1, 5],
  [1, 10],
  [1, 20],
  [1, 50],
  [1, 100],
  [1, 200],
]

export const standardScales: readonly number[] = STANDARD.map(([drawn, real]) => (drawn / real) * PX_PER_MM)

/** `2 : 1` for a standard scale in px per mm; null for any other. */
export function scaleText(pxPerMm: number): string | null {
  const found = STANDARD.find(([drawn, real]) => (drawn / real) * PX_PER_MM === pxPerMm)
  return found ? `${found[0]} : ${found[1]}` : null
}
