import { queryOptions } from '@tanstack/react-query'
import { call, type Body } from './client.ts'

/** One's own unsaved changes on the server: read once when the bench opens, written while a person types. */
export const draftQuery = (id: string) =>
  queryOptions({
    queryKey: ['draft', id],
    queryFn: ({ signal }) => call('getDraft', { params: { id }, signal }),
    // Asked for anew by each opened bench, and only then.
    gcTime: 0,
    staleTime: Infinity,
  })

export const keepDraftOnServer = (id: string, body: Body<'keepDraft'>, signal: AbortSignal) =>
  call('keepDraft', { params: { id }, body, signal })

export const dropDraftOnServer = (id: string) => call('dropDraft', { params: { id } })
