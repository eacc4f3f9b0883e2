export {
  startPaymentsFake,
  type PaymentsFake,
  type PaymentsFakeOptions,
} from './payments/payments-fake'
export { startMailFake, type MailFake, type MailFakeOptions } from './mail/mail-fake'
export type { KeptMail } from './mail/message'
export { startOauthFake, type OauthFake, type OauthFakeOptions } from './oauth/oauth-fake'
export type { FakePerson } from './oauth/people'
