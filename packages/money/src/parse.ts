import { isCurrencyCode, minorDigitsOf, type CurrencyCode } from './currencies'

export type MoneyRefusal =
  | 'empty'
  | 'not-an-amount'
  | 'other-currency'
  | 'negative'
  | 'too-precise'
  | 'ambiguous'
  | 'too-large'

export type ParsedMoney =
  | { ok: true; amountMinor: number; currency: CurrencyCode }
  | { ok: false; reason: MoneyRefusal; sentence: string }

export interface ParseMoneyOptions {
  /** Takes amounts below zero as well. Left out: refuses them. */
  allowsNegative?: boolean
  /** The largest amount taken, in minor units. Left out: what can be counted exactly. */
  maxMinor?: number
}

/** No amount is as long as this; what is longer is not searched. */
const LONGEST_TEXT = 60

/**
 * Reads an amount as people type it: with or without the sign or code of a currency, with spaces,
 * commas or points between thousands, with a comma or a point before the minor units, with either
 * minus. Where a figure could be read two ways it asks instead of guessing.
 */
export function parseMoney(
  text: string,
  currency: CurrencyCode,
  { allowsNegative = false, maxMinor = Number.MAX_SAFE_INTEGER }: ParseMoneyOptions = {},
): ParsedMoney {
  if (text.trim() === '') return refuse('empty', currency)
  if (text.length > LONGEST_TEXT) return refuse('not-an-amount', currency)
  const { sign, marks, figures } = takeApart(text)
  if (!/\d/.test(figures) || sign === null) return refuse('not-an-amount', currency)
  if (marks.length > 0) {
    const own = marksOf(currency)
    const strange = marks.find((mark) => !own.has(mark))
    if (strange !== undefined) {
      return refuse(looksLikeCurrency(strange) ? 'other-currency' : 'not-an-amount', currency)
    }
  }

  const digits = minorDigitsOf(currency)
  const read = readFigures(figures, digits)
  if (typeof read === 'string') return refuse(read, currency)
  const size = BigInt(read.whole + read.fraction.padEnd(digits, '0'))
  const isBelowZero = sign === '-' && size > 0n
  if (isBelowZero && !allowsNegative) return refuse('negative', currency)
  if (size > BigInt(maxMinor)) return refuse('too-large', currency)
  return { ok: true, amountMinor: isBelowZero ? -Number(size) : Number(size), currency }
}

/** Takes off spaces, signs or codes of a currency on either side, and a minus beside the first. */
function takeApart(text: string): { sign: '' | '-' | null; marks: string[]; figures: string } {
  const bare = text
    .normalize('NFKC')
    .replaceAll(/[\p{Zs}\t'’_]/gu, '')
    .replaceAll('−', '-')
    .toUpperCase()
  // Bookkeepers write what is owed in parentheses.
  const owed = /^\((.*)\)$/.exec(bare)?.[1]
  const [, outer = '', left = '', inner = '', figures = '', right = ''] =
    /^(-?)([\p{L}\p{Sc}]*)(-?)(.*?)([\p{L}\p{Sc}]*)$/u.exec(owed ?? bare) ?? []
  const signs = (owed === undefined ? '' : '-') + outer + inner
  return {
    sign: signs === '' || signs === '-' ? signs : null,
    marks: [left, right].filter(Boolean),
    figures,
  }
}

/** The ways to write a currency: its code, and its sign with or without letters of its country. */
function marksOf(currency: CurrencyCode): ReadonlySet<string> {
  const signs = (['symbol', 'narrowSymbol'] as const).map(
    (currencyDisplay) =>
      new Intl.NumberFormat('en', { style: 'currency', currency, currencyDisplay })
        .formatToParts(0)
        .find(({ type }) => type === 'currency')?.value,
  )
  const isDollar = signs[1] === '$'
  const ofCountry = isDollar ? [`${currency.slice(0, 2)}$`, `${currency.slice(0, 1)}$`] : []
  const marks = [currency, ...signs, ...ofCountry]
  return new Set(marks.flatMap((mark) => mark?.toUpperCase() ?? []))
}

function looksLikeCurrency(mark: string): boolean {
  return /\p{Sc}/u.test(mark) || isCurrencyCode(mark)
}

interface Figures {
  whole: string
  fraction: string
}

function readFigures(figures: string, digits: number): Figures | MoneyRefusal {
  if (!/^\d*(?:[.,]\d+)*[.,]?$/.test(figures) || !/\d/.test(figures)) return 'not-an-amount'
  const marks = [...figures.replaceAll(/\d/g, '')]
  const last = marks.at(-1)
  if (last === undefined) return { whole: figures, fraction: '' }

  const cut = figures.lastIndexOf(last)
  const head = figures.slice(0, cut)
  const tail = figures.slice(cut + 1)
  const isOnlyMark = marks.length === 1
  if (isOnlyMark && tail.length === 3 && /^[1-9]\d{0,2}$/.test(head)) {
    // 1,234 or 1.234: thousands, or a whole number with three figures after the point?
    if (digits === 3) return last === '.' ? { whole: head, fraction: tail } : 'ambiguous'
    return last === ',' ? { whole: head + tail, fraction: '' } : 'too-precise'
  }
  const grouping = marks[0]
  if (!isOnlyMark && grouping === last) {
    return isGrouped(figures, last)
      ? { whole: figures.replaceAll(last, ''), fraction: '' }
      : 'not-an-amount'
  }
  if (!isOnlyMark && grouping !== undefined && !isGrouped(head, grouping)) return 'not-an-amount'
  if (tail.length > digits) return 'too-precise'
  return { whole: head.replaceAll(/[.,]/g, ''), fraction: tail }
}

function isGrouped(figures: string, mark: string): boolean {
  const [first = '', ...groups] = figures.split(mark)
  return /^[1-9]\d{0,2}$/.test(first) && groups.every((group) => /^\d{3}$/.test(group))
}

function refuse(reason: MoneyRefusal, currency: CurrencyCode): ParsedMoney {
  return { ok: false, reason, sentence: sentenceFor(reason, currency) }
}

function sentenceFor(reason: MoneyRefusal, currency: CurrencyCode): string {
  const digits = minorDigitsOf(currency)
  const example = digits === 0 ? '108' : `108.${'0'.repeat(digits)}`
  switch (reason) {
    case 'empty':
      return `Please write an amount, like ${example}.`
    case 'not-an-amount':
      return `This is not an amount. It looks like ${example}.`
    case 'other-currency':
      return `This counts in ${currency}. Please write the amount in it, like ${example}.`
    case 'negative':
      return 'This amount is below zero. Please write it without the minus.'
    case 'too-precise':
      return digits === 0
        ? `${currency} has no figures after the point. An amount looks like ${example}.`
        : `${currency} has ${digits} figures after the point. An amount looks like ${example}.`
    case 'ambiguous':
      return 'This could be read two ways. Please write 1234 or 1.234, without a comma.'
    case 'too-large':
      return 'This amount is larger than we can take.'
  }
}
