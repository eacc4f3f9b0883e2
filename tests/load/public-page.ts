import { isDeepStrictEqual } from 'node:util'
import type { BenchDatabase } from './database'
import { withServers } from './processes'
import { find, inTurns, type Finding } from './rounds'
import { answerTo, answersPerSecond, type Call } from './traffic'

const ROUNDS = 15
const CALLS = 250
const CONNECTIONS = 8

const ours: Call = { method: 'GET', path: '/api/academies/links-1/page' }
const bare: Call = { method: 'GET', path: '/page/links-1' }
const walled: Call = { method: 'GET', path: '/walled-page/links-1' }

/** The public clinic list of one academy: against bare handlers, and beside 999 more academies. */
export async function measurePublicPage(databases: {
  one: BenchDatabase
  many: BenchDatabase
}): Promise<Finding[]> {
  const { one, many } = databases
  const rates = await withServers(async (start) => {
    const product = await start('product', one.url)
    const productOfMany = await start('product', many.url)
    const floor = await start('floor', one.superuserUrl)
    const walledFloor = await start('floor', one.url)
    refuseDifferent(
      await answerTo(product, ours),
      await answerTo(floor, bare),
      await answerTo(walledFloor, walled),
    )
    const busy = (port: number, call: Call) => () =>
      answersPerSecond(port, { connections: CONNECTIONS, calls: Array<Call>(CALLS).fill(call) })
    return inTurns(
      {
        floor: busy(floor, bare),
        one: busy(product, ours),
        walled: busy(walledFloor, walled),
        many: busy(productOfMany, ours),
      },
      ROUNDS,
    )
  })
  return describe(rates)
}

/** A floor that answers something else is the floor of another house. */
function refuseDifferent(first: string, ...others: string[]): void {
  for (const other of others) {
    if (isDeepStrictEqual(JSON.parse(first), JSON.parse(other))) continue
    throw new Error(`The product and the floor answer differently:\n${first}\n${other}`)
  }
}

function describe(rates: Record<'floor' | 'one' | 'walled' | 'many', number>): Finding[] {
  const unit = 'requests/s'
  return [
    find({
      name: 'public clinic list, bare handler',
      unit,
      ours: rates.one,
      floor: rates.floor,
      goal: { at: 'least', ratio: 0.5 },
    }),
    find({
      name: 'public clinic list, handler with row-level security',
      unit,
      ours: rates.one,
      floor: rates.walled,
      goal: { at: 'least', ratio: 0.8 },
    }),
    find({
      name: 'public clinic list, 1,000 academies beside 1',
      unit,
      ours: rates.many,
      floor: rates.one,
      goal: { at: 'least', ratio: 0.85 },
    }),
  ]
}
