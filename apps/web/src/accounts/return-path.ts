/**
 * A path of this site to go back to after signing in; null for anything that a browser would read
 * as another site's address ("//elsewhere", "/\\elsewhere").
 */
export function returnPath(to: string | null, origin = location.origin): string | null {
  if (!to?.startsWith('/')) return null
  try {
    const url = new URL(to, origin)
    return url.origin === origin ? `${url.pathname}${url.search}${url.hash}` : null
  } catch {
    return null
  }
}
