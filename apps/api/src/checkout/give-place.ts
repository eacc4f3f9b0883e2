import type { Parsed } from '@marram/contract'
import { readAcademy } from '../academies/academies'
import { givePlaces, lockEnrolment } from '../enrolments/enrolments'
import { invariant } from '../platform/invariant'
import type { Services } from '../platform/services'
import { promiseAtDesk } from './orders'

/** Staff give a golfer a place, which is to be paid at the desk. Resolves to the enrolment's id. */
export async function givePlace(
  services: Services,
  given: { academyId: string; wanted: Parsed<'enrolments.give', 'body'> },
): Promise<string> {
  return givePlaces(services, given, async (trx, enrolmentId) => {
    const enrolment = await lockEnrolment(trx, enrolmentId)
    invariant(enrolment, 'the enrolment was just written')
    await promiseAtDesk(services, trx, { academy: await readAcademy(trx), enrolment })
  })
}
