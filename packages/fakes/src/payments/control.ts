import { Router, json } from 'express'
import type { DeliveryControls } from '../deliveries'
import type { TroubleControls } from './api/trouble'
import type { Machine } from './machine/machine'
import { ProviderError, missing } from './provider-error'

type Body = Record<string, unknown>

/** The controls over HTTP, for tests and loaders in other processes. */
export function controlRoutes(given: {
  machine: Machine
  deliveries: DeliveryControls
  trouble: TroubleControls
  onChange: () => void
}): Router {
  const { machine, deliveries, trouble, onChange } = given
  const router = Router()
  router.use(json())
  const act = (name: string, action: (body: Body) => unknown) =>
    void router.post(`/${name}`, (request, response) => {
      try {
        machine.tick()
        const outcome = action(Object(request.body) as Body)
        onChange()
        response.json({ outcome: outcome ?? null })
      } catch (error) {
        const status = error instanceof ProviderError ? error.status : 400
        response.status(status).json({ error: String(error) })
      }
    })
  moneyControls(machine, act)
  act('mute-webhooks', () => deliveries.mute(true))
  act('unmute-webhooks', () => deliveries.mute(false))
  act('hold-webhooks', () => deliveries.hold())
  act('release-webhooks', () => deliveries.release())
  act('release-webhooks-reversed', () => deliveries.releaseReversed())
  act('duplicate-next', (body) => deliveries.duplicateNext(numberOf(body, 'count', 1)))
  act('drop-next', (body) => deliveries.dropNext(numberOf(body, 'count', 1)))
  act('advance-clock', (body) => machine.advance(numberOf(body, 'seconds', 0)))
  act('set-clock', (body) => machine.setClock(numberOf(body, 'to', machine.now())))
  act('fail-next', (body) =>
    trouble.failNext({ status: numberOf(body, 'status', 500), count: numberOf(body, 'count', 1) }),
  )
  act('lose-answers', (body) => trouble.loseNextAnswers(numberOf(body, 'count', 1)))
  act('hold-requests', () => trouble.holdRequests())
  act('release-requests', () => trouble.releaseRequests())
  router.get('/state', (_request, response) => response.json(machine.state))
  return router
}

/** What people, banks and the provider itself do without the API. */
function moneyControls(
  machine: Machine,
  act: (name: string, action: (body: Body) => unknown) => void,
): void {
  const { state } = machine
  act('pay', (body) =>
    machine.pay(find(state.checkouts, textOf(body, 'session')), {
      card: textOf(body, 'card', '4242424242424242'),
      created: body['created'] === undefined ? undefined : numberOf(body, 'created', 0),
    }),
  )
  act('finish-onboarding', (body) =>
    machine.finishOnboarding(new URL(textOf(body, 'url')).pathname.split('/').at(-1) ?? ''),
  )
  act('dispute', (body) => {
    const reason = textOf(body, 'reason', 'general')
    return machine.openDispute(find(state.payments, textOf(body, 'payment')), reason).id
  })
  act('settle-dispute', (body) => {
    const dispute = find(state.disputes, textOf(body, 'dispute'))
    return machine.decideDispute(dispute, oneOf(body, 'outcome', ['won', 'lost'])).status
  })
  act('payout', (body) => {
    const account = textOf(body, 'account')
    const until = numberOf(body, 'until', machine.now())
    const payout = machine.makePayout({ account, currency: textOf(body, 'currency'), until })
    const outcome = oneOf(body, 'outcome', ['paid', 'in_transit', 'failed'])
    if (outcome !== 'in_transit') machine.settlePayout(payout, outcome)
    return payout.id
  })
  act('settle-payout', (body) => {
    const payout = find(state.payouts, textOf(body, 'payout'))
    return machine.settlePayout(payout, oneOf(body, 'outcome', ['paid', 'failed'])).status
  })
}

function find<T>(records: Readonly<Record<string, T>>, id: string): T {
  const found = records[id]
  if (found === undefined) throw missing('record', id)
  return found
}

function textOf(body: Body, name: string, otherwise?: string): string {
  const value = body[name] ?? otherwise
  if (typeof value !== 'string') throw new ProviderError(400, `${name} is missing.`)
  return value
}

function numberOf(body: Body, name: string, otherwise: number): number {
  const value = Number(body[name] ?? otherwise)
  if (Number.isFinite(value)) return value
  throw new ProviderError(400, `${name} is no number.`)
}

/** One of the words that a control knows; left out, the first of them. */
function oneOf<Word extends string>(body: Body, name: string, words: readonly [Word, ...Word[]]) {
  const given = textOf(body, name, words[0])
  const known = words.find((word) => word === given)
  if (known === undefined) throw new ProviderError(400, `${name} is one of ${words.join(', ')}.`)
  return known
}
