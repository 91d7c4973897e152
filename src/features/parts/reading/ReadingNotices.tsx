import type { Notice } from '../../../../shared/drawing/schema.ts'
import { Balloon } from '../../../ui/Balloon.tsx'

interface ReadingNoticesProps {
  readonly notices: readonly Notice[]
  /** The notice whose places the picture shows. */
  readonly at: number | null
  readonly onAt: (index: number | null) => void
}

const words = { error: 'to mend', warning: 'look at this', note: 'good to know' } as const

/** Margin notes: their numbers stand in the picture where they apply. */
export function ReadingNotices({ notices, at, onAt }: ReadingNoticesProps) {
  if (notices.length === 0) return <p>Everything was read, and nothing had to be changed.</p>
  return (
    <ol className="grid gap-x-8 md:grid-cols-2">
      {notices.map((notice, index) => {
        const tone = at === index ? 'select' : notice.severity === 'error' ? 'breach' : 'ink'
        const text = <NoticeText notice={notice} />
        return (
          <li key={index} className="flex gap-3 py-2 border-b border-rule">
            <Balloon tone={tone}>{index + 1}</Balloon>
            {notice.places.length === 0 ? (
              <div>{text}</div>
            ) : (
              <button
                type="button"
                aria-pressed={at === index}
                onClick={() => onAt(at === index ? null : index)}
                className="text-left cursor-pointer hover:underline"
              >
                {text}
              </button>
            )}
          </li>
        )
      })}
    </ol>
  )
}

function NoticeText({ notice }: { notice: Notice }) {
  const { severity, message, layer, entity, places } = notice
  const where = [
    entity,
    layer === undefined ? undefined : `layer ${layer}`,
    places.length > 0
      ? `${places.length} ${places.length === 1 ? 'place' : 'places'} in the picture`
      : undefined,
  ].filter((part) => part !== undefined)
  return (
    <>
      <span className={severity === 'error' ? 'text-breach' : ''}>
        <span className="text-label uppercase">{words[severity]}</span> {message}
      </span>
      {where.length > 0 && <span className="block text-small text-muted">{where.join(' · ')}</span>}
    </>
  )
}
