import type { SendBody } from './message'

export interface FieldError {
  message: string
  field: string | null
  help: null
}

const EMAIL = /^[^\s@]+@[^\s@]+\.[^\s@]+$/
const BASE64 = /^[A-Za-z0-9+/]+={0,2}$/
/** The one parameter that a type may carry; any other `;` is refused. */
const CALENDAR_TYPE = /^text\/calendar; ?method=[A-Z]+$/
const MOST_RECIPIENTS = 1_000

/** Everything that is wrong with a request to send; an empty list for one that is right. */
export function whatIsWrong(body: SendBody): FieldError[] {
  return [...whomItIsFor(body), ...whomItIsFrom(body), ...whatItSays(body), ...whatIsAttached(body)]
}

const wrong = (field: string, message: string): FieldError => ({ message, field, help: null })
const isEmail = (value: unknown) => typeof value === 'string' && EMAIL.test(value)
const isFilled = (value: unknown) => typeof value === 'string' && value !== ''

function whomItIsFor({ personalizations = [] }: SendBody): FieldError[] {
  if (personalizations.length === 0) {
    return [wrong('personalizations', 'At least one personalization is required.')]
  }
  const all = personalizations.flatMap(({ to = [], cc = [], bcc = [] }) => [...to, ...cc, ...bcc])
  if (all.length > MOST_RECIPIENTS) {
    return [wrong('personalizations', `A request is for ${MOST_RECIPIENTS} recipients at most.`)]
  }
  return personalizations.flatMap((one, index) => {
    const field = `personalizations.${index}`
    if (!one.to?.length) return [wrong(`${field}.to`, 'The to array is required.')]
    const addresses = [...one.to, ...(one.cc ?? []), ...(one.bcc ?? [])]
    const emails = addresses.map(({ email }) => String(email).toLowerCase())
    const invalid = (['to', 'cc', 'bcc'] as const).flatMap((kind) =>
      (one[kind] ?? []).flatMap(({ email }, place) =>
        isEmail(email)
          ? []
          : [wrong(`${field}.${kind}.${place}.email`, 'Does not contain a valid address.')],
      ),
    )
    return new Set(emails).size === emails.length
      ? invalid
      : [...invalid, wrong(field, 'Each address should be unique between to, cc, and bcc.')]
  })
}

function whomItIsFrom({ from }: SendBody): FieldError[] {
  return isEmail(from?.email)
    ? []
    : [wrong('from.email', 'The from object must have a valid address.')]
}

function whatItSays({ subject, personalizations = [], content = [] }: SendBody): FieldError[] {
  const hasSubject = personalizations.every((one) => isFilled(one.subject ?? subject))
  const types = content.map(({ type }) => type)
  const html = types.indexOf('text/html')
  return [
    ...(hasSubject ? [] : [wrong('subject', 'The subject is required.')]),
    ...(content.length > 0 ? [] : [wrong('content', 'A content block is required.')]),
    ...content.flatMap(({ type, value }, index) => [
      ...(isFilled(value) ? [] : [wrong(`content.${index}.value`, 'The content value is empty.')]),
      ...(isType(type) ? [] : [wrong(`content.${index}.type`, NOT_A_TYPE)]),
    ]),
    ...(html >= 0 && html < types.indexOf('text/plain')
      ? [wrong('content', 'text/plain comes first, then text/html, then anything else.')]
      : []),
  ]
}

const NOT_A_TYPE = "The type cannot contain ';', or CRLF characters."

const isType = (type: unknown) =>
  typeof type === 'string' && (/^[^;,\r\n]+$/.test(type) || CALENDAR_TYPE.test(type))

function whatIsAttached({ attachments = [] }: SendBody): FieldError[] {
  return attachments.flatMap(({ filename, type, content }, index) => {
    const field = `attachments.${index}`
    const isContent = typeof content === 'string' && BASE64.test(content)
    return [
      ...(isContent ? [] : [wrong(`${field}.content`, 'The content must be base64 encoded.')]),
      ...(isFilled(filename) ? [] : [wrong(`${field}.filename`, 'The filename is required.')]),
      ...(type === undefined || isType(type) ? [] : [wrong(`${field}.type`, NOT_A_TYPE)]),
    ]
  })
}
