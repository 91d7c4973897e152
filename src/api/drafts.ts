import { queryOptions } from '@tanstack/react-query'
import { call, type Body } from './client.ts'

/** One's own unsaved changes on the server: read once when the bench opens, written while a person types. */
export const draftQuery = (id: string) =>
  queryOptions({
    queryKey: ['draft', id],
    queryFn: ({ signal }) => call('getDraft', { params: { id }, signal }),
    gcTime: 0,
    staleTime: 0,
  })

export const keepDraftOnServer = (id: string, body: Body<'keepDraft'>, signal: AbortSignal) =>
  call('keepDraft', { params: { id }, body, signal })

export const dropDraftOnServer = (id: string) => call('dropDraft', { params: { id } })
