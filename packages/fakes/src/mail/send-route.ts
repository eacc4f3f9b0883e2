import { Router, json, type ErrorRequestHandler } from 'express'
import { whatIsWrong, type FieldError } from './check'
import { eventsOf, meetFate, type MailEvent, type Suppressed } from './events'
import { recipientsOf, toKept, type KeptMail, type SendBody } from './message'

const LARGEST = '30mb'
const MOST_KEPT = 2_000

export interface Mailbox {
  messages: KeptMail[]
  suppressed: Suppressed
  /** How many requests were accepted so far; ids are made of it. */
  accepted: number
}

/** The address that mail is sent through. */
export function sendRoute(given: {
  mailbox: Mailbox
  apiKey: string
  now: () => Date
  failures: number[]
  tell: (events: MailEvent[]) => void
  onChange: () => void
}): Router {
  const { mailbox, apiKey, now, failures, tell, onChange } = given
  const router = Router()
  router.post('/v3/mail/send', (request, response, next) => {
    const failure = failures.shift()
    if (failure) return void response.status(failure).json(refusal('Asked to fail.'))
    if (request.get('authorization') === `Bearer ${apiKey}`) return next()
    const message = 'The provided authorization grant is invalid, expired, or revoked'
    response.status(401).json(refusal(message))
  })
  router.post('/v3/mail/send', json({ limit: LARGEST }), (request, response) => {
    // Whatever it is, it is looked at as a request to send and refused field by field.
    const body = Object(request.body) as SendBody
    const errors = whatIsWrong(body)
    if (errors.length > 0) return void response.status(400).json({ errors })
    const { id, events } = accept(mailbox, body, now())
    onChange()
    response.status(202).set('x-message-id', id).end()
    tell(events)
  })
  router.use('/v3/mail/send', refuseUnreadable)
  router.use('/v3', (_request, response) => void response.status(404).json(refusal('Not Found')))
  return router
}

/** Keeps a message for each of its recipients, and says what is told of them. */
function accept(mailbox: Mailbox, body: SendBody, at: Date): { id: string; events: MailEvent[] } {
  mailbox.accepted += 1
  const id = `mail-${mailbox.accepted.toString(36).padStart(8, '0')}`
  const events = recipientsOf(body).flatMap(({ to, subject }, index) => {
    const own = index === 0 ? id : `${id}-${index}`
    const { fate, reason } = meetFate(mailbox.suppressed, to)
    mailbox.messages.push(toKept(body, { id: own, to, subject, fate, at: at.toISOString() }))
    const timestamp = Math.floor(at.getTime() / 1000)
    return eventsOf({ id: own, email: to, fate, reason, timestamp })
  })
  mailbox.messages.splice(0, Math.max(0, mailbox.messages.length - MOST_KEPT))
  return { id, events }
}

/** A body that is no JSON, or is too large, as its parser says. */
const refuseUnreadable: ErrorRequestHandler = (error, _request, response, _next) => {
  const { status } = Object(error) as { status?: unknown }
  const isTooLarge = status === 413
  response.status(isTooLarge ? 413 : 400).json(refusal(isTooLarge ? 'Too large' : 'Bad Request'))
}

const refusal = (message: string): { errors: FieldError[] } => ({
  errors: [{ message, field: null, help: null }],
})
