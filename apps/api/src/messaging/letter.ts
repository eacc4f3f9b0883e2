import { escapeHtml } from '../platform/web/page-html'

/** A mail in words: what every template gives, and both forms are made of. */
export interface Letter {
  subject: string
  /** Over the text: the academy's name, or Marram. */
  heading: string
  greeting: string
  paragraphs: string[]
  /** A small table: "When", "Thu 17 Sep, 18:00–19:15". */
  facts?: [label: string, value: string][]
  action?: { label: string; url: string }
  /** Small print under the line. */
  footer: string
  accent: string
}

export function letterAsText(letter: Letter): string {
  const facts = (letter.facts ?? []).map(([label, value]) => `${label}: ${value}`)
  const action = letter.action ? [`${letter.action.label}:\n${letter.action.url}`] : []
  return [
    letter.heading,
    letter.greeting,
    ...letter.paragraphs,
    ...(facts.length > 0 ? [facts.join('\n')] : []),
    ...action,
    `--\n${letter.footer}`,
  ].join('\n\n')
}

const SANS = "'Sofia Sans', system-ui, -apple-system, 'Segoe UI', sans-serif"
const SERIF = "Besley, Georgia, 'Times New Roman', serif"

/** Mail programs know tables and inline styles only; the colours are those of the paper and ink. */
export function letterAsHtml(letter: Letter): string {
  const paragraph = (text: string) =>
    `<p style="margin:0 0 16px;font:17px/24px ${SANS};color:#13241b">${escapeHtml(text)}</p>`
  const fact = ([label, value]: [string, string]) =>
    `<tr><td style="padding:8px 12px 8px 0;border-bottom:1px solid #cdc2a6;font:16px/22px ${SANS};` +
    `color:#46534a;vertical-align:top;white-space:nowrap">${escapeHtml(label)}</td>` +
    `<td style="padding:8px 0;border-bottom:1px solid #cdc2a6;font:16px/22px ${SANS};` +
    `color:#13241b">${escapeHtml(value)}</td></tr>`
  const facts = letter.facts?.length
    ? `<table role="presentation" width="100%" cellspacing="0" style="border-collapse:collapse;` +
      `border-top:2px solid #13241b;margin:0 0 20px">${letter.facts.map(fact).join('')}</table>`
    : ''
  const action = letter.action
    ? `<p style="margin:0 0 20px"><a href="${escapeHtml(letter.action.url)}" style="display:inline-block;` +
      `padding:12px 20px;background:#f2c01d;border:2px solid #13241b;border-radius:2px;` +
      `font:700 17px/22px ${SANS};color:#13241b;text-decoration:none">` +
      `${escapeHtml(letter.action.label)}</a></p>`
    : ''
  return (
    `<!doctype html><html lang="en"><head><meta charset="utf-8">` +
    `<meta name="viewport" content="width=device-width"><title>${escapeHtml(letter.subject)}</title>` +
    `</head><body style="margin:0;padding:24px 12px;background:#f1e9d6">` +
    `<table role="presentation" width="100%" cellspacing="0"><tr><td align="center">` +
    `<table role="presentation" width="100%" cellspacing="0" style="max-width:560px;` +
    `background:#fbf7ec;border:2px solid #13241b;border-top:8px solid ${escapeHtml(letter.accent)}">` +
    `<tr><td style="padding:24px 28px 8px">` +
    `<h1 style="margin:0 0 20px;font:600 24px/30px ${SERIF};color:${escapeHtml(letter.accent)}">` +
    `${escapeHtml(letter.heading)}</h1>${paragraph(letter.greeting)}` +
    `${letter.paragraphs.map(paragraph).join('')}${facts}${action}` +
    `<p style="margin:0 0 16px;padding-top:12px;border-top:1px solid #cdc2a6;font:14px/20px ${SANS};` +
    `color:#46534a">${escapeHtml(letter.footer)}</p></td></tr></table></td></tr></table></body></html>`
  )
}
