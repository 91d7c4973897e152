import type { CornerRef, EdgeRef } from './types.ts'

/** How people see an edge: `e1` on the outer loop, `h2.e1` on the second hole. */
export function edgeName({ loop, edge }: EdgeRef): string {
  return `${loopPrefix(loop)}e${edge + 1}`
}

/** How people see a corner: `C1`, `h2.C1`; corner n is where edge n starts. */
export function cornerName({ loop, vertex }: CornerRef): string {
  return `${loopPrefix(loop)}C${vertex + 1}`
}

function loopPrefix(loop: number): string {
  return loop === 0 ? '' : `h${loop}.`
}

/** Key of an edge in URLs and maps: `0-3` is edge 3 of loop 0. */
export function edgeKey({ loop, edge }: EdgeRef): string {
  return `${loop}-${edge}`
}

export function parseEdgeKey(key: string): EdgeRef | null {
  const match = /^(\d{1,5})-(\d{1,6})$/.exec(key)
  return match ? { loop: Number(match[1]), edge: Number(match[2]) } : null
}
