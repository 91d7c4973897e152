import { useSuspenseQuery } from '@tanstack/react-query'
import { useSearchParams } from 'react-router-dom'
import type { Revision, Setup } from '../../shared/api/setups.ts'
import { revisionQuery, setupQuery } from '../api/setups.ts'
import { revisionToShow, standingOf, type Standing } from './standing.ts'

export interface ShownRevision {
  readonly setup: Setup
  readonly revision: Revision
  readonly standing: Standing
}

/**
 * The revision that a page for the shop shows: `?rev=` in the address, else the newest approved one, else the
 * newest. Suspends; throws to the route's error boundary when there is none.
 */
export function useShownRevision(setupId: string): ShownRevision {
  const [search] = useSearchParams()
  const { data: setup } = useSuspenseQuery(setupQuery(setupId))
  const number = revisionToShow(search.get('rev'), setup)
  const isNewest = number === setup.revision.number
  // The set-up carries its newest revision: no second call for that one.
  const { data } = useSuspenseQuery({
    ...revisionQuery(setupId, number),
    initialData: isNewest ? setup.revision : undefined,
  })
  const revision = isNewest ? setup.revision : data
  return { setup, revision, standing: standingOf(revision, setup) }
}
