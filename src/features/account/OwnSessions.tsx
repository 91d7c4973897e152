import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query'
import { endSessionMutation, ownSessionsQuery } from '../../api/session.ts'
import { announce } from '../../ui/announce.ts'
import { Button } from '../../ui/Button.tsx'
import { ErrorNotice } from '../../ui/Notice.tsx'
import { formatInstant } from '../../ui/when.ts'
import { deviceInWords } from './device.ts'

export function OwnSessions() {
  const query = useQuery(ownSessionsQuery)
  const end = useMutation(endSessionMutation(useQueryClient()))
  if (query.error !== null)
    return (
      <ErrorNotice
        error={query.error}
        actions={<Button onClick={() => void query.refetch()}>Try again</Button>}
      />
    )
  if (query.data === undefined) return <p role="status">Reading…</p>
  return (
    <>
      {end.isError && <ErrorNotice error={end.error} />}
      <ul>
        {query.data.items.map((session) => (
          <li
            key={session.id}
            className="flex flex-wrap items-center justify-between gap-x-4 gap-y-1 py-2 border-b border-rule"
          >
            <div>
              <p className="font-medium" title={session.userAgent}>
                {deviceInWords(session.userAgent)}
                {session.current && ' (this one)'}
              </p>
              <p className="text-small text-muted">
                Since {formatInstant(session.createdAt)}, ends {formatInstant(session.expiresAt)}
              </p>
            </div>
            {!session.current && (
              <Button
                look="breach"
                busy={end.isPending && end.variables === session.id && 'Ending…'}
                onClick={() => end.mutate(session.id, { onSuccess: () => announce('Session ended') })}
              >
                End it
              </Button>
            )}
          </li>
        ))}
      </ul>
      <p className="text-small text-muted">End what you do not know, then change your password.</p>
    </>
  )
}
