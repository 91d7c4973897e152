const HOME = '/parts'

/** Where to go after signing in: a place within the product only, whatever the link says. */
export function placeAfterSignIn(next: string | null): string {
  if (next === null || !/^\/(?![/\\])/.test(next) || next.startsWith('/sign-in')) return HOME
  return next
}
