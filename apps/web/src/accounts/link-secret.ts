/** Pages that a mailed link opens; its secret is the fragment, which no server is ever sent. */
export type LinkPage = 'verify' | 'invitation'

type Kept = Pick<Storage, 'getItem' | 'setItem' | 'removeItem'>

const keyOf = (page: LinkPage): string => `marram-link-${page}`

/**
 * The secret of the link that led here. It is kept for this tab, so that it is still there after
 * signing in on the way, without ever being part of an address that a server reads.
 */
export function takeLinkSecret(
  page: LinkPage,
  { hash, kept }: { hash: string; kept: Kept } = { hash: location.hash, kept: sessionStorage },
): string {
  const written = hash.slice(1)
  if (written) kept.setItem(keyOf(page), written)
  return written || (kept.getItem(keyOf(page)) ?? '')
}

/** Used up: nobody who sits down at this tab later finds it. */
export function forgetLinkSecret(page: LinkPage, kept: Kept = sessionStorage): void {
  kept.removeItem(keyOf(page))
}
