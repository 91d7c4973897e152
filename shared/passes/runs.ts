import type { Level } from './level.ts'

/** Neighbouring edges of a loop that have a level's facet: from edge `first` to edge `last`, with the walk. */
export interface Run {
  readonly loop: number
  readonly first: number
  readonly last: number
  /** All the way round: `last` is followed by `first`. */
  readonly closed: boolean
}

/** The longest runs of a loop, in the order of its edges. */
export function runsOf(level: Level, loop: number): Run[] {
  const { frame, member, previous, next, gone } = level
  const end = frame.loopStart[loop + 1]!
  if (level.whole && !level.gaps) {
    return end > frame.loopStart[loop]!
      ? [{ loop, first: end - 1, last: previous[end - 1]!, closed: true }]
      : []
  }
  const runs: Run[] = []
  let any = -1
  let first = -1
  for (let g = frame.loopStart[loop]!; g < end; g++) {
    if (gone[g] || !member[g]) continue
    any = g
    if (member[previous[g]!]) continue
    first = g
    let last = g
    while (member[next[last]!]) last = next[last]!
    runs.push({ loop, first, last, closed: false })
  }
  if (any >= 0 && first < 0) runs.push({ loop, first: any, last: previous[any]!, closed: true })
  return runs
}

/** Levels off the root that a body's walls have, the farthest from the root first, above before below. */
export function levelsOffRoot({
  firstFacet,
  root,
}: {
  readonly firstFacet: Int32Array
  readonly root: Int32Array
}): number[] {
  let above = 0
  let below = 0
  for (let row = 0; row < root.length; row++) {
    above = Math.max(above, root[row]!)
    below = Math.max(below, firstFacet[row + 1]! - firstFacet[row]! - 1 - root[row]!)
  }
  const levels: number[] = []
  for (let far = Math.max(above, below); far > 0; far--) {
    if (far <= above) levels.push(-far)
    if (far <= below) levels.push(far)
  }
  return levels
}
