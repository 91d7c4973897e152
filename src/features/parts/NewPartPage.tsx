import { useQueryClient } from '@tanstack/react-query'
import { useSearchParams } from 'react-router-dom'
import { readingQuery, type DrawingRead } from '../../api/drawings.ts'
import { Page, PageBody, PageHead } from '../../app/Page.tsx'
import { ButtonLink } from '../../ui/Button.tsx'
import { Notice } from '../../ui/Notice.tsx'
import { ReadingReport } from './reading/ReadingReport.tsx'
import { startOptions } from './reading/options.ts'
import { UploadArea } from './UploadArea.tsx'

/** A drawing in, its reading report, a part out. The drawing's id stands in the URL, so a reload keeps it. */
export default function NewPartPage() {
  const [search, setSearch] = useSearchParams()
  const client = useQueryClient()
  const drawingId = search.get('drawing')

  function taken(read: DrawingRead) {
    client.setQueryData(readingQuery(read.drawing.id, startOptions).queryKey, read)
    setSearch({ drawing: read.drawing.id })
  }

  if (drawingId !== null) return <ReadingReport key={drawingId} drawingId={drawingId} />
  return (
    <Page>
      <PageHead title="New part" label="Part" cells={[{ label: 'Step', value: '1 of 3 · drawing' }]} />
      <PageBody narrow>
        <UploadArea onRead={taken} />
        <Notice title="What is read">
          The flat outline of the part as DXF text: lines, arcs, circles, polylines, ellipses, splines and
          blocks. The bevels are not drawn: they are given to the edges later. Anything left out is listed in
          the report.
        </Notice>
        <ButtonLink to="/parts" look="quiet" className="self-start">
          Back to the parts
        </ButtonLink>
      </PageBody>
    </Page>
  )
}
