import { findClinic, isCoachOfClinic } from '../clinics/clinics'
import { listWaitlist } from '../enrolments/enrolments'
import { viewEntry } from '../enrolments/waitlist'
import { changeGolfer, readGolfer } from '../golfers/for-staff'
import { findGolfer } from '../golfers/golfers'
import { golferReach } from '../golfers/routes'
import { notFound } from '../platform/errors'
import type { Handlers, RequestContext } from '../platform/http/context'
import { asAcademy, asStaff } from '../platform/http/narrow'
import type { Services } from '../platform/services'
import { inAcademy } from '../platform/tenancy/transaction'
import { chooseForOwedPlace } from './called-off'
import { givePlace } from './give-place'
import { giveUp, quoteGivingUp, type GivingUp } from './giving-up'
import { letGo, payAtDesk, startCheckout, takeCash } from './orders'
import { connectPayments, readPaymentsAccount } from './payments-account'
import type { PaymentsProvider } from './provider'
import { readCreditOfGolfer } from './queries'
import { showEnrolments } from './views'

export function checkoutHandlers(services: Services, provider: PaymentsProvider): Handlers {
  const show = (academyId: string, id: string) =>
    inAcademy(services.db, academyId, async (trx) => {
      const [view] = await showEnrolments(trx, { id })
      if (!view) throw notFound('place')
      return view
    })
  const own = (context: RequestContext, enrolmentId: string) => {
    const { academyId, account } = asStaff(context)
    return { academyId, enrolmentId, accountId: account.id }
  }
  const byGolfer = (context: RequestContext, enrolmentId: string): GivingUp => {
    const { academyId, account } = asStaff(context)
    return { academyId, enrolmentId, by: { kind: 'golfer', accountId: account.id } }
  }
  const byStaff = (context: RequestContext, enrolmentId: string): GivingUp => {
    const { academyId } = asAcademy(context)
    return { academyId, enrolmentId, by: { kind: 'staff' } }
  }
  const readOneGolfer = (context: RequestContext, golferId: string) =>
    readGolfer(services, { reach: golferReach(context), golferId, creditOf: readCreditOfGolfer })

  return {
    'checkout.start': async ({ params }, context) => ({
      url: await startCheckout(services, provider, own(context, params.enrolmentId)),
    }),
    'checkout.at-desk': async ({ params }, context) => {
      const mine = own(context, params.enrolmentId)
      await payAtDesk(services, provider, mine)
      return show(mine.academyId, mine.enrolmentId)
    },
    'enrolments.release': async ({ params }, context) => {
      await letGo(services, provider, own(context, params.enrolmentId))
      return null
    },
    'enrolments.give': async ({ body }, context) => {
      const { academyId } = asAcademy(context)
      const id = await givePlace(services, { academyId, wanted: body })
      return show(academyId, id)
    },
    'enrolments.of-clinic': ({ params }, context) => {
      const { academyId, account, scope } = asStaff(context)
      return inAcademy(services.db, academyId, async (trx) => {
        const { clinicId } = params
        const isTheirs = await isCoachOfClinic(trx, { clinicId, accountId: account.id })
        const isHidden = scope === 'own' && !isTheirs
        if (isHidden || !(await findClinic(trx, clinicId))) throw notFound('clinic')
        return {
          enrolments: await showEnrolments(trx, { clinicId }),
          waitlist: (await listWaitlist(trx, { clinicId })).map(viewEntry),
        }
      })
    },
    'enrolments.of-golfer': ({ params }, context) =>
      inAcademy(services.db, asAcademy(context).academyId, async (trx) => {
        const { golferId } = params
        if (!(await findGolfer(trx, golferId))) throw notFound('golfer')
        return { enrolments: await showEnrolments(trx, { golferId }) }
      }),
    'checkout.quote-giving-up': ({ params }, context) =>
      quoteGivingUp(services, byGolfer(context, params.enrolmentId)),
    'checkout.give-up': async ({ params, body }, context) => {
      const mine = byGolfer(context, params.enrolmentId)
      await giveUp(services, { ...mine, ...body })
      return show(mine.academyId, mine.enrolmentId)
    },
    'checkout.quote-giving-up-for': ({ params }, context) =>
      quoteGivingUp(services, byStaff(context, params.enrolmentId)),
    'checkout.give-up-for': async ({ params, body }, context) => {
      const theirs = byStaff(context, params.enrolmentId)
      await giveUp(services, { ...theirs, ...body })
      return show(theirs.academyId, theirs.enrolmentId)
    },
    'checkout.choose': async ({ params, body }, context) => {
      const { academyId, account } = asStaff(context)
      await chooseForOwedPlace(services, { academyId, accountId: account.id, ...params, ...body })
      return null
    },
    'checkout.take-cash': async ({ params, body }, context) => {
      const { academyId, account } = asStaff(context)
      await takeCash(services, { academyId, ...params, ...body, takenBy: account.id })
      return show(academyId, params.enrolmentId)
    },
    'payments.read': (_input, context) =>
      readPaymentsAccount(services, provider, asAcademy(context).academyId),
    'payments.connect': (_input, context) => {
      const { academyId, account } = asStaff(context)
      return connectPayments(services, provider, { academyId, email: account.email })
    },
    'golfers.read': ({ params }, context) => readOneGolfer(context, params.golferId),
    'golfers.change': async ({ params, body }, context) => {
      const { academyId } = asAcademy(context)
      await changeGolfer(services, { academyId, ...params, change: body })
      return readOneGolfer(context, params.golferId)
    },
  }
}
