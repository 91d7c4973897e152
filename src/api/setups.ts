import { keepPreviousData, mutationOptions, queryOptions, type QueryClient } from '@tanstack/react-query'
import type { Setup } from '../../shared/api/setups.ts'
import { call, urlOf, type Arguments, type Body } from './client.ts'

export type SetupsFilter = NonNullable<Arguments<'listSetups'>['query']>

const key = ['setups'] as const

export const setupsQuery = (query: SetupsFilter) =>
  queryOptions({
    queryKey: [...key, 'list', query],
    queryFn: ({ signal }) => call('listSetups', { query, signal }),
    placeholderData: keepPreviousData,
  })

export const setupQuery = (id: string) =>
  queryOptions({
    queryKey: [...key, 'one', id],
    queryFn: ({ signal }) => call('getSetup', { params: { id }, signal }),
  })

export const revisionsQuery = (id: string) =>
  queryOptions({
    queryKey: [...key, 'one', id, 'revisions'],
    queryFn: ({ signal }) => call('listRevisions', { params: { id }, signal }),
  })

/** A revision's content never changes; its state may. */
export const revisionQuery = (id: string, revision: number) =>
  queryOptions({
    queryKey: [...key, 'one', id, 'revisions', revision],
    queryFn: ({ signal }) => call('getRevision', { params: { id, revision }, signal }),
  })

/** The server's own evaluation of a revision: what an approval goes by. */
export const revisionEvaluationQuery = (id: string, revision: number) =>
  queryOptions({
    queryKey: ['revision-evaluation', id, revision],
    queryFn: ({ signal }) => call('revisionEvaluation', { params: { id, revision }, signal }),
    staleTime: Infinity,
  })

/** Puts the answer in its place and has every list and the revisions read again. */
async function keep(client: QueryClient, setup: Setup): Promise<void> {
  const one = setupQuery(setup.id).queryKey
  client.setQueryData(one, setup)
  await Promise.all([
    client.invalidateQueries({ queryKey: [...key, 'list'] }),
    client.invalidateQueries({ queryKey: revisionsQuery(setup.id).queryKey }),
    client.invalidateQueries({ queryKey: ['parts', 'list'] }),
  ])
}

export const createSetupMutation = (client: QueryClient) =>
  mutationOptions({
    mutationFn: (body: Body<'createSetup'>) => call('createSetup', { body }),
    onSuccess: (setup) => keep(client, setup),
  })

type Write = 'saveSetup' | 'submitSetup' | 'approveSetup' | 'returnSetup'

/** A write to a set-up: its id, its body, and as `ifMatch` the version that the person saw. */
export type WriteOf<N extends Write> = { id: string; body: Body<N>; ifMatch: number }

export const saveSetupMutation = (client: QueryClient) =>
  mutationOptions({
    mutationFn: ({ id, ...given }: WriteOf<'saveSetup'>) => call('saveSetup', { params: { id }, ...given }),
    onSuccess: (setup) => keep(client, setup),
  })

export const submitSetupMutation = (client: QueryClient) =>
  mutationOptions({
    mutationFn: ({ id, ...given }: WriteOf<'submitSetup'>) =>
      call('submitSetup', { params: { id }, ...given }),
    onSuccess: (setup) => keep(client, setup),
  })

export const approveSetupMutation = (client: QueryClient) =>
  mutationOptions({
    mutationFn: ({ id, ...given }: WriteOf<'approveSetup'>) =>
      call('approveSetup', { params: { id }, ...given }),
    onSuccess: (setup) => keep(client, setup),
  })

export const returnSetupMutation = (client: QueryClient) =>
  mutationOptions({
    mutationFn: ({ id, ...given }: WriteOf<'returnSetup'>) =>
      call('returnSetup', { params: { id }, ...given }),
    onSuccess: (setup) => keep(client, setup),
  })

export const contoursUrl = (id: string, revision: number) =>
  urlOf('revisionContours', { params: { id, revision } })

export const edgesUrl = (id: string, revision: number) => urlOf('revisionEdges', { params: { id, revision } })
