import type { Answer } from '@marram/contract'
import { readAcademy, updateAcademy } from '../academies/academies'
import { invariant } from '../platform/invariant'
import type { Services } from '../platform/services'
import { inAcademy } from '../platform/tenancy/transaction'
import type { PaymentsProvider } from './provider'

/** Begins, or goes on with, connecting the academy to the provider: the address of its page. */
export async function connectPayments(
  services: Services,
  provider: PaymentsProvider,
  { academyId, email }: { academyId: string; email: string },
): Promise<Answer<'payments.connect'>> {
  const academy = await inAcademy(services.db, academyId, (trx) => readAcademy(trx))
  const account =
    academy.paymentsAccount ??
    (await provider.createAccount({ academyId, name: academy.name, email }))
  if (!academy.paymentsAccount) {
    await inAcademy(services.db, academyId, (trx) =>
      updateAcademy(trx, { paymentsAccount: account, paymentsState: 'started' }),
    )
  }
  const page = `${services.config.publicUrl}/${academy.slug}/desk/set-up`
  const url = await provider.createOnboarding({
    account,
    returnUrl: `${page}?payments=back`,
    refreshUrl: `${page}?payments=again`,
  })
  return { url }
}

/** How far the connection is; while it is under way the provider is asked. */
export async function readPaymentsAccount(
  services: Services,
  provider: PaymentsProvider,
  academyId: string,
): Promise<Answer<'payments.read'>> {
  const academy = await inAcademy(services.db, academyId, (trx) => readAcademy(trx))
  if (academy.paymentsState !== 'started') return { state: academy.paymentsState }
  return { state: await refreshPaymentsState(services, provider, academyId) }
}

export async function refreshPaymentsState(
  services: Services,
  provider: PaymentsProvider,
  academyId: string,
): Promise<'started' | 'ready'> {
  const { paymentsAccount } = await inAcademy(services.db, academyId, (trx) => readAcademy(trx))
  invariant(paymentsAccount, 'a connection under way has an account')
  const state = (await provider.isAccountReady(paymentsAccount)) ? 'ready' : 'started'
  await inAcademy(services.db, academyId, (trx) => updateAcademy(trx, { paymentsState: state }))
  return state
}
