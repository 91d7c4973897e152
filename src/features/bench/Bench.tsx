import { memo, useCallback, useMemo, useRef, useState } from 'react'
import { useSearchParams } from 'react-router-dom'
import type { Head } from '../../../shared/api/heads.ts'
import type { Setup } from '../../../shared/api/setups.ts'
import { cornerName, edgeKey } from '../../../shared/walls/names.ts'
import { loopFromVertices } from '../../../shared/geometry/bulge.ts'
import { formatAngle, formatLength } from '../../../shared/units/format.ts'
import { useMay } from '../../app/current-user.tsx'
import { Page } from '../../app/Page.tsx'
import { useTheme, useUnit } from '../../app/preferences.ts'
import { useEvaluation } from '../../evaluation/index.ts'
import type { ViewContext } from '../../viewer/index.ts'
import './bench.css'
import { ActRow } from './title/ActRow.tsx'
import { TitleBlock } from './title/TitleBlock.tsx'
import { Banners } from './save/Banners.tsx'
import { EdgeTable } from './edges/EdgeTable.tsx'
import { SelectMany } from './edges/SelectMany.tsx'
import { Region } from './Region.tsx'
import { Sheet } from './Sheet.tsx'
import { headOf, requestOf } from './model/content.ts'
import { readEdges } from './model/link.ts'
import { breachesIn, notesOf, type MarginNote } from './model/notes.ts'
import { baseOf } from './model/state.ts'
import { BenchContext, makeBenchStore, useContent } from './model/store.ts'
import { SceneContext, type Scene } from './scene.ts'
import { useAnnouncements } from './use-announcements.ts'
import { useLink } from './use-link.ts'

interface BenchProps {
  readonly setup: Setup
  readonly newest: Setup | null
  readonly heads: readonly Head[]
}

/** One store for as long as the set-up is open: what was typed outlives every answer of the server. */
export function Bench(props: BenchProps) {
  const [search] = useSearchParams()
  const [store] = useState(() => {
    const loops = props.setup.revision.content.loops.map(loopFromVertices)
    return makeBenchStore(baseOf(props.setup), loops, readEdges(search.get('edges'), loops))
  })
  return (
    <BenchContext value={store}>
      <OpenBench {...props} />
    </BenchContext>
  )
}

function OpenBench({ setup, newest, heads }: BenchProps) {
  const content = useContent()
  const unit = useUnit()
  const theme = useTheme()
  const maySave = useMay('saveSetup')
  // A number belongs to one list of notes: another list begins without a choice.
  const [chosen, setChosen] = useState<{ number: number | null; of: readonly MarginNote[] } | null>(null)
  // The profile is the part's and does not change while the bench is open.
  const [stored] = useState(setup.revision.content)

  const { headId, plate, jet, datum, walls } = content
  const readOnly = !maySave || newest !== null
  const head = useMemo(() => {
    if (newest !== null) return stored.head
    return headOf(stored.head, heads, headId)
  }, [stored, heads, headId, newest])
  const request = useMemo(
    () => requestOf(stored, { plate, jet, datum, walls }, head),
    [stored, plate, jet, datum, walls, head],
  )
  const result = useEvaluation(request)
  const { evaluation } = result

  const notes = useMemo(
    () =>
      notesOf(evaluation?.findings ?? [], {
        unit,
        length: (mm) => formatLength(mm, unit),
        angle: (degrees) => formatAngle(degrees, { decimals: 1 }),
        edgesIn: (loop) => stored.loops[loop]?.length ?? 0,
      }),
    [evaluation, unit, stored],
  )
  const edges = useMemo(
    () => new Map((evaluation?.edges ?? []).map((edge) => [edgeKey(edge), edge])),
    [evaluation],
  )
  const corners = useMemo(
    () => new Map((evaluation?.corners ?? []).map((corner) => [cornerName(corner), corner])),
    [evaluation],
  )
  const breaches = useMemo(() => breachesIn(evaluation?.findings ?? []), [evaluation])
  const chosenNote = chosen?.of === notes ? chosen.number : null
  const chooseNote = useCallback((number: number | null) => setChosen({ number, of: notes }), [notes])
  const viewContextRef = useRef<ViewContext | null>(null)
  const keepViewContext = useCallback((context: ViewContext) => {
    viewContextRef.current = context
  }, [])
  const { mesh, request: answered, error, pending } = result
  const scene = useMemo(
    (): Scene => ({
      setup,
      newest,
      stored,
      heads,
      head,
      readOnly,
      unit,
      theme,
      result: { evaluation, mesh, request: answered, error, pending },
      edges,
      corners,
      breaches,
      notes,
      chosenNote,
      chooseNote,
      viewContextRef,
      keepViewContext,
    }),
    [
      setup,
      newest,
      stored,
      heads,
      head,
      readOnly,
      unit,
      theme,
      evaluation,
      mesh,
      answered,
      error,
      pending,
      edges,
      corners,
      breaches,
      notes,
      chosenNote,
      chooseNote,
      keepViewContext,
    ],
  )
  return (
    <SceneContext value={scene}>
      <InStep />
      <Everything />
    </SceneContext>
  )
}

/** Drawn anew by what it reads, not by a change of the address. */
const Everything = memo(function Everything() {
  return (
    <Page>
      <div className="bench-fold">
        <TitleBlock />
        <div className="flex flex-wrap bg-panel border-b border-rule print:hidden">
          <ActRow />
          <Banners />
        </div>
        <Sheet />
      </div>
      <Region id="bench-table" title="Edge table" className="px-3 sm:px-6 py-4">
        <SelectMany />
        <EdgeTable />
      </Region>
    </Page>
  )
})

/** Keeps the address and the screen reader in step; draws nothing. */
function InStep() {
  useAnnouncements()
  useLink()
  return null
}
