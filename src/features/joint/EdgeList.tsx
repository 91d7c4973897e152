import { Link } from 'react-router-dom'
import { describeWall } from '../../../shared/setup/describe.ts'
import type { DisplayUnit } from '../../../shared/units/length.ts'
import { Section } from '../../app/Page.tsx'
import type { JointEdge } from './joint-model.ts'

interface EdgeListProps {
  readonly edges: readonly JointEdge[]
  readonly current: JointEdge | null
  readonly place: (edge: JointEdge) => string
  readonly unit: DisplayUnit
}

/** Every edge with a prep or a joint. */
export function EdgeList({ edges, current, place, unit }: EdgeListProps) {
  return (
    <Section title="Edges with a prep" aside={`${edges.length}`}>
      {edges.length === 0 ? (
        <p>No edge of this part is bevelled or has a joint.</p>
      ) : (
        <ul className="flex flex-col">
          {edges.map((edge) => {
            const here = edge.name === current?.name
            return (
              <li key={edge.name} className="border-b border-rule">
                <Link
                  to={place(edge)}
                  aria-current={here ? 'page' : undefined}
                  className={`grid grid-cols-[3.5rem_minmax(0,1fr)_auto] items-center gap-x-3 min-h-glove px-2 py-1.5 text-large hover:bg-face ${here ? 'border-l-4 border-select text-select font-bold' : ''}`}
                >
                  <span>{edge.name}</span>
                  <span className="text-base">{describeWall(edge.facets, unit)}</span>
                  <span className="text-base text-muted">{edge.joint?.label ?? 'no joint'}</span>
                </Link>
              </li>
            )
          })}
        </ul>
      )}
    </Section>
  )
}
