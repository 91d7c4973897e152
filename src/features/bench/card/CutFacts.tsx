import type { EdgeRef } from '../../../../shared/body/types.ts'
import { edgeKey } from '../../../../shared/body/names.ts'
import { anglesThreeWays } from '../../../../shared/joint/angles.ts'
import { formatAngle, formatLength } from '../../../../shared/units/format.ts'
import { Facts, type Fact } from '../../../ui/Facts.tsx'
import { useContent } from '../model/store.ts'
import { facetsOf, jointOf, shared } from '../model/walls.ts'
import { tiltWords } from '../model/words.ts'
import { limitOf, useScene } from '../scene.ts'

interface CutFactsProps {
  readonly lead: EdgeRef
  readonly selection: readonly EdgeRef[]
}

/** What follows from the prep: the angle three ways, where the bottom edge lands, what the jet does. */
export function CutFacts({ lead, selection }: CutFactsProps) {
  return (
    <>
      <AnglesThreeWays lead={lead} />
      <Facts facts={useCutFacts(selection)} />
    </>
  )
}

function AnglesThreeWays({ lead }: { lead: EdgeRef }) {
  const content = useContent()
  const facets = facetsOf(content, lead)
  const square = jointOf(content, lead)?.mate === 'square'
  if (facets.every(({ tilt }) => tilt === 0)) return null
  return (
    <table className="w-full text-left">
      <caption className="text-left text-small text-muted pb-1">The same tilt, three ways</caption>
      <thead className="text-small text-muted">
        <tr className="border-b border-rule align-bottom">
          <th className="font-normal pr-2">from vertical</th>
          <th className="font-normal pr-2">from the plate face</th>
          <th className="font-normal">groove, {square ? 'square mate' : 'with its twin'}</th>
        </tr>
      </thead>
      <tbody>
        {facets.map(({ tilt }, i) => {
          const { fromPlateFace, grooveAngle } = anglesThreeWays(tilt, square ? 0 : tilt)
          return (
            <tr key={i} className="border-b border-rule align-top">
              <td className="py-1 pr-2">{tilt === 0 ? '0° root face' : tiltWords(tilt)}</td>
              <td className="py-1 pr-2">{formatAngle(fromPlateFace)}</td>
              <td className="py-1">{tilt === 0 ? '–' : formatAngle(grooveAngle)}</td>
            </tr>
          )
        })}
      </tbody>
    </table>
  )
}

function useCutFacts(selection: readonly EdgeRef[]): Fact[] {
  const { edges, unit, head, result, breaches } = useScene()
  const known = selection.flatMap((edge) => edges.get(edgeKey(edge)) ?? [])
  if (known.length === 0) return []
  const said = (texts: readonly string[]) => {
    const one = shared(texts)
    return one.mixed ? 'mixed' : one.value
  }
  const tilts = known.map(({ jetTilts }) =>
    jetTilts.map((tilt) => formatAngle(tilt, { sign: true })).join(', '),
  )
  const most = Math.max(...known.map(({ wholeTilt }) => wholeTilt))
  const limit = limitOf(head)
  const over = selection.some((edge) => breaches.has(edgeKey(edge)))
  return [
    [
      'bottom edge outside the top edge',
      said(known.map(({ bottomOffset }) => formatLength(bottomOffset, unit, { sign: true }))),
    ],
    ['jet: wall less taper', said(tilts)],
    [
      'jet tilt needed / limit',
      <span key="needed" className={over ? 'text-breach' : ''}>
        {formatAngle(most)} / {formatAngle(limit)}
        {over ? ', over the limit' : ''}
      </span>,
    ],
    ['path in the metal', said(known.map(({ metalPath }) => formatLength(metalPath, unit)))],
    ['passes', `${said(known.map(({ jetTilts }) => String(jetTilts.length)))}${result.pending ? ' …' : ''}`],
  ]
}
