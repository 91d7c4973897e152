import type { EdgeRef } from '../../../../shared/walls/types.ts'
import { edgeKey } from '../../../../shared/walls/names.ts'
import { anglesThreeWays } from '../../../../shared/joint/angles.ts'
import { formatAngle, formatLength } from '../../../../shared/units/format.ts'
import { Facts, type Fact } from '../../../ui/Facts.tsx'
import { useContent } from '../model/store.ts'
import { facetsOf, jointOf, shared } from '../model/walls.ts'
import { limitOf, useScene } from '../scene.ts'

interface CutFactsProps {
  readonly selection: readonly EdgeRef[]
}

/** What follows from the prep: the tilt's other two angles, where the bottom edge lands, what the jet does. */
export function CutFacts({ selection }: CutFactsProps) {
  const angles = useAngles(selection)
  const cut = useCutFacts(selection)
  return (
    <div className="text-small [&_div]:py-0">
      <Facts facts={[...cut.slice(0, 1), ...angles, ...cut.slice(1)]} />
    </div>
  )
}

/** The angles of each bevelled facet beside the one from vertical, which stands in the section. */
function useAngles(selection: readonly EdgeRef[]): Fact[] {
  const content = useContent()
  const preps = selection.map((edge) => {
    const square = jointOf(content, edge)?.mate === 'square'
    const bevels = facetsOf(content, edge).filter(({ tilt }) => tilt !== 0)
    return { square, angles: bevels.map(({ tilt }) => anglesThreeWays(tilt, square ? 0 : tilt)) }
  })
  if (preps.every(({ angles }) => angles.length === 0)) return []
  const mate = shared(preps.map(({ square }) => square))
  const twin = mate.mixed ? '' : mate.value ? ', with a square mate' : ', with its twin'
  const said = (read: (angles: ReturnType<typeof anglesThreeWays>) => number) => {
    const text = shared(
      preps.map(({ angles }) => angles.map((each) => formatAngle(read(each))).join(' / ') || 'square'),
    )
    return text.mixed ? 'mixed' : text.value
  }
  return [
    ['from the plate face', said(({ fromPlateFace }) => fromPlateFace)],
    [`groove${twin}`, said(({ grooveAngle }) => grooveAngle)],
  ]
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
      'jet tilt needed / limit',
      <span key="needed" className={over ? 'text-breach' : ''}>
        {formatAngle(most)} / {formatAngle(limit)}
        {over ? ', over the limit' : ''}
      </span>,
    ],
    [
      'bottom edge outside the top',
      said(known.map(({ bottomOffset }) => formatLength(bottomOffset, unit, { sign: true }))),
    ],
    ['jet: wall less taper', said(tilts)],
    ['path in the metal', said(known.map(({ metalPath }) => formatLength(metalPath, unit)))],
    ['passes', `${said(known.map(({ jetTilts }) => String(jetTilts.length)))}${result.pending ? ' …' : ''}`],
  ]
}
