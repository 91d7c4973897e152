/** Degrees where a person or a file meets an angle, radians inside the geometry. */

const RADIANS_PER_DEGREE = Math.PI / 180

export function radians(degrees: number): number {
  return degrees * RADIANS_PER_DEGREE
}

export function degrees(radians: number): number {
  return radians / RADIANS_PER_DEGREE
}
