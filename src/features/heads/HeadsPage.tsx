import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import { Link } from 'react-router-dom'
import type { Head } from '../../../shared/api/heads.ts'
import { formatAngle, formatLength } from '../../../shared/units/format.ts'
import { headsQuery } from '../../api/heads.ts'
import { useMay } from '../../app/current-user.tsx'
import { useListParams } from '../../app/list-params.ts'
import { Page, PageBody, PageHead } from '../../app/Page.tsx'
import { useUnit } from '../../app/preferences.ts'
import { Button } from '../../ui/Button.tsx'
import { DataTable, type Column } from '../../ui/DataTable.tsx'
import { headKindWords } from '../../ui/heads.ts'
import { Notice } from '../../ui/Notice.tsx'
import { formatInstant } from '../../ui/when.ts'
import { HeadDialog } from './HeadDialog.tsx'
import { WorkingLimitDialog } from './WorkingLimitDialog.tsx'

type Open = { kind: 'add' } | { kind: 'edit' | 'limit'; head: Head } | null

/** Heads with their two limits: what the machine can do, and what an engineer lets it do. */
export default function HeadsPage() {
  const list = useListParams([])
  const query = useQuery(headsQuery({ page: list.page, pageSize: 50 }))
  const [open, setOpen] = useState<Open>(null)
  const mayAdd = useMay('createHead')
  const add = (
    <Button look="main" onClick={() => setOpen({ kind: 'add' })}>
      Add a head
    </Button>
  )
  const close = () => setOpen(null)
  return (
    <Page>
      <PageHead
        title="Heads and limits"
        cells={[{ label: 'Count', value: query.data?.total ?? '–' }]}
        actions={mayAdd ? add : undefined}
      />
      <PageBody>
        <DataTable
          caption="Heads"
          columns={useColumns(setOpen)}
          query={query}
          keyOf={(head) => head.id}
          list={list}
          empty={
            <>
              <p>No head yet. A set-up needs one: its limits say what can be cut.</p>
              {mayAdd ? add : <p className="text-muted">An engineer or an administrator adds it.</p>}
            </>
          }
        />
        <Notice title="Two limits">
          The mechanical limit is the maker&apos;s: no set-up may pass it. The working limit is the
          shop&apos;s: an engineer sets it, with a reason, from what test cuts showed. A set-up keeps the
          limits that stood when it was saved.
        </Notice>
      </PageBody>
      {open?.kind === 'add' && <HeadDialog head={null} onClose={close} />}
      {open?.kind === 'edit' && <HeadDialog head={open.head} onClose={close} />}
      {open?.kind === 'limit' && <WorkingLimitDialog head={open.head} onClose={close} />}
    </Page>
  )
}

function useColumns(setOpen: (open: Open) => void): Column<Head>[] {
  const unit = useUnit()
  const mayEdit = useMay('updateHead')
  const mayLimit = useMay('setWorkingLimit')
  const mayRecord = useMay('listAudit')
  return [
    {
      key: 'name',
      head: 'Head',
      lead: true,
      cell: ({ name, kind }) => (
        <>
          <span className="font-bold">{name}</span>
          <span className="block text-small text-muted">{headKindWords[kind]}</span>
        </>
      ),
    },
    {
      key: 'mechanical',
      head: 'Mechanical limit',
      figures: true,
      cell: ({ mechanicalLimit }) => formatAngle(mechanicalLimit),
    },
    {
      key: 'working',
      head: 'Working limit',
      figures: true,
      cell: ({ workingLimit }) => (
        <span className="font-bold">{workingLimit === null ? 'not set' : formatAngle(workingLimit)}</span>
      ),
    },
    {
      key: 'set',
      head: 'Set by',
      cell: ({ workingLimitSet }) =>
        workingLimitSet === null ? (
          '–'
        ) : (
          <>
            {workingLimitSet.by.name}, {formatInstant(workingLimitSet.at)}
            <span className="block text-small text-muted">{workingLimitSet.reason}</span>
          </>
        ),
    },
    {
      key: 'jet',
      head: 'Jet to start with',
      cell: ({ jet }) => (
        <span className="text-small">
          kerf {formatLength(jet.kerf, unit)}, taper {formatAngle(jet.taper)}, stand-off{' '}
          {formatLength(jet.standoff, unit)}, nozzle ⌀ {formatLength(jet.nozzleDiameter, unit)}
        </span>
      ),
    },
    {
      key: 'acts',
      head: 'Change',
      lead: true,
      cell: (head) => (
        <span className="flex flex-wrap gap-2">
          {mayLimit && <Button onClick={() => setOpen({ kind: 'limit', head })}>Set working limit</Button>}
          {mayEdit && (
            <Button onClick={() => setOpen({ kind: 'edit', head })} aria-label={`Edit ${head.name}`}>
              Edit
            </Button>
          )}
          {mayRecord && (
            <Link to={`/record?subjectId=${head.id}`} className="underline self-center min-h-6">
              History
            </Link>
          )}
        </span>
      ),
    },
  ]
}
