import type { Answer } from '@marram/contract'
import type { Handlers } from '../platform/http/context'
import { asStaff } from '../platform/http/narrow'
import { invariant } from '../platform/invariant'
import type { Services } from '../platform/services'
import { inAcademy, type AcademyTrx } from '../platform/tenancy/transaction'
import { findOwnEnrolment, holdPlaces, listWaitlist } from './enrolments'
import { joinWaitlist, leaveWaitlist, viewEntry } from './waitlist'

type EnrolmentView = Answer<'enrolments.read'>

/**
 * Shows enrolments. How their payment stands is known further up, so whoever composes the app
 * brings this along.
 */
export type ShowEnrolments = (
  trx: AcademyTrx,
  by: { id: string } | { accountId: string } | { clinicId: string } | { golferId: string },
) => Promise<EnrolmentView[]>

export type ReadCredit = (trx: AcademyTrx, accountId: string) => Promise<number>

export function enrolmentHandlers(
  services: Services,
  { show, readCredit }: { show: ShowEnrolments; readCredit: ReadCredit },
): Handlers {
  const showOne = async (trx: AcademyTrx, id: string): Promise<EnrolmentView> => {
    const [view] = await show(trx, { id })
    invariant(view, 'the enrolment to be shown exists')
    return view
  }

  return {
    'enrolments.mine': (_input, context) => {
      const { academyId, account } = asStaff(context)
      return inAcademy(services.db, academyId, async (trx) => ({
        enrolments: await show(trx, { accountId: account.id }),
        waitlist: (await listWaitlist(trx, { accountId: account.id })).map(viewEntry),
        creditMinor: await readCredit(trx, account.id),
      }))
    },
    'enrolments.hold': ({ body }, context) => {
      const { academyId, account: person } = asStaff(context)
      return holdPlaces(services, { academyId, person, wanted: body }, showOne)
    },
    'enrolments.read': ({ params }, context) => {
      const { academyId, account } = asStaff(context)
      return inAcademy(services.db, academyId, async (trx) => {
        await findOwnEnrolment(trx, { ...params, accountId: account.id })
        return showOne(trx, params.enrolmentId)
      })
    },
    'waitlist.join': ({ body }, context) => {
      const { academyId, account: person } = asStaff(context)
      return joinWaitlist(services, { academyId, person, wanted: body })
    },
    'waitlist.leave': async ({ params }, context) => {
      const { academyId, account } = asStaff(context)
      await leaveWaitlist(services, { academyId, accountId: account.id, ...params })
      return null
    },
  }
}
