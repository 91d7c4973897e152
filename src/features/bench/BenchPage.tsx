import { useSuspenseQuery } from '@tanstack/react-query'
import { useParams, useSearchParams } from 'react-router-dom'
import type { Setup } from '../../../shared/api/setups.ts'
import { headsQuery } from '../../api/heads.ts'
import { revisionQuery, setupQuery } from '../../api/setups.ts'
import { Bench } from './Bench.tsx'
import { readRevision } from './model/link.ts'

/** The bench of one set-up: its newest revision to work on, or an older one to look at. */
export default function BenchPage() {
  const { id = '' } = useParams()
  const [search] = useSearchParams()
  const { data: setup } = useSuspenseQuery(setupQuery(id))
  const asked = readRevision(search.get('rev'))
  if (asked !== null && asked !== setup.revision.number) return <Older setup={setup} revision={asked} />
  return <Ready key={setup.id} setup={setup} />
}

function Older({ setup, revision }: { setup: Setup; revision: number }) {
  const { data } = useSuspenseQuery(revisionQuery(setup.id, revision))
  return <Ready key={`${setup.id} ${revision}`} setup={{ ...setup, revision: data }} newest={setup} />
}

function Ready({ setup, newest }: { setup: Setup; newest?: Setup }) {
  const { data: heads } = useSuspenseQuery(headsQuery({ pageSize: 100 }))
  return <Bench setup={setup} heads={heads.items} newest={newest ?? null} />
}
