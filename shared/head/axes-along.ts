import { MoveKind, type JetPath, type Pass } from '../passes/types.ts'
import { secondTiltOf } from './kinematics.ts'
import { tiltProblems, travelProblems } from './problems.ts'
import { planTurningHead, type AxisColumns } from './turning-head.ts'
import { DIRECTION_TOLERANCE, HOLD_SHARE, type HeadAxes, type HeadSpec } from './types.ts'

/**
 * The head's angles at every station of every pass, and where they pass a limit: the cheap look, linear in stations.
 * Each pass begins as unwound as its own way needs; C may be rewound freely between passes. `direction`: greatest angle
 * between nozzle and wanted jet, radians, above 0; half of it may be spent on holding C near vertical.
 */
export function axesAlong(
  path: JetPath,
  passes: readonly Pass[],
  head: HeadSpec,
  direction: number = DIRECTION_TOLERANCE,
): HeadAxes {
  const { count } = path
  const columns: AxisColumns = {
    outer: new Float64Array(count),
    inner: new Float64Array(count),
    dwell: new Float64Array(count),
    crossing: new Float64Array(count),
    held: new Uint8Array(count),
  }
  if (head.kind === 'C-A') planTurningHead(path, passes, head, Math.sin(HOLD_SHARE * direction), columns)
  else planCrossedTilts(path, columns)
  const problems = [...tiltProblems(path, passes, head), ...travelProblems(path, passes, head, columns)]
  return { kind: head.kind, ...columns, problems }
}

/** A and B are exact everywhere and turn gently: their pole lies at B = ±90°, where no jet can be. */
function planCrossedTilts({ count, p, q, move }: JetPath, { outer, inner }: AxisColumns) {
  for (let i = 0; i < count; i++) {
    if (i > 0 && p[i] === p[i - 1] && q[i] === q[i - 1] && move[i - 1] !== MoveKind.end) {
      outer[i] = outer[i - 1]!
      inner[i] = inner[i - 1]!
      continue
    }
    outer[i] = Math.atan(q[i]!)
    inner[i] = secondTiltOf(p[i]!, q[i]!)
  }
}
