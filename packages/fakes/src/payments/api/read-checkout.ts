import { requireCurrency, requireStep } from '../currencies'
import type { WantedCheckout } from '../machine/checkouts'
import { ProviderError } from '../provider-error'
import type { Asked } from './asked'
import { integerAt, itemsAt, requiredAt, textAt, textsAt, type FormValue } from './form-body'

export const CHECKOUT_PARAMS = [
  'cancel_url',
  'client_reference_id',
  'customer_email',
  'expires_at',
  'line_items',
  'locale',
  'metadata',
  'mode',
  'payment_intent_data',
  'payment_method_types',
  'submit_type',
  'success_url',
] as const

const DAY_SECONDS = 24 * 3600
const EMAIL = /^[^\s@]+@[^\s@]+\.[^\s@]+$/

/** What a checkout is asked to be. @throws ProviderError for what the provider would refuse. */
export function readCheckout({ form, account }: Asked, now: number): WantedCheckout {
  if (requiredAt(form, 'mode') !== 'payment') {
    throw new ProviderError(400, 'The stand-in knows mode=payment only.', { param: 'mode' })
  }
  const lines = itemsAt(form, 'line_items').map(readLine)
  const [first] = lines
  if (!first) throw new ProviderError(400, 'line_items must have a line.', { param: 'line_items' })
  const { currency } = first
  requireCurrency(currency)
  if (lines.some((line) => line.currency !== currency)) {
    throw new ProviderError(400, 'All lines of a checkout are in one currency.')
  }
  const amount = lines.reduce((sum, line) => sum + line.amount, 0)
  const cancelUrl = textAt(form, 'cancel_url')
  return {
    account: account ?? '',
    amount,
    currency,
    title: lines.map(({ title }) => title).join(', '),
    clientReference: textAt(form, 'client_reference_id') ?? null,
    metadata: textsAt(form, 'metadata'),
    paymentMetadata: textsAt(form, 'payment_intent_data', 'metadata'),
    applicationFee: readApplicationFee(form, { amount, currency }),
    email: readEmail(textAt(form, 'customer_email')),
    successUrl: requireUrl(requiredAt(form, 'success_url'), 'success_url'),
    cancelUrl: cancelUrl === undefined ? null : requireUrl(cancelUrl, 'cancel_url'),
    expiresAt: integerAt(form, 'expires_at') ?? now + DAY_SECONDS,
  }
}

function readLine(line: FormValue) {
  const quantity = integerAt(line, 'quantity') ?? 1
  const unit = integerAt(line, 'price_data', 'unit_amount') ?? 0
  if (unit < 0 || quantity < 1) {
    throw new ProviderError(400, 'A line has a quantity, and an amount that is not negative.')
  }
  return {
    amount: unit * quantity,
    currency: requiredAt(line, 'price_data', 'currency'),
    title: requiredAt(line, 'price_data', 'product_data', 'name'),
  }
}

function readApplicationFee(
  form: Record<string, FormValue>,
  { amount, currency }: { amount: number; currency: string },
): number {
  const fee = integerAt(form, 'payment_intent_data', 'application_fee_amount') ?? 0
  if (fee < 0 || fee > amount) {
    throw new ProviderError(400, 'The application fee is not within the amount of the charge.', {
      param: 'payment_intent_data[application_fee_amount]',
    })
  }
  requireStep(fee, currency)
  return fee
}

function readEmail(email: string | undefined): string | null {
  if (email === undefined) return null
  if (EMAIL.test(email)) return email
  throw new ProviderError(400, `Invalid email address: ${email}`, {
    code: 'email_invalid',
    param: 'customer_email',
  })
}

function requireUrl(url: string, param: string): string {
  if (URL.canParse(url)) return url
  throw new ProviderError(400, 'Not a valid URL', { code: 'url_invalid', param })
}
