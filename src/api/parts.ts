import { keepPreviousData, mutationOptions, queryOptions, type QueryClient } from '@tanstack/react-query'
import type { Part } from '../../shared/api/parts.ts'
import { call, urlOf, type Arguments, type Body } from './client.ts'

export type PartsFilter = NonNullable<Arguments<'listParts'>['query']>

const key = ['parts'] as const

export const partsQuery = (query: PartsFilter) =>
  queryOptions({
    queryKey: [...key, 'list', query],
    queryFn: ({ signal }) => call('listParts', { query, signal }),
    placeholderData: keepPreviousData,
  })

export const partQuery = (id: string) =>
  queryOptions({
    queryKey: [...key, 'one', id],
    queryFn: ({ signal }) => call('getPart', { params: { id }, signal }),
  })

async function keep(client: QueryClient, part: Part): Promise<void> {
  client.setQueryData(partQuery(part.id).queryKey, part)
  await client.invalidateQueries({ queryKey: [...key, 'list'] })
}

export const createPartMutation = (client: QueryClient) =>
  mutationOptions({
    mutationFn: (body: Body<'createPart'>) => call('createPart', { body }),
    onSuccess: (part) => keep(client, part),
  })

export const updatePartMutation = (client: QueryClient) =>
  mutationOptions({
    mutationFn: ({ id, ...given }: { id: string; body: Body<'updatePart'>; ifMatch: number }) =>
      call('updatePart', { params: { id }, ...given }),
    onSuccess: (part) => keep(client, part),
  })

/** The drawing as it was uploaded. */
export const drawingFileUrl = (id: string) => urlOf('drawingFile', { params: { id } })
