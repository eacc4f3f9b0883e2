import type { Router } from 'express'
import {
  ControlError,
  deliveryControls,
  failureOf,
  makeControls,
  numberOf,
  oneOf,
  textOf,
  type Act,
} from '../control'
import type { DeliveryControls } from '../deliveries'
import type { TroubleControls } from './api/trouble'
import { CARDS } from './cards'
import type { Machine } from './machine/machine'
import { missing } from './provider-error'

/** The controls over HTTP, for tests and loaders in other processes. */
export function controlRoutes(given: {
  machine: Machine
  deliveries: DeliveryControls
  trouble: TroubleControls
  onChange: () => void
}): Router {
  const { machine, deliveries, trouble, onChange } = given
  const { router, act } = makeControls(onChange)
  moneyControls(act, machine)
  deliveryControls(act, deliveries)
  act('advance-clock', (body) => machine.advance(numberOf(body, 'seconds', 0)))
  act('fail-next', (body) => trouble.failNext(failureOf(body)))
  act('lose-answers', (body) => trouble.loseNextAnswers(numberOf(body, 'count', 1)))
  act('hold-requests', () => trouble.holdRequests())
  act('release-requests', () => trouble.releaseRequests())
  router.get('/state', (_request, response) => response.json(machine.state))
  return router
}

/** What people, banks and the provider itself do without the API. */
function moneyControls(act: Act, machine: Machine): void {
  const { state } = machine
  act('pay', (body) => {
    machine.tick()
    return machine.pay(find(state.checkouts, textOf(body, 'session')), {
      card: textOf(body, 'card', CARDS.good),
      created: body['created'] === undefined ? undefined : numberOf(body, 'created', 0),
    })
  })
  act('finish-onboarding', (body) => {
    const url = textOf(body, 'url')
    if (!URL.canParse(url)) throw new ControlError('url is no address.')
    machine.finishOnboarding(new URL(url).pathname.split('/').at(-1) ?? '')
  })
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
    const outcome = oneOf(body, 'outcome', ['paid', 'in_transit', 'failed'])
    const payout = machine.makePayout({ account, currency: textOf(body, 'currency'), until })
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
