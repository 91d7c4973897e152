import type * as z from 'zod'

/** One route of the API; who may call it stands in `policy.ts`. */
export interface Route {
  readonly method: 'get' | 'post' | 'put' | 'patch' | 'delete'
  readonly path: string
  readonly summary: string
  readonly params?: z.ZodType
  readonly query?: z.ZodType
  readonly body?: z.ZodType
  /** A multipart upload with one file in this field instead of a JSON body. */
  readonly upload?: string
  /** The write needs `If-Match` with the row's version: 428 without, 412 when stale. */
  readonly ifMatch?: true
  readonly status: 200 | 201 | 204
  /** JSON answer, or the media type of a download. */
  readonly answer?: z.ZodType | string
}
