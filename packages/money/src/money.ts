export { add, moneyOf, negate, subtract, sum, toMinor, type Money } from './amounts'
export { allocateByLargestRemainder, priceOfRemaining, splitRunPrice } from './allocation'
export {
  CURRENCY_CODES,
  isCurrencyCode,
  minorDigitsOf,
  toCurrencyCode,
  type CurrencyCode,
} from './currencies'
export {
  currencySign,
  formatMoney,
  formatNothing,
  NOTHING,
  toDecimal,
  type MoneyFormat,
} from './format'
export { parseMoney, type MoneyRefusal, type ParsedMoney, type ParseMoneyOptions } from './parse'
export { earnedOfPass } from './passes'
export { divideRefund, refundByPolicy, type RefundTier } from './refunds'
export { divideHalfUp } from './rounding'
export { taxAdded, taxIncluded, type TaxedAmount } from './tax'
