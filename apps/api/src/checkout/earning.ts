import { readAcademy } from '../academies/academies'
import { findSession } from '../clinics/clinics'
import { findTransferEntries, post } from '../ledger/ledger'
import { registerClosed, registerReopened, sessionMoved } from '../ledger/postings'
import type { Services } from '../platform/services'
import { inAcademy } from '../platform/tenancy/transaction'
import { listDeferredDays, listSessionPlaces } from './queries'
import { registerInWords } from './rules'

interface Register {
  academyId: string
  sessionId: string
  revision: number
}

/**
 * A closed register earns its session: what each place was sold for, net of tax, whatever its mark.
 * Who stayed away had the place; an excused golfer's place is earned too, by the usual policy.
 */
export async function earnSession(services: Services, register: Register): Promise<void> {
  const { academyId, sessionId, revision } = register
  await inAcademy(services.db, academyId, async (trx) => {
    const places = await listSessionPlaces(trx, sessionId)
    const session = await findSession(trx, sessionId)
    if (!session) return
    const { currency } = await readAcademy(trx)
    const posting = registerClosed({
      sourceId: sessionId,
      revision,
      what: registerInWords(places.map(({ mark }) => mark)),
      happenedOn: session.heldOn,
      places,
    })
    await post(services, trx, { posting, currency })
  })
}

/** A reopened register takes back exactly what its closing posted. */
export async function unearnSession(services: Services, register: Register): Promise<void> {
  const { academyId, sessionId, revision } = register
  await inAcademy(services.db, academyId, async (trx) => {
    const session = await findSession(trx, sessionId)
    if (!session) return
    const key = { sourceType: 'session', sourceId: sessionId, revision } as const
    const entries = await findTransferEntries(trx, { ...key, kind: 'register-closed' })
    const places = await listSessionPlaces(trx, sessionId)
    const isFree = places.every(({ netMinor }) => netMinor === 0)
    if (!entries && isFree) return
    // The closing is on its way: this is tried again until it has been posted.
    if (!entries) throw new Error('the register was reopened before its closing was posted')
    const { currency } = await readAcademy(trx)
    const posting = registerReopened({
      sourceId: sessionId,
      revision,
      what: 'Register opened again',
      happenedOn: session.heldOn,
      entries,
    })
    await post(services, trx, { posting, currency })
  })
}

/** A session moved to another day takes its deferred money along to that day's month. */
export async function followMovedSession(
  services: Services,
  { academyId, sessionId }: { academyId: string; sessionId: string },
): Promise<void> {
  await inAcademy(services.db, academyId, async (trx) => {
    const session = await findSession(trx, sessionId)
    if (!session) return
    const elsewhere = (await listDeferredDays(trx, sessionId)).filter(
      ({ heldOn }) => heldOn !== session.heldOn,
    )
    if (elsewhere.length === 0) return
    const { currency } = await readAcademy(trx)
    const posting = sessionMoved({
      sourceId: sessionId,
      revision: session.calendarSequence,
      what: 'Session moved to another day',
      happenedOn: session.heldOn,
      heldOn: session.heldOn,
      places: elsewhere.map((day) => ({ ...day, sessionId, taxMinor: 0 })),
    })
    await post(services, trx, { posting, currency })
  })
}
