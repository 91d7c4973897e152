import type { Body, BodyMesh } from './types.ts'

/** Triangles of the body over its sound range; null when no depth is sound. `chordTolerance` in mm. */
export function meshOf(_body: Body, _chordTolerance: number): BodyMesh | null {
  return null
}
