/** What became of a message at the address it was sent to. */
export type Fate = 'delivered' | 'bounce' | 'dropped' | 'spamreport'

/** A message as one address has it; a request to several addresses keeps one for each. */
export interface KeptMail {
  id: string
  to: string
  fromEmail: string
  fromName: string
  subject: string
  text: string
  html: string
  attachments: { filename: string; type: string; content: string }[]
  fate: Fate
  at: string
}

interface Address {
  email?: unknown
  name?: unknown
}

/** The body of a request to send, as far as it is read; nothing in it is sure until checked. */
export interface SendBody {
  personalizations?: { to?: Address[]; cc?: Address[]; bcc?: Address[]; subject?: unknown }[]
  from?: Address
  subject?: unknown
  content?: { type?: unknown; value?: unknown }[]
  attachments?: { filename?: unknown; type?: unknown; content?: unknown }[]
}

const textOf = (value: unknown): string => (typeof value === 'string' ? value : '')

/** Everybody a request is for, with the subject that each of them sees. */
export function recipientsOf(body: SendBody): { to: string; subject: string }[] {
  return (body.personalizations ?? []).flatMap(({ to = [], cc = [], bcc = [], subject }) =>
    [...to, ...cc, ...bcc].map(({ email }) => ({
      to: textOf(email),
      subject: textOf(subject ?? body.subject),
    })),
  )
}

export function toKept(
  body: SendBody,
  head: Pick<KeptMail, 'id' | 'to' | 'subject' | 'fate' | 'at'>,
): KeptMail {
  const contentOf = (type: string) =>
    textOf(body.content?.find((part) => part.type === type)?.value)
  return {
    ...head,
    fromEmail: textOf(body.from?.email),
    fromName: textOf(body.from?.name),
    text: contentOf('text/plain'),
    html: contentOf('text/html'),
    attachments: (body.attachments ?? []).map(({ filename, type, content }) => ({
      filename: textOf(filename),
      type: textOf(type) || 'application/octet-stream',
      content: textOf(content),
    })),
  }
}
