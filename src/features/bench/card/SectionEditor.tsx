import { useCallback } from 'react'
import { edgeKey } from '../../../../shared/walls/names.ts'
import type { EdgeRef } from '../../../../shared/walls/types.ts'
import { formatLength } from '../../../../shared/units/format.ts'
import { PlateSection } from '../../../section/PlateSection.tsx'
import type { SectionDimension } from '../../../section/types.ts'
import { useActs, useContent } from '../model/store.ts'
import { facetsOf, heightsOf, roomFor, shared, withFacets, withHeight, withTilt } from '../model/walls.ts'
import { senseOf } from '../model/words.ts'
import { limitOf, useScene } from '../scene.ts'
import { SlotInput } from './SlotInput.tsx'

interface SectionEditorProps {
  /** The edge whose section is drawn. */
  readonly lead: EdgeRef
  /** All of the same number of facets; an edit reaches every one of them. */
  readonly selection: readonly EdgeRef[]
}

const SLOT = { angle: { width: 124, height: 44 }, length: { width: 96, height: 44 } }

/** The section to scale; its angles and depths are typed where they stand. */
export function SectionEditor({ lead, selection }: SectionEditorProps) {
  const { unit, theme, readOnly, edges, head, breaches } = useScene()
  const content = useContent()
  const acts = useActs()
  const facets = facetsOf(content, lead)
  const { thickness } = content.plate
  const tilts = edges.get(edgeKey(lead))?.jetTilts ?? []
  const limit = limitOf(head)
  const breached = breaches.has(edgeKey(lead))
    ? tilts.flatMap((tilt, i) => (Math.abs(tilt) > limit ? [i] : []))
    : []

  const valuesOf = (read: (of: typeof facets) => number) => {
    const one = shared(selection.map((edge) => read(facetsOf(content, edge))))
    return one.mixed ? null : one.value
  }

  function slot({ id, kind, facet, caption }: SectionDimension) {
    if (readOnly || facet === null) return undefined
    const key = `${id} ${selection.map(edgeKey).join()}`
    const number = facets.length > 1 ? ` of facet ${facet + 1}` : ''
    if (kind === 'angle') {
      const value = valuesOf((of) => of[facet]!.tilt)
      return (
        <SlotInput
          key={key}
          id={id}
          name={`Tilt from vertical${number}, degrees, plus opens downward`}
          caption={value === null ? 'from vertical' : `from vertical, ${senseOf(value)}`}
          quantity="angle"
          value={value}
          check={(degrees) => (Math.abs(degrees) < 90 ? null : 'Between −90° and +90°.')}
          onChange={(tilt, run) =>
            acts.edit((before) => withFacets(before, selection, (of) => withTilt(of, facet, tilt)), run)
          }
        />
      )
    }
    if (kind !== 'facet-depth') return undefined
    const room = Math.min(...selection.map((edge) => roomFor(facetsOf(content, edge), facet)))
    return (
      <SlotInput
        key={key}
        id={id}
        name={`${caption}${number}`}
        caption={caption}
        quantity="length"
        value={valuesOf((of) => heightsOf(of)[facet]!)}
        check={(mm) =>
          mm > 0 && mm < room ? null : `More than 0 and less than ${formatLength(room, unit)}.`
        }
        onChange={(height, run) =>
          acts.edit((before) => withFacets(before, selection, (of) => withHeight(of, facet, height)), run)
        }
      />
    )
  }

  const labelSize = useCallback(
    ({ kind }: SectionDimension) =>
      readOnly ? undefined : kind === 'angle' ? SLOT.angle : kind === 'facet-depth' ? SLOT.length : undefined,
    [readOnly],
  )
  return (
    <PlateSection
      thickness={thickness}
      facets={facets}
      theme={theme}
      unit={unit}
      breached={breached}
      renderDimension={slot}
      labelSize={labelSize}
      plateHeight={116}
    />
  )
}
