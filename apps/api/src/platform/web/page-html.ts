/** What a page's HTML carries for readers that run no script, and for the first picture. */
export interface PageHead {
  title: string
  description: string
  /** A schema.org description, as JSON-LD. */
  structured?: object | object[]
  /** The page's own data, so that the first picture needs no second request. */
  data?: { key: string; answer: unknown }
  isIndexed: boolean
}

/** Fills the markers of the built index.html. Every value is escaped for where it stands. */
export function fillPage(
  template: string,
  { head, nonce }: { head: PageHead; nonce: string },
): string {
  const title = escapeHtml(head.title)
  const description = escapeHtml(head.description)
  const lines = [
    `<title>${title}</title>`,
    `<meta name="description" content="${description}">`,
    `<meta property="og:title" content="${title}">`,
    `<meta property="og:description" content="${description}">`,
    ...(head.isIndexed ? [] : ['<meta name="robots" content="noindex">']),
    ...(head.structured
      ? [
          `<script type="application/ld+json" nonce="${nonce}">${inScript(head.structured)}</script>`,
        ]
      : []),
    ...(head.data
      ? [
          `<script type="application/json" id="page-data" nonce="${nonce}">` +
            `${inScript(head.data)}</script>`,
        ]
      : []),
  ]
  return template
    .replace(/<title>[^<]*<\/title>/, '')
    .replace('<!--head-->', () => lines.join('\n    '))
    .replaceAll('__CSP_NONCE__', nonce)
}

/** JSON that cannot end the script element it stands in. */
export function inScript(value: unknown): string {
  return JSON.stringify(value)
    .replaceAll('<', '\\u003c')
    .replaceAll('\u2028', '\\u2028')
    .replaceAll('\u2029', '\\u2029')
}

/** Text as it may stand in HTML, in an attribute as well. */
export function escapeHtml(text: string): string {
  return text
    .replaceAll('&', '&amp;')
    .replaceAll('<', '&lt;')
    .replaceAll('>', '&gt;')
    .replaceAll('"', '&quot;')
    .replaceAll("'", '&#39;')
}
