import { mutationOptions, queryOptions, type QueryClient } from '@tanstack/react-query'
import { call, type Body } from './client.ts'
import { isCode } from './errors.ts'

export const aboutQuery = queryOptions({
  queryKey: ['about'],
  queryFn: ({ signal }) => call('about', { signal }),
  staleTime: Infinity,
})

/** The person signed in, or null. */
export const sessionQuery = queryOptions({
  queryKey: ['session'],
  queryFn: async ({ signal }) => {
    try {
      return (await call('whoAmI', { signal })).user
    } catch (error) {
      if (isCode(error, 'not-signed-in')) return null
      throw error
    }
  },
  staleTime: 60_000,
})

export const signInMutation = (client: QueryClient) =>
  mutationOptions({
    mutationFn: (body: Body<'signIn'>) => call('signIn', { body }),
    onSuccess: ({ user }) => client.setQueryData(sessionQuery.queryKey, user),
  })

/** Forgets everything that was read for the person who leaves. */
export const signOutMutation = (client: QueryClient) =>
  mutationOptions({
    mutationFn: () => call('signOut', {}),
    onSuccess: () => {
      client.setQueryData(sessionQuery.queryKey, null)
      client.removeQueries({ predicate: ({ queryKey }) => queryKey[0] !== sessionQuery.queryKey[0] })
    },
  })

export const ownSessionsQuery = queryOptions({
  queryKey: ['own-sessions'],
  queryFn: ({ signal }) => call('ownSessions', { signal }),
})

export const endSessionMutation = (client: QueryClient) =>
  mutationOptions({
    mutationFn: (id: string) => call('endSession', { params: { id } }),
    onSuccess: () => client.invalidateQueries(ownSessionsQuery),
  })

export const changePasswordMutation = (client: QueryClient) =>
  mutationOptions({
    mutationFn: (body: Body<'changePassword'>) => call('changePassword', { body }),
    onSuccess: () => client.invalidateQueries(ownSessionsQuery),
  })
