import type { Point } from '../geometry/types.ts'
import { CornerMode, type Frame } from '../contours/frame.ts'
import type { LevelRuns, MeshLevel } from './mesh-levels.ts'
import type { MeshLine } from './types.ts'

/** Polylines of the mesh: both rims, the lines where a wall changes tilt, and the seams (two at a step, none between smooth like walls). */
export function meshLines(
  frame: Frame,
  levels: readonly MeshLevel[],
  runs: readonly LevelRuns[],
): MeshLine[] {
  const lines: MeshLine[] = []
  const last = levels.length - 1
  for (let g = 0; g < frame.count; g++) {
    const loop = frame.loopOf[g]!
    const edge = frame.edgeOf[g]!
    const wall = frame.table.walls[frame.table.rowOfEdge[g]!]!
    for (const [i, level] of levels.entries()) {
      const kind = i === 0 ? 'top' : i === last ? 'bottom' : 'level'
      if (kind === 'level' && !(level.given && wall.facets.some((f) => f.depth === level.depth))) continue
      const points = flat(runs[i]![g]!.map((point) => [point, level.depth]))
      lines.push({ kind, loop, edge, vertex: null, points })
    }
  }
  for (let g = 0; g < frame.count; g++) {
    if (frame.mode[g] === CornerMode.smooth) continue
    const loop = frame.loopOf[g]!
    const vertex = frame.edgeOf[g]!
    const seam = (pick: (i: number) => Point): MeshLine => ({
      kind: 'seam',
      loop,
      edge: null,
      vertex,
      points: flat(levels.map((level, i) => [pick(i), level.depth])),
    })
    lines.push(seam((i) => runs[i]![g]![0]!))
    if (frame.mode[g] === CornerMode.step) lines.push(seam((i) => runs[i]![frame.previous[g]!]!.at(-1)!))
  }
  return lines
}

function flat(places: readonly (readonly [Point, number])[]): Float64Array {
  return Float64Array.from(places.flatMap(([{ x, y }, depth]) => [x, y, 0 - depth]))
}
