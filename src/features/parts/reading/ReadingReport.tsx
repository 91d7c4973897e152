import { useQuery } from '@tanstack/react-query'
import { useEffect, useState } from 'react'
import type { Reading } from '../../../../shared/drawing/schema.ts'
import { readingQuery, type DrawingRead } from '../../../api/drawings.ts'
import { Page, PageBody, PageHead, Section } from '../../../app/Page.tsx'
import { useUnit } from '../../../app/preferences.ts'
import { Button, ButtonLink } from '../../../ui/Button.tsx'
import { formatSize, loopsInWords } from '../../../ui/measures.ts'
import { ErrorNotice, Notice } from '../../../ui/Notice.tsx'
import { EntityTable } from './EntityTable.tsx'
import { NewPartForm } from './NewPartForm.tsx'
import { startOptions, type Options } from './options.ts'
import { PartPicker } from './PartPicker.tsx'
import { ReadingChoices } from './ReadingChoices.tsx'
import { ReadingNotices } from './ReadingNotices.tsx'
import { ReadingPicture } from './ReadingPicture.tsx'
import { UnitQuestion } from './UnitQuestion.tsx'

/** A pause in typing long enough to read the drawing again. */
const PAUSE_MS = 400

/** What was read of a drawing, what was left out and why, on its picture; the choices that read it again. */
export function ReadingReport({ drawingId }: { drawingId: string }) {
  const [options, setOptions] = useState<Options>(startOptions)
  const settled = useSettled(options)
  const query = useQuery(readingQuery(drawingId, settled))
  const change = (next: Partial<Options>) => setOptions((before) => ({ ...before, ...next }))

  if (query.data === undefined)
    return (
      <Page>
        <PageHead title="New part" label="Part" cells={[{ label: 'Step', value: '2 of 3 · reading' }]} />
        <PageBody narrow>
          {query.error === null ? (
            <p role="status">Reading the drawing…</p>
          ) : (
            <ErrorNotice
              error={query.error}
              actions={
                <>
                  <Button onClick={() => void query.refetch()}>Try again</Button>
                  <ButtonLink to="/parts/new">Choose another drawing</ButtonLink>
                </>
              }
            />
          )}
        </PageBody>
      </Page>
    )
  return (
    <Report
      read={query.data}
      options={options}
      change={change}
      busy={settled !== options || query.isPlaceholderData}
      error={query.error}
    />
  )
}

interface ReportProps {
  readonly read: DrawingRead
  readonly options: Options
  readonly change: (change: Partial<Options>) => void
  readonly busy: boolean
  readonly error: unknown
}

function Report({ read: { drawing, reading }, options, change, busy, error }: ReportProps) {
  const unit = useUnit()
  const [chosen, setChosen] = useState(0)
  const [noticeAt, setNoticeAt] = useState<number | null>(null)
  // Reading again may leave fewer parts or notices than before.
  const pick = chosen < reading.parts.length ? chosen : 0
  const notice = noticeAt !== null && noticeAt < reading.notices.length ? noticeAt : null
  return (
    <Page>
      <PageHead
        title="New part"
        label="Part"
        cells={[
          { label: 'Step', value: '2 of 3 · reading' },
          { label: 'Drawing', value: <span className="break-all">{drawing.fileName}</span> },
          { label: 'Read in', value: reading.unit.used },
          { label: 'Size', value: reading.bounds === null ? '–' : formatSize(reading.bounds, unit) },
          {
            label: 'Parts found',
            value: partsInWords(reading, pick),
            tone: reading.parts.length > 0 ? 'plain' : 'breach',
          },
          { label: 'Notes', value: noticesInWords(reading), tone: hasErrors(reading) ? 'breach' : 'plain' },
        ]}
      />
      <PageBody>
        {error !== null && <ErrorNotice error={error} />}
        {options.unit === undefined && (
          <UnitQuestion reading={reading} onChoose={(next) => change({ unit: next })} />
        )}
        <div className="grid gap-6 lg:grid-cols-[minmax(0,1fr)_22rem]">
          <div className="flex flex-col gap-6 min-w-0">
            <Section
              title="What was read"
              aside={busy ? <span role="status">Reading again…</span> : undefined}
            >
              <ReadingPicture
                reading={reading}
                pick={pick}
                onPick={setChosen}
                notice={notice}
                onNotice={setNoticeAt}
              />
            </Section>
            <Section title="Notes">
              <ReadingNotices notices={reading.notices} at={notice} onAt={setNoticeAt} />
            </Section>
          </div>
          <div className="flex flex-col gap-6 min-w-0">
            {reading.parts.length === 0 ? (
              <Notice tone="breach" title="No closed outline">
                No part can be made of this reading. Open ends are dashed in the picture: raise the gap that
                is joined, tick the layer that is missing, or close the outline in the drawing and upload it
                again.
              </Notice>
            ) : (
              <>
                {reading.parts.length > 1 && (
                  <Section title="Which part">
                    <PartPicker reading={reading} pick={pick} onPick={setChosen} />
                  </Section>
                )}
                <Section title="Make the part">
                  <NewPartForm drawing={drawing} options={options} pick={pick} busy={busy} />
                </Section>
              </>
            )}
            <Section title="How it is read">
              <ReadingChoices reading={reading} options={options} change={change} />
            </Section>
            <Section title="Entities">
              <EntityTable entities={reading.entities} />
            </Section>
            <ButtonLink to="/parts/new" look="quiet" className="self-start">
              Choose another drawing
            </ButtonLink>
          </div>
        </div>
      </PageBody>
    </Page>
  )
}

const hasErrors = ({ notices }: Reading) => notices.some(({ severity }) => severity === 'error')

function noticesInWords({ notices }: Reading): string {
  const errors = notices.filter(({ severity }) => severity === 'error').length
  return errors === 0 ? String(notices.length) : `${notices.length}, ${errors} to mend`
}

/** The value once it has stayed the same for a moment; the very first at once. */
function useSettled<T>(value: T): T {
  const [settled, setSettled] = useState(value)
  useEffect(() => {
    const timer = setTimeout(() => setSettled(value), PAUSE_MS)
    return () => clearTimeout(timer)
  }, [value])
  return settled
}

function partsInWords({ parts }: Reading, pick: number): string {
  const part = parts[pick]
  if (part === undefined) return 'none'
  const loops = loopsInWords(part.holes.length)
  return parts.length === 1 ? `1 · ${loops}` : `${parts.length} · chosen: ${loops}`
}
