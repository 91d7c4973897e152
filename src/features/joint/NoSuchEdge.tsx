import { parseEdgeKey } from '../../../shared/walls/names.ts'
import type { VertexLoop } from '../../../shared/geometry/types.ts'
import { Notice } from '../../ui/Notice.tsx'

/** Says why the address names no edge of this part. */
export function NoSuchEdge({ edgeKey, loops }: { edgeKey: string; loops: readonly VertexLoop[] }) {
  const ref = parseEdgeKey(edgeKey)
  const reason =
    ref === null
      ? `“${edgeKey}” is not the name of an edge: it is written loop-edge, such as 0-3.`
      : loops[ref.loop] === undefined
        ? `This part has ${loops.length} ${loops.length === 1 ? 'loop' : 'loops'}; there is no loop ${ref.loop}.`
        : `Loop ${ref.loop} has ${loops[ref.loop]!.length} edges, 0 to ${loops[ref.loop]!.length - 1}; there is no edge ${ref.edge}.`
  return (
    <Notice tone="breach" title="No such edge">
      {reason} The drawing may have changed since the link was made. Choose the edge from the list.
    </Notice>
  )
}
