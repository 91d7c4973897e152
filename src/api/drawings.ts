import { keepPreviousData, queryOptions } from '@tanstack/react-query'
import type * as z from 'zod'
import type { drawingReadSchema } from '../../shared/api/parts.ts'
import { routes } from '../../shared/api/routes.ts'
import type { ReadingOptions } from '../../shared/drawing/schema.ts'
import { call, refusalOf } from './client.ts'
import { ApiError, NetworkError } from './errors.ts'
import { askToSignIn } from './sign-in-gate.ts'

export type DrawingRead = z.output<typeof drawingReadSchema>

/** A drawing read with these options; the last picture stays while the next is being read. */
export const readingQuery = (id: string, options: ReadingOptions, first?: DrawingRead) =>
  queryOptions({
    queryKey: ['reading', id, options],
    queryFn: ({ signal }) => call('readDrawing', { params: { id }, body: options, signal }),
    initialData: first,
    placeholderData: keepPreviousData,
    staleTime: Infinity,
    gcTime: 60_000,
  })

interface Upload {
  readonly file: File
  /** Share sent, 0 to 1. */
  readonly onProgress: (share: number) => void
  readonly signal: AbortSignal
}

/** Sends a drawing and has it read. XMLHttpRequest, because `fetch` tells nothing of what has been sent. */
export async function uploadDrawing(upload: Upload): Promise<DrawingRead> {
  try {
    return await uploadOnce(upload)
  } catch (error) {
    const lapsed = error instanceof ApiError && error.code === 'not-signed-in'
    if (!lapsed || !(await askToSignIn())) throw error
    return await uploadOnce(upload)
  }
}

function uploadOnce({ file, onProgress, signal }: Upload): Promise<DrawingRead> {
  return new Promise((resolve, reject) => {
    const { path, upload } = routes.uploadDrawing
    const request = new XMLHttpRequest()
    request.open('POST', path)
    request.responseType = 'json'
    request.upload.onprogress = ({ loaded, total }) => onProgress(total > 0 ? loaded / total : 0)
    request.onload = () => {
      if (request.status === routes.uploadDrawing.status && request.response !== null)
        resolve(request.response as DrawingRead)
      else reject(refusalOf(request.status, request.response))
    }
    request.onerror = () => reject(new NetworkError())
    request.onabort = () => reject(new DOMException('The upload was stopped.', 'AbortError'))
    signal.addEventListener('abort', () => request.abort(), { once: true })
    const form = new FormData()
    form.set(upload, file, file.name)
    request.send(form)
  })
}
