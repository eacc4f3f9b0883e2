import type { Knex } from 'knex'
import type { Logger } from '../logging'
import type { Services } from '../services'
import { inAcademy } from '../tenancy/transaction'

const BATCH = 500
/** How long a refund may go unanswered before it is asked after; each pause doubles the last. */
const REFUND_PATIENCE = '10 minutes'

/**
 * Finds what has become due by our clock, across academies, and tells each academy's listeners.
 * Connects as the dispatcher's role, which can see what is due and nothing else. Telling twice is
 * harmless: whoever hears it looks again. Resolves to how many things were due.
 */
export async function sweepDue(services: Services, dispatch: Knex): Promise<number> {
  const now = services.clock.now()
  const holds = await dispatch('enrolments')
    .where({ state: 'held' })
    .andWhere('heldUntil', '<', now)
    // In no order: those that the provider does not answer for hold up no others.
    .orderByRaw('random()')
    .limit(BATCH)
    .select<{ academyId: string; id: string }[]>('academyId', 'id')
  for (const { academyId, id: enrolmentId } of holds) {
    await inAcademy(services.db, academyId, (trx) =>
      services.outbox.emit(trx, 'hold.lapsed', { academyId, enrolmentId }),
    )
  }
  const choices = await dispatch('owedPlaces')
    .whereNull('choice')
    .andWhere('chooseBy', '<', now)
    .limit(BATCH)
    .select<{ academyId: string; placeId: string }[]>('academyId', 'placeId')
  for (const { academyId, placeId } of choices) {
    await inAcademy(services.db, academyId, (trx) =>
      services.outbox.emit(trx, 'choice.due', { academyId, placeId }),
    )
  }
  const refunds = await dispatch('refunds')
    .where({ state: 'asked' })
    .andWhereRaw('asked_at + greatest(?::interval, asked_at - created_at) < ?', [
      REFUND_PATIENCE,
      now,
    ])
    .orderBy('askedAt')
    .limit(BATCH)
    .select<{ academyId: string; id: string }[]>('academyId', 'id')
  for (const { academyId, id: refundId } of refunds) {
    await inAcademy(services.db, academyId, (trx) =>
      services.outbox.emit(trx, 'refund.asked', { academyId, refundId }),
    )
  }
  await dispatch('signInSessions').where('expiresAt', '<', now).delete()
  await dispatch('attempts')
    .where('windowStartsAt', '<', new Date(now.getTime() - 3_600_000))
    .delete()
  return holds.length + choices.length + refunds.length
}

/** Sweeps again and again, one at a time, until it is stopped. */
export function startSweeping(
  services: Services,
  options: { dispatch: Knex; everyMs: number; log: Logger },
): { stop(): Promise<void> } {
  let isStopped = false
  let running: Promise<unknown> = Promise.resolve()
  const timer = setInterval(() => {
    if (isStopped) return
    const previous = running
    running = previous.then(() =>
      isStopped
        ? undefined
        : sweepDue(services, options.dispatch).catch((err: unknown) => {
            options.log.error({ err }, 'the sweep failed')
          }),
    )
  }, options.everyMs)
  return {
    async stop() {
      isStopped = true
      clearInterval(timer)
      await running
    },
  }
}
