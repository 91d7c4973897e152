/** ISO 13920 general tolerances for angles of welded constructions. */

export const angleToleranceClasses = ['A', 'B', 'C', 'D'] as const
export type AngleToleranceClass = (typeof angleToleranceClasses)[number]

/** Minutes of arc, for a shorter leg up to 400 mm, up to 1000 mm, and above. */
const MINUTES: Record<AngleToleranceClass, readonly [number, number, number]> = {
  A: [20, 15, 10],
  B: [45, 30, 20],
  C: [60, 45, 30],
  D: [90, 75, 60],
}

/** Allowed deviation either way in degrees, for the shorter leg of the angle in mm. */
export function angleTolerance(grade: AngleToleranceClass, shorterLeg: number): number {
  const [short, middle, long] = MINUTES[grade]
  return (shorterLeg <= 400 ? short : shorterLeg <= 1_000 ? middle : long) / 60
}
