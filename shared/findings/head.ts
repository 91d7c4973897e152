import type { EdgeRef } from '../walls/types.ts'
import { edgeName } from '../walls/names.ts'
import { formatAngle } from '../units/format.ts'
import type { Finding } from './schema.ts'

/** An axis that would have to turn past the end of its travel. Degrees; `at` null between walls. */
export function axisOutOfTravel(
  axis: string,
  at: EdgeRef | null,
  value: number,
  limit: number,
  canUnwind: boolean,
): Finding {
  const where = at ? ` at ${edgeName(at)}` : ''
  return {
    code: 'axis-out-of-travel',
    severity: 'warning',
    ...(at ? { loop: at.loop, edge: at.edge } : {}),
    value,
    limit,
    message: `Axis ${axis} would turn to ${formatAngle(value, { decimals: 1 })}${where}; its travel ends at ${formatAngle(limit, { decimals: 1 })}.`,
    cure: {
      message: canUnwind
        ? 'Unwind it in the turn through the waste before that, or begin the pass elsewhere.'
        : 'Run out at a corner before that so that it can be unwound in the waste.',
    },
  }
}
