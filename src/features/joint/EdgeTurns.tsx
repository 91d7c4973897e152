import { ButtonLink } from '../../ui/Button.tsx'
import { neighbours, type JointEdge } from './joint-model.ts'

interface EdgeTurnsProps {
  readonly edges: readonly JointEdge[]
  readonly edge: JointEdge
  readonly place: (edge: JointEdge) => string
}

/** To the edge before and after, for gloves. */
export function EdgeTurns({ edges, edge, place }: EdgeTurnsProps) {
  const { previous, next } = neighbours(edges, edge)
  if (!previous || !next) return null
  return (
    <nav aria-label="Edges with a prep" className="grid grid-cols-2 gap-2">
      <ButtonLink to={place(previous)} size="act" rel="prev">
        ← {previous.name}
        <span className="sr-only"> (edge before)</span>
      </ButtonLink>
      <ButtonLink to={place(next)} size="act" look="main" rel="next">
        {next.name} →<span className="sr-only"> (next edge)</span>
      </ButtonLink>
    </nav>
  )
}
