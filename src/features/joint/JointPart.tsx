import { Suspense, useCallback, useMemo, useState } from 'react'
import { edgeKey } from '../../../shared/walls/names.ts'
import { evaluationRequestOf, type SetupContent } from '../../../shared/setup/schema.ts'
import { describeWall } from '../../../shared/setup/describe.ts'
import type { DisplayUnit } from '../../../shared/units/length.ts'
import { Section } from '../../app/Page.tsx'
import { useTheme } from '../../app/preferences.ts'
import { useEvaluation } from '../../evaluation/index.ts'
import { Button } from '../../ui/Button.tsx'
import { PartViewer } from '../../viewer/index.ts'
import { ViewerGuard } from './ViewerGuard.tsx'
import type { JointEdge } from './joint-model.ts'

interface JointPartProps {
  readonly content: SetupContent
  readonly edge: JointEdge
  readonly unit: DisplayUnit
}

/** The part in 3D with the edge lit; it can be put away where it is in the way. */
export function JointPart({ content, edge, unit }: JointPartProps) {
  const [shown, setShown] = useState(true)
  return (
    <Section title="Where the edge is">
      {shown && (
        <ViewerGuard>
          <LitPart content={content} edge={edge} unit={unit} />
        </ViewerGuard>
      )}
      <Button size="glove" aria-expanded={shown} onClick={() => setShown(!shown)}>
        {shown ? 'Put the 3D part away' : 'Show the part in 3D'}
      </Button>
    </Section>
  )
}

function LitPart({ content, edge, unit }: JointPartProps) {
  const theme = useTheme()
  const request = useMemo(() => evaluationRequestOf(content), [content])
  const { mesh, error } = useEvaluation(request)
  const walls = useMemo(() => new Map(content.walls.map((wall) => [edgeKey(wall), wall.facets])), [content])
  const tiltOf = useCallback(
    (loop: number, index: number, facet: number) =>
      walls.get(edgeKey({ loop, edge: index }))?.[facet]?.tilt ?? 0,
    [walls],
  )
  const lit = useMemo(() => ({ loop: edge.loop, edge: edge.edge }), [edge.loop, edge.edge])
  const selection = useMemo(() => [lit], [lit])
  const labels = useMemo(() => [{ edge: lit, text: edge.name }], [lit, edge.name])
  if (error) return <p>The part cannot be shown in 3D: {error.message}</p>
  return (
    <div className="h-72 lg:h-96 border border-rule">
      <Suspense fallback={<p className="p-3 text-muted">Loading the part…</p>}>
        <PartViewer
          mesh={mesh}
          thickness={content.plate.thickness}
          tiltOf={tiltOf}
          selection={selection}
          breaches={NO_BREACHES}
          labels={labels}
          balloons={NO_BALLOONS}
          theme={theme}
          compact
          focusEdge={lit}
          label={`Part ${content.part.number} in 3D, edge ${edge.name} lit`}
          description={`Edge ${edge.name}: ${describeWall(edge.facets, unit)}.`}
        />
      </Suspense>
    </div>
  )
}

const NO_BREACHES = { edges: [], corners: [] }
const NO_BALLOONS: never[] = []
