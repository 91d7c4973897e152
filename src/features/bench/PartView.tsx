import { Suspense, useCallback, useMemo } from 'react'
import { edgeName, parseEdgeKey } from '../../../shared/walls/names.ts'
import { pointAt } from '../../../shared/geometry/segment.ts'
import { formatLength } from '../../../shared/units/format.ts'
import { MM_PER_INCH } from '../../../shared/units/length.ts'
import { PartViewer, type Balloon, type EdgeLabel, type EventMark, type Insets } from '../../viewer/index.ts'
import { useActs, useBench, useContent } from './model/store.ts'
import type { MarginNote, Place } from './model/notes.ts'
import { facetsOf, isSquare } from './model/walls.ts'
import { edgeLabel } from './model/words.ts'
import { useScene } from './scene.ts'
import { findingWords } from './use-announcements.ts'
import { useViewLink } from './use-link.ts'
import { useLayout } from './use-layout.ts'

/** More tilted edges than this are not all labelled: only the selected ones are. */
const MOST_LABELS = 40
/** Balloons of one note in the picture; the chosen note shows all of its own. */
const MOST_BALLOONS = 8

const insetsOnDesk: Insets = { top: 8, right: 364, bottom: 8, left: 292 }

const eventWords = {
  vanish: 'vanishes',
  split: 'splits the contour',
  'break-through': 'breaks through',
} as const

/** The part in 3D with everything that the sheet knows about it. */
export function PartView() {
  const { result, theme, unit, notes, chosenNote, chooseNote, breaches, keepViewContext } = useScene()
  const content = useContent()
  const loops = useBench((state) => state.loops)
  const selection = useBench((state) => state.selection)
  const acts = useActs()
  const layout = useLayout()
  const [view, keepView] = useViewLink()
  const { walls, plate } = content

  const tiltOf = useCallback(
    (loop: number, edge: number, facet: number) =>
      facetsOf({ walls, plate }, { loop, edge })[facet]?.tilt ?? 0,
    [walls, plate],
  )
  const labels = useMemo((): EdgeLabel[] => {
    const tilted = walls.filter(({ facets }) => !isSquare(facets))
    const shown = tilted.length <= MOST_LABELS ? [...tilted, ...selection] : selection.slice(0, MOST_LABELS)
    const unique = new Map(shown.map(({ loop, edge }) => [`${loop}-${edge}`, { loop, edge }]))
    return [...unique.values()].map((edge) => ({
      edge,
      text: edgeLabel(edge, facetsOf({ walls, plate }, edge)),
    }))
  }, [walls, plate, selection])
  const balloons = useMemo(
    () => notes.flatMap((note) => balloonsOf(note, note.number === chosenNote)),
    // eslint-disable-next-line react-hooks/exhaustive-deps -- balloonsOf reads loops and the first event of this result
    [notes, chosenNote, loops],
  )
  const breached = useMemo(() => {
    const edges = [...breaches].flatMap((key) => parseEdgeKey(key) ?? [])
    const corners = notes
      .flatMap(({ places }) => places)
      .flatMap(({ name, loop, vertex }) =>
        loop !== null && vertex !== null && breaches.has(name) ? [{ loop, vertex }] : [],
      )
    return { edges, corners }
  }, [breaches, notes])

  const first = result.evaluation?.firstEvent ?? null
  const event = useMemo((): EventMark | null => {
    if (first === null) return null
    const text = `${edgeName(first)} ${eventWords[first.kind]} at ${formatLength(first.depth, unit)}`
    return { at: first.at, depth: first.depth, text }
  }, [first, unit])
  const scaleBar = useMemo(
    () => ({ unit: unit === 'mm' ? 1 : MM_PER_INCH, text: (value: number) => `${value} ${unit}` }),
    [unit],
  )

  const chooseBalloon = useCallback(
    (number: number) => {
      chooseNote(number)
      const note = notes.find((each) => each.number === number)
      if (note !== undefined) acts.selectMany(note.places.flatMap(({ edges }) => edges))
    },
    [notes, chooseNote, acts],
  )

  function balloonsOf(note: MarginNote, chosen: boolean): Balloon[] {
    const places = chosen ? note.places : spread(note.places, MOST_BALLOONS)
    return places.flatMap((place) => {
      const at = standsAt(place)
      return at === null
        ? []
        : [{ number: note.number, at, tone: note.severity === 'stop' ? 'breach' : 'plain', selected: chosen }]
    })
  }

  function standsAt({ loop, vertex, edge }: Place): Balloon['at'] | null {
    const segment = loop === null ? undefined : loops[loop]?.[vertex ?? edge ?? 0]
    if (segment === undefined) return null
    const { x, y } = pointAt(segment, vertex === null ? 0.5 : 0)
    return { x, y, depth: 0 }
  }

  return (
    <Suspense fallback={<Drawing />}>
      <PartViewer
        mesh={result.mesh}
        thickness={plate.thickness}
        tiltOf={tiltOf}
        selection={selection}
        onSelect={acts.select}
        breaches={breached}
        labels={labels}
        balloons={balloons}
        onBalloon={chooseBalloon}
        event={event}
        theme={theme}
        compact={layout === 'phone'}
        view={view}
        onViewChange={keepView}
        onContext={keepViewContext}
        insets={layout === 'desk' ? insetsOnDesk : undefined}
        label="Part in 3D"
        description={`${loops[0]?.length ?? 0} outer edges, ${loops.length - 1} holes. ${findingWords(notes)}. Every number of the picture stands in the edge table.`}
        scaleBar={scaleBar}
      />
    </Suspense>
  )
}

/** At most so many of a list, evenly from all of it, so that they do not crowd one side of the part. */
function spread<T>(all: readonly T[], most: number): T[] {
  const pitch = Math.max(1, all.length / most)
  return all.filter((_, i) => Math.floor(i / pitch) !== Math.floor((i - 1) / pitch))
}

/** In the middle of the picture, where neither the notes nor the card stand. */
function Drawing() {
  return <p className="h-full grid place-items-center text-muted appear-late">Drawing…</p>
}
