/** The path after signing in: inside this application only, whatever the address says. */
export function returnPath(wanted: unknown): string {
  const isInside = typeof wanted === 'string' && /^\/(?![/\\])/.test(wanted) && !wanted.startsWith('/sign-in')
  return isInside ? wanted : '/projects'
}
