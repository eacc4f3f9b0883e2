import type { Format } from '../academies/format'
import type { MonthMoney } from './month-money'
import type { OpenFigure } from './queries'

/** A number that can be opened to what it is made of. */
export function Figure(props: {
  children: string
  isOpen: boolean
  isPencil?: boolean
  label: string
  onOpen: () => void
}) {
  return (
    <button
      type="button"
      className={props.isPencil ? 'fig pencilled' : 'fig'}
      aria-expanded={props.isOpen}
      aria-label={props.label}
      onClick={props.onOpen}
    >
      {props.children}
    </button>
  )
}

/** Which figures of a card can be opened, and which one is. */
export interface Openable {
  open: OpenFigure | null
  onOpen: (figure: OpenFigure) => void
}

export const isSameFigure = (a: OpenFigure | null, b: OpenFigure): boolean =>
  a !== null && a.figure === b.figure && a.month === b.month && a.clinicId === b.clinicId

/** A month's figures: ink for what is earned, pencil for what is paid ahead, each its own to open. */
export function MonthFigures(
  props: Openable & {
    amount: MonthMoney
    earned: OpenFigure
    toEarn?: OpenFigure
    format: Format
  },
) {
  const { amount, earned, toEarn, format, open, onOpen } = props
  if (amount.earnedMinor === 0 && amount.toEarnMinor === 0) return format.cardMoney(0)
  const figure = (of: OpenFigure, amountMinor: number, what: string, isPencil: boolean) => (
    <Figure
      isOpen={isSameFigure(open, of)}
      isPencil={isPencil}
      label={`${of.title}: ${format.cardMoney(amountMinor)}${what}`}
      onOpen={() => onOpen(of)}
    >
      {format.cardMoney(amountMinor)}
    </Figure>
  )
  return (
    <>
      {amount.earnedMinor !== 0 &&
        figure(earned, amount.earnedMinor, toEarn ? ', earned' : '', false)}
      {toEarn &&
        amount.toEarnMinor !== 0 &&
        figure(toEarn, amount.toEarnMinor, ', paid, not yet earned', true)}
    </>
  )
}

/** A sum of months, which is made of figures and opens none of its own. */
export function SumFigures({ amount, format }: { amount: MonthMoney; format: Format }) {
  const { earnedMinor, toEarnMinor } = amount
  if (toEarnMinor === 0) return format.cardMoney(earnedMinor)
  return (
    <>
      {earnedMinor !== 0 && <span className="block">{format.cardMoney(earnedMinor)}</span>}
      <span className="block pencilled">
        {format.cardMoney(toEarnMinor)}
        <span className="vh">, paid, not yet earned</span>
      </span>
    </>
  )
}
