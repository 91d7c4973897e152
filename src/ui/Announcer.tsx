import { useAnnouncement } from './announce.ts'

/** The one polite live region; the shell mounts it once. */
export function Announcer() {
  const { text, turn } = useAnnouncement()
  return (
    <div aria-live="polite" className="sr-only">
      <p key={turn}>{text}</p>
    </div>
  )
}
