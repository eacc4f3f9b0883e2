import { Router, text, type Request, type Response } from 'express'
import { readFormBody, textAt, textsAt, type FormValue } from './form-body'
import { ProviderError, type Machine } from './machine'
import { showAccount, showCheckout, showEvent, showPayment, showRefund } from './objects'

interface Asked {
  form: Record<string, FormValue>
  account: string | undefined
  params: Record<string, string>
  expand: string[]
}

type Answer = (asked: Asked) => object

/** The provider's API, as far as Marram speaks it. */
export function paymentsApi(
  machine: Machine,
  options: { secretKey: string; baseUrl: () => string; onChange: () => void },
): Router {
  const { secretKey, baseUrl, onChange } = options
  const router = Router()
  const busy = new Set<string>()
  router.use(text({ type: () => true, limit: '1mb' }))

  const handle = (answer: Answer, isChange: boolean) => (request: Request, response: Response) => {
    try {
      checkKey(request, secretKey)
      const asked = readAsked(request)
      if (!isChange) return void response.json(answer(asked))
      idempotent(machine, busy, request, response, () => answer(asked))
      onChange()
    } catch (error) {
      sendError(response, error)
    }
  }
  const get = (path: string, answer: Answer) => router.get(path, handle(answer, false))
  const post = (path: string, answer: Answer) => router.post(path, handle(answer, true))
  const checkoutOf = ({ params, account }: Asked) =>
    machine.findCheckout(params['id'] ?? '', account)

  post('/v1/accounts', ({ form }) =>
    showAccount(
      machine.createAccount({
        email: textAt(form, 'email') ?? '',
        name: textAt(form, 'business_profile', 'name') ?? '',
        metadata: textsAt(form, 'metadata'),
      }),
    ),
  )
  get('/v1/accounts/:id', ({ params }) => {
    const account = machine.state.accounts[params['id'] ?? '']
    if (!account) throw new ProviderError(404, 'No such account.')
    return showAccount(account)
  })
  post('/v1/account_links', ({ form }) => {
    const query = new URLSearchParams({ return: textAt(form, 'return_url') ?? '/' })
    const url = `${baseUrl()}/onboarding/${textAt(form, 'account') ?? ''}?${query.toString()}`
    return { object: 'account_link', created: machine.now(), expires_at: machine.now() + 300, url }
  })
  post('/v1/checkout/sessions', ({ form, account }) =>
    showCheckout(machine.createCheckout(wantedCheckout(form, account)), baseUrl()),
  )
  get('/v1/checkout/sessions/:id', (asked) => {
    const checkout = checkoutOf(asked)
    const shown = showCheckout(checkout, baseUrl())
    const isOpen = asked.expand.includes('payment_intent') && checkout.payment
    if (!isOpen) return shown
    const payment = machine.findPayment(checkout.payment ?? '', asked.account)
    return { ...shown, payment_intent: showPayment(payment, []) }
  })
  post('/v1/checkout/sessions/:id/expire', (asked) =>
    showCheckout(machine.expireCheckout(checkoutOf(asked)), baseUrl()),
  )
  get('/v1/payment_intents/:id', ({ params, account, expand }) =>
    showPayment(machine.findPayment(params['id'] ?? '', account), expand),
  )
  post('/v1/refunds', ({ form, account }) => {
    const payment = machine.findPayment(textAt(form, 'payment_intent') ?? '', account)
    const amount = textAt(form, 'amount')
    const metadata = textsAt(form, 'metadata')
    const refund = machine.refund(payment, {
      amount: amount ? Number(amount) : undefined,
      metadata,
    })
    return showRefund(refund, machine.state)
  })
  get('/v1/refunds/:id', ({ params, account }) =>
    showRefund(machine.findRefund(params['id'] ?? '', account), machine.state),
  )
  get('/v1/events', ({ account }) => ({
    object: 'list',
    url: '/v1/events',
    has_more: false,
    data: machine.state.events
      .filter((event) => event.account === (account ?? null))
      .slice(-100)
      .reverse()
      .map((event) => showEvent(event, machine.state, baseUrl())),
  }))
  router.use('/v1', (request, response) =>
    sendError(
      response,
      new ProviderError(404, `Unrecognized request URL (${request.method}: ${request.path}).`),
    ),
  )
  return router
}

