import type { ReactNode } from 'react'
import { edgeName } from '../../../../shared/walls/names.ts'
import type { EdgeRef } from '../../../../shared/walls/types.ts'
import { Button } from '../../../ui/Button.tsx'
import { sameEdge } from '../model/edges.ts'
import { useActs, useBench, useContent } from '../model/store.ts'
import { facetsOf, sameFacets } from '../model/walls.ts'
import { tiltsText } from '../model/words.ts'
import { CutFacts } from './CutFacts.tsx'
import { FormFields } from './FormFields.tsx'
import { JointFields } from './JointFields.tsx'
import { SectionEditor } from './SectionEditor.tsx'

/** The prep of the selected edges as a dimensioned section whose numbers are the inputs. */
export function EdgeCard() {
  const content = useContent()
  const selection = useBench((state) => state.selection)
  const active = useBench((state) => state.active)
  const lead = selection.find((edge) => active !== null && sameEdge(edge, active)) ?? selection[0]
  if (lead === undefined) return <NoEdge />

  const kinds = new Map<number, EdgeRef[]>()
  for (const edge of selection) {
    const count = facetsOf(content, edge).length
    kinds.set(count, [...(kinds.get(count) ?? []), edge])
  }
  return (
    <div className="flex flex-col gap-2">
      {kinds.size > 1 ? (
        <Unlike kinds={[...kinds.values()]} />
      ) : (
        <SectionEditor key={`${lead.loop}-${lead.edge}`} lead={lead} selection={selection} />
      )}
      <CutFacts selection={selection} />
      <FormFields lead={lead} selection={selection} />
      <JointFields lead={lead} selection={selection} />
    </div>
  )
}

/** The card's heading: which edges it speaks of, and the prep or the names. */
export function useCardHead(): { title: ReactNode; aside: string } {
  const content = useContent()
  const selection = useBench((state) => state.selection)
  const [edge] = selection
  if (edge === undefined) return { title: 'Edge card', aside: '' }
  if (selection.length > 1) return { title: `${selection.length} edges`, aside: namesOf(selection) }
  const facets = facetsOf(content, edge)
  const users = content.walls.filter((wall) => sameFacets(wall.facets, facets)).length
  return {
    title: (
      <>
        Edge <span className="normal-case font-bold text-ink">{edgeName(edge)}</span>
      </>
    ),
    aside: users > 1 ? `same prep on ${users} edges` : tiltsText(facets),
  }
}

const MOST_NAMES = 6

function namesOf(edges: readonly EdgeRef[]): string {
  const names = edges.slice(0, MOST_NAMES).map(edgeName).join(', ')
  return edges.length > MOST_NAMES ? `${names} …` : names
}

function NoEdge() {
  const acts = useActs()
  return (
    <div className="flex flex-col gap-2 items-start">
      <p className="text-muted">
        No edge is selected. Choose one in the picture, in the wall strip or in the edge table.
      </p>
      <Button onClick={() => acts.step(1)}>Select the first edge</Button>
    </div>
  )
}

/** Preps with unlike chains of facets have no common section: pick one kind, or give all one form below. */
function Unlike({ kinds }: { kinds: readonly (readonly EdgeRef[])[] }) {
  const content = useContent()
  const acts = useActs()
  return (
    <div className="flex flex-col gap-1 border-y border-rule py-2">
      <p>Mixed: these edges have preps of different forms.</p>
      <ul>
        {kinds.map((edges) => (
          <li key={edges[0]!.loop + '-' + edges[0]!.edge}>
            <Button look="quiet" onClick={() => acts.selectMany(edges)}>
              only the {edges.length} cut in {passWords(facetsOf(content, edges[0]!).length)}
            </Button>
          </li>
        ))}
      </ul>
    </div>
  )
}

function passWords(passes: number): string {
  return passes === 1 ? '1 pass' : `${passes} passes`
}
