/** Shown while a page or the session is being read; silent for the first moments so that it does not flicker. */
export function Loading() {
  return (
    <p role="status" className="p-6 text-muted appear-late">
      Reading…
    </p>
  )
}