function wantedCheckout(form: Record<string, FormValue>, account: string | undefined) {
  if (textAt(form, 'mode') !== 'payment')
    throw new ProviderError(400, 'Only mode=payment is known.')
  const unit = Number(textAt(form, 'line_items', 0, 'price_data', 'unit_amount'))
  const quantity = Number(textAt(form, 'line_items', 0, 'quantity') ?? '1')
  const amount = unit * quantity
  if (!Number.isSafeInteger(amount) || amount <= 0)
    throw new ProviderError(400, 'Invalid integer: unit_amount.')
  const fee = Number(textAt(form, 'payment_intent_data', 'application_fee_amount') ?? '0')
  if (fee >= amount) throw new ProviderError(400, 'The application fee is more than the charge.')
  return {
    account: account ?? '',
    amount,
    currency: textAt(form, 'line_items', 0, 'price_data', 'currency') ?? '',
    title: textAt(form, 'line_items', 0, 'price_data', 'product_data', 'name') ?? '',
    clientReference: textAt(form, 'client_reference_id') ?? null,
    metadata: textsAt(form, 'metadata'),
    paymentMetadata: textsAt(form, 'payment_intent_data', 'metadata'),
    applicationFee: fee,
    email: textAt(form, 'customer_email') ?? null,
    successUrl: textAt(form, 'success_url') ?? '',
    cancelUrl: textAt(form, 'cancel_url') ?? '',
    expiresAt: Number(textAt(form, 'expires_at') ?? '0'),
  }
}

function checkKey(request: Request, secretKey: string): void {
  const given = request.get('authorization')?.replace(/^Bearer /, '')
  if (given !== secretKey)
    throw new ProviderError(401, 'Invalid API Key provided.', { type: 'authentication_error' })
}

function readAsked(request: Request): Asked {
  const query = readFormBody(request.url.split('?')[1] ?? '')
  const form = readFormBody(typeof request.body === 'string' ? request.body : '')
  const expand = [query['expand'], form['expand']].flat().filter((path) => typeof path === 'string')
  return {
    form,
    account: request.get('stripe-account'),
    params: request.params as Record<string, string>,
    expand,
  }
}

/** The same key and the same request give the same answer; another request under it is an error. */
function idempotent(
  machine: Machine,
  busy: Set<string>,
  request: Request,
  response: Response,
  answer: () => object,
): void {
  const key = request.get('idempotency-key')
  const slot = key && `${request.get('stripe-account') ?? ''}:${key}`
  if (!slot) return void response.json(answer())
  const asked = `${request.method} ${request.path} ${String(request.body)}`
  const had = machine.state.answers[slot]
  if (had && had.asked !== asked) {
    throw new ProviderError(
      400,
      'Keys for idempotent requests can only be used with the same parameters.',
      { type: 'idempotency_error' },
    )
  }
  if (had) {
    response.status(had.status).set('idempotent-replayed', 'true').type('json').send(had.body)
    return
  }
  if (busy.has(slot)) {
    throw new ProviderError(409, 'There is a request in progress with this key.', {
      type: 'idempotency_error',
    })
  }
  busy.add(slot)
  try {
    const body = JSON.stringify(answer())
    machine.state.answers[slot] = { asked, status: 200, body }
    response.type('json').send(body)
  } finally {
    busy.delete(slot)
  }
}

function sendError(response: Response, error: unknown): void {
  const known =
    error instanceof ProviderError
      ? error
      : new ProviderError(500, String(error), { type: 'api_error' })
  const { status, type, code, message } = known
  response.status(status).json({ error: { type, message, ...(code ? { code } : {}) } })
}
