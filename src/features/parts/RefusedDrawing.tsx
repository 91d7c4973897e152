import type { DrawingErrorCode } from '../../../shared/drawing/errors.ts'
import { drawingErrorCodes } from '../../../shared/drawing/errors.ts'
import { ApiError } from '../../api/errors.ts'
import { ErrorNotice, Notice } from '../../ui/Notice.tsx'

/** What to do about a drawing that cannot be read; the server's message says what was found. */
const ways: Record<DrawingErrorCode, string> = {
  'drawing-empty': 'Export the drawing again and check that the file has a size.',
  'drawing-too-large':
    'Export the outline of this part alone, without title block, hatching and other parts.',
  'drawing-binary': 'Save it as a text (ASCII) DXF instead of a binary one.',
  'drawing-compressed': 'Unpack the archive first and choose the DXF in it.',
  'drawing-not-dxf': 'Choose a .dxf file. Other kinds of drawing must be exported as DXF first.',
  'drawing-truncated': 'The file stops half-way. Copy or export it again.',
  'drawing-malformed': 'Open it in the program that drew it, and export it as DXF again.',
  'drawing-number': 'Open it in the program that drew it, and export it as DXF again.',
  'drawing-too-many-entities': 'Export the outline alone, or join short lines to polylines first.',
  'drawing-block-recursion': 'A block contains itself. Explode the blocks and export it again.',
  'drawing-lost-vertices':
    'Nothing is read rather than half of it. Export the drawing again, as R2000 or later.',
  'drawing-too-slow': 'Export the outline alone, or explode deeply nested blocks first.',
  'drawing-no-geometry': 'Check that the outline is in model space and on a layer that is switched on.',
}

export function RefusedDrawing({ fileName, error }: { fileName: string; error: unknown }) {
  const code = error instanceof ApiError ? drawingErrorCodes.find((known) => known === error.code) : undefined
  if (code === undefined) return <ErrorNotice error={error} />
  return (
    <Notice tone="breach" title={`${fileName} was not read`}>
      <p>{error instanceof ApiError && error.message}</p>
      <p className="text-ink">{ways[code]} Nothing was stored.</p>
    </Notice>
  )
}
