import { z } from 'zod'

/** What takes no room, or turns the words around it: a name made of it reads as another's. */
const UNSEEN =
  /[\u00ad\u061c\u115f\u1160\u180e\u200b\u200e\u200f\u202a-\u202e\u2060-\u2069\u2800\u3164\ufeff\ufff9-\ufffb\u{1d173}-\u{1d17a}\u{e0000}-\u{e007f}]/u
const SEEN = /[\p{L}\p{N}\p{P}\p{S}]/u

/** One line of text: trimmed, 1 to `max` characters that can be seen (no CR, LF, NUL …). */
export const line = (max: number) =>
  z
    .string()
    .trim()
    .min(1, 'Please fill this in.')
    .max(max, `This is longer than ${max} characters.`)
    .regex(/^[^\p{Cc}\p{Cs}\u2028\u2029]*$/u, 'This holds a character that cannot be shown.')
    .refine((text) => !UNSEEN.test(text), 'This holds a character that cannot be seen.')
    .refine((text) => text === '' || SEEN.test(text), 'Please fill this in.')

/** Several lines of text; line breaks stay, other control characters are refused. */
export const prose = (max: number) =>
  z
    .string()
    .trim()
    .max(max, `This is longer than ${max} characters.`)
    .regex(
      /^[^\p{Cs}\u0000-\u0008\u000b-\u001f\u007f]*$/u,
      'This holds a character that cannot be shown.',
    )
    .refine((text) => !UNSEEN.test(text), 'This holds a character that cannot be seen.')

export const id = z.uuid('This is not one of our numbers.')
const SLUG = /^[a-z0-9]+(-[a-z0-9]+)*$/

/** Whether a text is written as the address of an academy or a clinic is. */
export const isSlug = (text: string): boolean => SLUG.test(text)
export const slug = z
  .string()
  .regex(SLUG, 'Small letters, figures and single hyphens only.')
  .min(2)
  .max(60)
export const email = z
  .string()
  .trim()
  .toLowerCase()
  .max(254)
  .pipe(z.email('This address is missing something, like the ending .com or .ie.'))
export const password = z
  .string()
  .min(12, 'Twelve characters or more.')
  .max(200, 'This is longer than 200 characters.')
export const secret = z.string().regex(/^[A-Za-z0-9_-]{43}$/, 'This link is not whole.')

/** A calendar day without a zone, `2026-04-06`. */
export const localDate = z.iso
  .date('Please write a day, like 2026-04-06.')
  .refine((day) => day >= '1900' && day < '2200', 'Please write a day from 1900 to 2199.')
/** A wall-clock time, `18:00`. */
export const localTime = z
  .string()
  .regex(/^([01]\d|2[0-3]):[0-5]\d$/, 'Please write a time, like 18:00.')
/** An instant, ISO 8601 in UTC. */
export const instant = z.iso.datetime()
export const amountMinor = z.int().min(0).max(99_999_999)
export const signedMinor = z.int()
export const zone = z
  .string()
  .max(60)
  .refine(isZone, 'This is not a time zone we know, like Europe/Dublin.')
/** None of three decimals: cards take those in steps of ten only. */
export const currency = z.enum(['EUR', 'USD', 'GBP', 'CAD', 'AUD', 'NZD', 'JPY'])
export const colour = z.string().regex(/^#[0-9a-f]{6}$/, 'A colour looks like #1d5470.')
export const phone = z
  .string()
  .trim()
  .regex(/^\+?[0-9 ()./-]{5,24}$/, 'A telephone number has figures, spaces and perhaps a +.')

function isZone(name: string): boolean {
  try {
    // Written as the list of zones writes it: a calendar knows no other way.
    const { timeZone } = new Intl.DateTimeFormat('en', { timeZone: name }).resolvedOptions()
    return timeZone === name && name.includes('/')
  } catch {
    return false
  }
}
