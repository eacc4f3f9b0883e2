import { Router } from 'express'
import { mailboxPage, messagePage } from './mailbox-pages'
import type { KeptMail } from './message'

const MOST_SHOWN = 200

/** The pages where people read what was sent, with its attachments as the mail had them. */
export function mailboxRoutes(messages: readonly KeptMail[]): Router {
  const router = Router()
  const find = (id: string) => messages.find((message) => message.id === id)
  router.get('/', (request, response) => {
    const to = typeof request.query['to'] === 'string' ? request.query['to'] : ''
    const shown = messages.filter((message) => message.to.includes(to))
    response.send(mailboxPage([...shown].reverse().slice(0, MOST_SHOWN), to))
  })
  router.get('/messages/:id', (request, response) => {
    const message = find(request.params.id)
    if (!message) return void response.status(404).type('text').send('No such message.')
    response.send(messagePage(message))
  })
  router.get('/messages/:id/attachments/:index', (request, response) => {
    const part = find(request.params.id)?.attachments[Number(request.params.index)]
    if (!part) return void response.status(404).type('text').send('No such part.')
    const name = part.filename.replace(/[^\w.-]/g, '_')
    response.set('content-disposition', `attachment; filename="${name}"`)
    response.type(part.type).send(Buffer.from(part.content, 'base64'))
  })
  return router
}
