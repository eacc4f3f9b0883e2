export {
  startPaymentsFake,
  type PaymentsFake,
  type PaymentsFakeOptions,
} from './payments/payments-fake'
export { startMailFake, type MailFake, type MailFakeOptions, type KeptMail } from './mail/mail-fake'
export {
  startOauthFake,
  type OauthFake,
  type OauthFakeOptions,
  type FakePerson,
} from './oauth/oauth-fake'
