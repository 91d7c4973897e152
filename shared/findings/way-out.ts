import type { EdgeRef } from '../walls/types.ts'
import { edgeName } from '../walls/names.ts'
import type { Finding } from './schema.ts'

/**
 * A piece that no single straight move frees. `holds`: the walls that hold it against going up or down; loop 0 is
 * the part itself, others the slug of that hole.
 */
export function pieceTrapped(loop: number, holds: readonly EdgeRef[]): Finding {
  const piece = loop === 0 ? 'The part' : `The slug of hole h${loop}`
  const names = [...new Set(holds.map(edgeName))]
  const list = names.length > 1 ? `${names.slice(0, -1).join(', ')} and ${names.at(-1)}` : names.join('')
  return {
    code: loop === 0 ? 'part-trapped' : 'slug-trapped',
    severity: 'warning',
    loop,
    message: `${piece} is trapped in ${loop === 0 ? 'its sheet' : 'the part'}: it leaves neither upward nor downward. ${list} hold it.`,
    cure: {
      message:
        loop === 0
          ? 'Plan relief cuts through the waste round it, or bevel one side in a second set-up.'
          : 'Plan relief cuts through the slug.',
    },
  }
}
