import { mutationOptions, queryOptions, type QueryClient } from '@tanstack/react-query'
import type { Head } from '../../shared/api/heads.ts'
import { call, type Arguments, type Body } from './client.ts'

export type HeadsFilter = NonNullable<Arguments<'listHeads'>['query']>

const key = ['heads'] as const

export const headsQuery = (query: HeadsFilter = {}) =>
  queryOptions({
    queryKey: [...key, 'list', query],
    queryFn: ({ signal }) => call('listHeads', { query, signal }),
    staleTime: 60_000,
  })

export const headQuery = (id: string) =>
  queryOptions({
    queryKey: [...key, 'one', id],
    queryFn: ({ signal }) => call('getHead', { params: { id }, signal }),
    staleTime: 60_000,
  })

async function keep(client: QueryClient, head: Head): Promise<void> {
  client.setQueryData(headQuery(head.id).queryKey, head)
  await client.invalidateQueries({ queryKey: [...key, 'list'] })
}

export const createHeadMutation = (client: QueryClient) =>
  mutationOptions({
    mutationFn: (body: Body<'createHead'>) => call('createHead', { body }),
    onSuccess: (head) => keep(client, head),
  })

export const updateHeadMutation = (client: QueryClient) =>
  mutationOptions({
    mutationFn: ({ id, ...given }: { id: string; body: Body<'updateHead'>; ifMatch: number }) =>
      call('updateHead', { params: { id }, ...given }),
    onSuccess: (head) => keep(client, head),
  })

export const setWorkingLimitMutation = (client: QueryClient) =>
  mutationOptions({
    mutationFn: ({ id, ...given }: { id: string; body: Body<'setWorkingLimit'>; ifMatch: number }) =>
      call('setWorkingLimit', { params: { id }, ...given }),
    onSuccess: (head) => keep(client, head),
  })
