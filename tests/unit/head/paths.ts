import type { JetPath, Pass } from '../../../shared/passes/types.ts'
import { MoveKind } from '../../../shared/passes/types.ts'
import { bend, finish, makeWriter, pathOf, put } from '../../../shared/passes/writer.ts'
import { headSpec, startingMotion, type HeadMotion } from '../../../shared/head/schema.ts'
import type { HeadKind, HeadSpec } from '../../../shared/head/types.ts'
import { DEGREE } from '../../support/plates.ts'

/** Small jet paths made by hand. A lean is told by the tilt and the heading into which the jet leans with depth, degrees. */

export interface Station {
  readonly x: number
  readonly y: number
  readonly tilt: number
  readonly heading?: number
  readonly move?: number
  readonly edge?: number
  /** Degrees and centre of a round move from here. */
  readonly sweep?: number
  readonly centre?: readonly [number, number]
}

export function pathFrom(...passes: readonly (readonly Station[])[]): { path: JetPath; passes: Pass[] } {
  const w = makeWriter(16)
  const told: Pass[] = []
  for (const stations of passes) {
    const first = w.at
    for (const {
      x,
      y,
      tilt,
      heading = 0,
      move = MoveKind.cut,
      edge = 0,
      sweep = 0,
      centre = [0, 0],
    } of stations) {
      const slope = Math.tan(tilt * DEGREE)
      // A slope of exactly none, and headings along the axes without rounding.
      const [c, s] = [cosine(heading), cosine(heading - 90)]
      put(w, x, y, slope * c, slope * s, move, edge, 0)
      if (sweep !== 0) bend(w, sweep * DEGREE, centre[0], centre[1])
    }
    finish(w)
    told.push({ loop: 0, first, last: w.at - 1, closed: false, level: 0, reasons: [] })
  }
  return { path: pathOf(w), passes: told }
}

function cosine(degrees: number): number {
  return degrees % 90 === 0 && degrees % 180 !== 0 ? 0 : Math.cos(degrees * DEGREE)
}

/** The starting head of a kind, with changes in degrees. */
export function headOf(kind: HeadKind, changes: Partial<HeadMotion> = {}): HeadSpec {
  return headSpec({ ...startingMotion[kind], ...changes })
}

export function inDegrees(column: Float64Array): number[] {
  return Array.from(column, (angle) => angle / DEGREE)
}
