export interface OutgoingMail {
  to: string
  /** The academy's name, or Marram, in front of our address. */
  fromName: string
  subject: string
  text: string
  html: string
  calendar?: { method: 'REQUEST' | 'CANCEL'; text: string }
}

/** What Marram asks of a mail provider. */
export interface MailProvider {
  /** Resolves to the provider's number of the message. */
  send(mail: OutgoingMail): Promise<string>
}
