import { keepPreviousData, mutationOptions, queryOptions, type QueryClient } from '@tanstack/react-query'
import { call, type Arguments, type Body } from './client.ts'

export type PeopleFilter = NonNullable<Arguments<'listUsers'>['query']>

const key = ['people'] as const

export const peopleQuery = (query: PeopleFilter) =>
  queryOptions({
    queryKey: [...key, 'list', query],
    queryFn: ({ signal }) => call('listUsers', { query, signal }),
    placeholderData: keepPreviousData,
  })

export const createPersonMutation = (client: QueryClient) =>
  mutationOptions({
    mutationFn: (body: Body<'createUser'>) => call('createUser', { body }),
    onSuccess: () => client.invalidateQueries({ queryKey: key }),
  })

export const updatePersonMutation = (client: QueryClient) =>
  mutationOptions({
    mutationFn: ({ id, ...given }: { id: string; body: Body<'updateUser'>; ifMatch: number }) =>
      call('updateUser', { params: { id }, ...given }),
    onSuccess: () => client.invalidateQueries({ queryKey: key }),
  })
