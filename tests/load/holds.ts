import type pg from 'pg'
import { holdPlaces } from '../../apps/api/src/enrolments/enrolments'
import { makeServices } from '../../apps/api/src/platform/boot'
import { holdBarely, type Wish } from './bare-hold'
import { benchConfig } from './bench-config'
import type { BenchDatabase } from './database'
import { withServers } from './processes'
import { find, inTurns, type Finding } from './rounds'
import { signGolfersIn } from './signed-in'
import { answersPerSecond, type Call } from './traffic'
import { forgetHolds } from './wishes'

const ROUNDS = 7
const HOLDS = 400
const AT_ONCE = 8

/** The use case against bare SQL, both over the product's own pool and in this process. */
export async function measureHoldsInProcess(
  database: BenchDatabase,
  wishes: readonly Wish[],
): Promise<Finding> {
  const services = makeServices(benchConfig(database), { name: 'bench-holds' })
  // Knex types its client as anything; what its pool holds are the driver's clients.
  const pool = services.db.client as {
    acquireConnection(): Promise<pg.Client>
    releaseConnection(client: pg.Client): Promise<void>
  }
  const useCase = ({ academyId, clinicId, sessionId, accountId }: Wish) =>
    holdPlaces(
      services,
      {
        academyId,
        person: { id: accountId, name: 'Golfer', email: 'golfer@mail.example', isVerified: true },
        wanted: { clinicId, sessionId, for: { kind: 'me' }, hasAcceptedWaiver: true },
      },
      (_, id) => Promise.resolve(id),
    )
  const bare = async (wish: Wish) => {
    const client = await pool.acquireConnection()
    try {
      const { id } = await holdBarely(client, wish)
      return id
    } finally {
      await pool.releaseConnection(client)
    }
  }
  const busy = (hold: (wish: Wish) => Promise<string>) => async () => {
    await forgetHolds(database)
    return holdsPerSecond(wishes, hold)
  }
  try {
    const rates = await inTurns({ bare: busy(bare), useCase: busy(useCase) }, ROUNDS)
    return find({
      name: 'holds in process, bare SQL over the same pool',
      unit: 'holds/s',
      ours: rates.useCase,
      floor: rates.bare,
      goal: { at: 'least', ratio: 0.5 },
    })
  } finally {
    await services.db.destroy()
  }
}

async function holdsPerSecond(
  wishes: readonly Wish[],
  hold: (wish: Wish) => Promise<string>,
): Promise<number> {
  const wanted = wishes.slice(0, HOLDS).values()
  const began = performance.now()
  const keepBusy = async (): Promise<void> => {
    for (const wish of wanted) await hold(wish)
  }
  await Promise.all(Array.from({ length: AT_ONCE }, keepBusy))
  return (HOLDS * 1000) / (performance.now() - began)
}

/** The API against bare handlers around the same SQL, each in a process of its own. */
export async function measureHoldsOverHttp(
  database: BenchDatabase,
  wishes: readonly Wish[],
): Promise<Finding[]> {
  const rates = await withServers(async (start) => {
    const product = await start('product', database.url)
    const floor = await start('floor', database.url)
    const headersOf = await signGolfersIn(database, product)
    const callsTo = (path: string, bodyOf: (wish: Wish) => object): Call[] =>
      wishes.slice(0, HOLDS).map((wish) => ({
        method: 'POST',
        path,
        headers: headersOf.get(wish.accountId) ?? {},
        body: JSON.stringify(bodyOf(wish)),
      }))
    const busy = (port: number, calls: readonly Call[]) => async () => {
      await forgetHolds(database)
      return answersPerSecond(port, { connections: AT_ONCE, calls })
    }
    const ours = callsTo('/api/academies/links-1/my/enrolments', ({ clinicId, sessionId }) => ({
      clinicId,
      sessionId,
      for: { kind: 'me' },
      hasAcceptedWaiver: true,
    }))
    return inTurns(
      {
        bare: busy(
          floor,
          callsTo('/holds', (wish) => wish),
        ),
        ours: busy(product, ours),
        signedIn: busy(
          floor,
          callsTo('/signed-in-holds', (wish) => wish),
        ),
      },
      ROUNDS,
    )
  })
  const about = { unit: 'holds/s', ours: rates.ours, goal: { at: 'least', ratio: 0.6 } } as const
  return [
    find({ ...about, name: 'holds over HTTP, bare handler with that SQL', floor: rates.bare }),
    find({
      ...about,
      name: 'holds over HTTP, handler that knows who asks and answers the same',
      floor: rates.signedIn,
    }),
  ]
}
