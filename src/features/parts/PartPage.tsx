import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import { useParams, useSearchParams } from 'react-router-dom'
import type { Part } from '../../../shared/api/parts.ts'
import { drawingFileUrl, partQuery } from '../../api/parts.ts'
import { useMay } from '../../app/current-user.tsx'
import { Page, PageBody, PageHead, Section } from '../../app/Page.tsx'
import { QueryGate } from '../../app/QueryGate.tsx'
import { useUnit } from '../../app/preferences.ts'
import { formatArea } from '../../../shared/units/format.ts'
import { Button, ButtonAnchor, ButtonLink } from '../../ui/Button.tsx'
import { Facts } from '../../ui/Facts.tsx'
import { formatSize, loopsInWords } from '../../ui/measures.ts'
import { formatInstant } from '../../ui/when.ts'
import { DimensionedOutline } from './DimensionedOutline.tsx'
import { NewSetupDialog } from './NewSetupDialog.tsx'
import { RenameDialog } from './RenameDialog.tsx'
import { SetupsOfPart } from './SetupsOfPart.tsx'

export default function PartPage() {
  const { id = '' } = useParams()
  return <QueryGate query={useQuery(partQuery(id))}>{(part) => <PartSheet part={part} />}</QueryGate>
}

function PartSheet({ part }: { part: Part }) {
  const unit = useUnit()
  const [search, setSearch] = useSearchParams()
  const [renaming, setRenaming] = useState(false)
  const mayChange = useMay('updatePart')
  const mayStart = useMay('createSetup')
  const starting = mayStart && search.get('start') === 'setup'
  const start = (
    <Button look="main" onClick={() => setSearch({ start: 'setup' }, { replace: true })}>
      New set-up
    </Button>
  )
  return (
    <Page>
      <PageHead
        title={`${part.number} ${part.name}`}
        label="Part"
        cells={[
          { label: 'Size', value: formatSize(part.bounds, unit) },
          { label: 'Loops', value: loopsInWords(part.loops.length - 1) },
        ]}
        actions={
          <>
            {mayStart && start}
            {mayChange && <Button onClick={() => setRenaming(true)}>Rename</Button>}
          </>
        }
      />
      <PageBody>
        <div className="grid gap-6 lg:grid-cols-[minmax(0,1fr)_22rem]">
          <DimensionedOutline part={part} />
          <PartFacts part={part} />
        </div>
        <Section title="Set-ups of this part">
          <SetupsOfPart partId={part.id} start={mayStart ? start : null} />
        </Section>
        <ButtonLink to="/parts" look="quiet" className="self-start">
          All parts
        </ButtonLink>
      </PageBody>
      {starting && <NewSetupDialog part={part} onClose={() => setSearch({}, { replace: true })} />}
      {renaming && <RenameDialog part={part} onClose={() => setRenaming(false)} />}
    </Page>
  )
}

function PartFacts({ part }: { part: Part }) {
  const unit = useUnit()
  const mayFetch = useMay('drawingFile')
  const { drawing, reading } = part
  return (
    <Section title="Facts">
      <Facts
        facts={[
          ['Area less holes', formatArea(part.area, unit)],
          ['Edges', part.loops.reduce((sum, loop) => sum + loop.length, 0)],
          ['Read in', reading.unit ?? 'the unit of the file'],
          ['Drawing', <span className="break-all">{drawing.fileName}</span>],
          ['Its SHA-256', <abbr title={drawing.sha256}>{drawing.sha256.slice(0, 12)}…</abbr>],
          ['Uploaded', `${formatInstant(drawing.uploadedAt)}, ${drawing.uploadedBy.name}`],
          ['Part made', `${formatInstant(part.createdAt)}, ${part.createdBy.name}`],
        ]}
      />
      {mayFetch && (
        <ButtonAnchor href={drawingFileUrl(drawing.id)} download className="self-start">
          Fetch the drawing
        </ButtonAnchor>
      )}
    </Section>
  )
}
