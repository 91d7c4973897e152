import { useState } from 'react'
import type { Cure } from '../../../../shared/findings/schema.ts'
import { announce } from '../../../ui/announce.ts'
import { Balloon } from '../../../ui/Balloon.tsx'
import { Button } from '../../../ui/Button.tsx'
import { severityWord, type MarginNote, type Place } from '../model/notes.ts'
import { useActs } from '../model/store.ts'
import { withCures } from '../model/cures.ts'
import { useScene } from '../scene.ts'

/** Places of a gathered note named at first; the rest on request. */
const PLACES_SHOWN = 8

/** The findings, numbered as their balloons are. */
export function MarginNotes() {
  const { notes, result } = useScene()
  if (result.evaluation === null) {
    return <p className="text-muted">{result.error === null ? 'Computing…' : 'Not computed.'}</p>
  }
  if (notes.length === 0) return <p className="text-muted">Nothing stands against cutting it so.</p>
  return (
    <ol className="flex flex-col">
      {notes.map((note) => (
        <Note key={`${note.code} ${note.places[0]?.name} ${note.findings.length}`} note={note} />
      ))}
    </ol>
  )
}

function Note({ note }: { note: MarginNote }) {
  const { chosenNote, chooseNote, readOnly } = useScene()
  const acts = useActs()
  const { number, severity, message, places, cure, advice } = note
  const chosen = chosenNote === number
  const tone = chosen ? 'select' : severity === 'stop' ? 'breach' : 'ink'

  function choose() {
    chooseNote(number)
    acts.selectMany(uniqueEdges(places))
  }

  function apply(cures: readonly Cure[], what: string) {
    acts.edit((before) => withCures(before, cures))
    announce(`Applied: ${what}`)
  }

  return (
    <li
      className={`flex gap-2 border-b border-rule py-2.5 ${chosen ? 'bg-panel' : ''}`}
      data-note={number}
      aria-current={chosen || undefined}
    >
      <Balloon tone={tone}>{number}</Balloon>
      <div className="flex flex-col items-start gap-1 min-w-0">
        <button
          type="button"
          data-landing
          className={`text-left cursor-pointer hover:underline underline-offset-2 ${severity === 'stop' ? 'text-breach' : ''}`}
          onClick={choose}
        >
          <span className={severity === 'note' ? 'sr-only' : 'font-bold'}>{severityWord[severity]}: </span>
          {message}
        </button>
        {places.length > 1 && <Places places={places} />}
        {cure !== null && !readOnly && (
          <Button
            look="quiet"
            className="-ml-3 text-left! justify-start!"
            onClick={() => apply(cure.cures, cure.message)}
          >
            {cure.message} [apply]
          </Button>
        )}
        {advice !== null && <p className="text-small text-muted">{advice}</p>}
      </div>
    </li>
  )
}

function Places({ places }: { places: readonly Place[] }) {
  const acts = useActs()
  const [all, setAll] = useState(false)
  const shown = all ? places : places.slice(0, PLACES_SHOWN)
  return (
    <p className="flex flex-wrap gap-x-2 text-small">
      {shown.map((place, i) => (
        <button
          key={`${place.name} ${i}`}
          type="button"
          className="underline underline-offset-2 cursor-pointer min-h-6 max-sm:min-h-11"
          onClick={() => acts.selectMany(place.edges)}
        >
          {place.name}
        </button>
      ))}
      {shown.length < places.length && (
        <button type="button" className="text-select cursor-pointer min-h-6" onClick={() => setAll(true)}>
          and {places.length - shown.length} more
        </button>
      )}
    </p>
  )
}

function uniqueEdges(places: readonly Place[]) {
  const edges = places.flatMap((place) => place.edges)
  return [...new Map(edges.map((edge) => [`${edge.loop}-${edge.edge}`, edge])).values()]
}
