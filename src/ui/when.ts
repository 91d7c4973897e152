/** Dates and waits as people say them; times in the reader's own zone. */

const day = new Intl.DateTimeFormat('en-GB', { day: '2-digit', month: 'short', year: 'numeric' })
const clock = new Intl.DateTimeFormat('en-GB', { hour: '2-digit', minute: '2-digit' })

export function formatInstant(iso: string): string {
  const at = new Date(iso)
  return `${day.format(at)}, ${clock.format(at)}`
}

/** How long ago, in the largest unit that fits: `3 h`, `2 days`. */
export function formatWait(fromIso: string, now: Date): string {
  const minutes = Math.max(0, Math.floor((now.getTime() - new Date(fromIso).getTime()) / 60_000))
  if (minutes < 1) return 'under a minute'
  if (minutes < 60) return `${minutes} min`
  const hours = Math.floor(minutes / 60)
  if (hours < 48) return `${hours} h`
  return `${Math.floor(hours / 24)} days`
}
