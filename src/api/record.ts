import { keepPreviousData, queryOptions } from '@tanstack/react-query'
import { call, type Arguments } from './client.ts'

export type RecordFilter = NonNullable<Arguments<'listAudit'>['query']>

export const recordQuery = (query: RecordFilter) =>
  queryOptions({
    queryKey: ['record', query],
    queryFn: ({ signal }) => call('listAudit', { query, signal }),
    placeholderData: keepPreviousData,
  })
