import { QueryClient } from '@tanstack/react-query'
import { ApiError } from './errors.ts'

const MOST_RETRIES = 2

/** A refusal will be the same a second time; a lost connection or an overloaded server may not be. */
export function shouldRetry(failures: number, error: unknown): boolean {
  if (error instanceof ApiError && error.status < 500) return false
  return failures < MOST_RETRIES
}

export function makeQueryClient(): QueryClient {
  return new QueryClient({
    defaultOptions: {
      queries: { retry: shouldRetry, refetchOnWindowFocus: true, staleTime: 10_000 },
      mutations: { retry: false, networkMode: 'always' },
    },
  })
}
