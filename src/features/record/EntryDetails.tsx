import type { AuditEntry } from '../../../shared/api/record.ts'
import { Facts, type Fact } from '../../ui/Facts.tsx'

const SHOWN_OF_HASH = 10

/** An entry's hash, shortened; opened, its details and both hashes whole. */
export function EntryDetails({ entry }: { entry: AuditEntry }) {
  const facts: Fact[] = Object.entries(entry.details).map(([key, value]) => [key, <Value value={value} />])
  return (
    <details className="max-w-md">
      <summary className="cursor-pointer min-h-6">
        <code className="text-muted">{entry.hash.slice(0, SHOWN_OF_HASH)}</code>
      </summary>
      <Facts
        facts={[
          ...facts,
          ['hash', <Hash text={entry.hash} />],
          ['hash before', <Hash text={entry.previousHash} />],
        ]}
      />
    </details>
  )
}

function Value({ value }: { value: unknown }) {
  return <span className="break-all">{typeof value === 'string' ? value : JSON.stringify(value)}</span>
}

function Hash({ text }: { text: string }) {
  return <code className="break-all text-small">{text}</code>
}
