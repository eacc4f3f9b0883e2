import { expect } from 'vitest'
import type { Remembered } from './remembered'
import type { Scene } from './scene'
import { takeStock, type Stock } from './stock'

const sumOf = (rows: readonly { amountMinor: number }[]): number =>
  rows.reduce((sum, { amountMinor }) => sum + amountMinor, 0)
const grossOf = (place: { netMinor: number; taxMinor: number }): number =>
  place.netMinor + place.taxMinor

/** What must hold at every moment, whatever people did and in whatever order it was heard of. */
export async function checkLaws(scene: Scene, remembered: Remembered): Promise<void> {
  const stock = await takeStock(scene)
  checkSeats(stock)
  checkGolfers(stock)
  checkMoney(stock, remembered)
  checkBooks(stock, remembered)
}

/** Never oversold, and each session's counters say what its places say. */
function checkSeats({ sessions, places }: Stock): void {
  for (const session of sessions) {
    const inIt = places.filter(({ sessionId }) => sessionId === session.id)
    const counted = (wanted: string) => inIt.filter(({ state }) => state === wanted).length
    const { held, confirmed, capacity } = session
    expect({ held, confirmed }).toEqual({ held: counted('held'), confirmed: counted('confirmed') })
    expect(held + confirmed).toBeLessThanOrEqual(capacity)
  }
}

/** Nobody sits in two chairs. */
function checkGolfers({ places }: Stock): void {
  const active = places
    .filter(({ state }) => state !== 'cancelled')
    .map(({ golferId, sessionId }) => `${golferId} in ${sessionId}`)
  expect(active).toEqual([...new Set(active)])
}

/**
 * Of each enrolment: what came in and did not go back is worth its places, what is owed for those
 * called off, and what the policy keeps; less what is still to be paid at the desk.
 */
function checkMoney(stock: Stock, { keptMinor, deskMinor }: Remembered): void {
  for (const { id, state } of stock.enrolments) {
    const mine = <T extends { enrolmentId: string }>(rows: readonly T[]) =>
      rows.filter(({ enrolmentId }) => enrolmentId === id)
    const inMinor = sumOf(mine(stock.payments))
    const outMinor = sumOf(mine(stock.refunds).filter((refund) => refund.state !== 'failed'))
    const places = mine(stock.places)
    const isMine = ({ placeId }: { placeId: string }) => places.some((p) => p.id === placeId)
    const worthMinor =
      places.filter((p) => p.state === 'confirmed').reduce((sum, p) => sum + grossOf(p), 0) +
      sumOf(stock.owed.filter(isMine)) +
      sumOf(stock.credits.filter(isMine)) +
      (keptMinor.get(id) ?? 0) -
      (deskMinor.get(id) ?? 0)
    expect({ id, state, minor: inMinor - outMinor }).toEqual({ id, state, minor: worthMinor })
  }
}

/** The ledger says of everybody together what the rows say one by one. */
function checkBooks(stock: Stock, { keptMinor, deskMinor }: Remembered): void {
  const { balances, places, payments, refunds } = stock
  expect(stock.unbalanced).toEqual([])
  expect(Object.values(balances).reduce((sum, minor) => sum + minor, 0)).toBe(0)
  const balanceOf = (code: string) => balances[code] ?? 0
  const confirmed = places.filter(({ state }) => state === 'confirmed')
  const toCome = confirmed.reduce((sum, place) => sum + grossOf(place), 0) + sumOf(stock.owed)
  const kept = [...keptMinor.values()].reduce((sum, minor) => sum + minor, 0)
  const owedByUs =
    balanceOf('deferred-clinics') + balanceOf('tax-owed') + balanceOf('earned-late-cancellations')
  expect(0 - owedByUs).toBe(toCome + kept)
  expect(0 - balanceOf('credits-owed')).toBe(sumOf(stock.credits))
  const atDesk = [...deskMinor.values()].reduce((sum, minor) => sum + minor, 0)
  expect(balanceOf('receivable')).toBe(atDesk)
  const isCash = ({ method }: { method: string }) => method === 'cash'
  expect(balanceOf('cash-drawer')).toBe(
    sumOf(payments.filter(isCash)) - sumOf(refunds.filter(isCash)),
  )
}

/** At the end nothing is under way: the provider has what the books say, and nobody is owed. */
export async function checkEnd(scene: Scene): Promise<void> {
  const { balances, enrolments, owed, refunds } = await takeStock(scene)
  expect(enrolments.filter(({ state }) => state === 'held')).toEqual([])
  expect(owed).toEqual([])
  expect(refunds.filter(({ state }) => state !== 'done')).toEqual([])
  expect(balances['refunds-due'] ?? 0).toBe(0)
  const moves = Object.values(scene.world.payments.state.balance).filter(
    ({ account }) => account === scene.account,
  )
  const atProvider = moves.reduce(
    (sum, { amount, providerFee, applicationFee }) => sum + amount - providerFee - applicationFee,
    0,
  )
  expect(balances['provider-clearing'] ?? 0).toBe(atProvider)
}
