import type { Role } from '../../../shared/api/common.ts'

/** A role and what it may do, in a line. */
export const roleWords: Record<Role, string> = {
  programmer: 'programmer: parts, set-ups, downloads',
  engineer: 'engineer: the same, approvals, working limits, record',
  welder: 'welder: reads set-ups and joints',
  administrator: 'administrator: people, heads, record',
}
