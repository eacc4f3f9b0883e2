import { Agent, request } from 'node:http'
import { pathOf, type RouteKey } from '@marram/contract'
import { afterAll, beforeAll, expect, it } from 'vitest'
import { findAcademyBySlug } from '../../apps/api/src/platform/tenancy/look-ups'
import { askPageOf, inAcademy, inPlain } from '../../apps/api/src/platform/tenancy/transaction'
import { listVenues } from '../../apps/api/src/venues/queries'
import { openAcademy } from '../support/builders'
import { useWorld } from '../support/use-world'

const TURNS = 10_000
/** Whole requests cost more: ten thousand of them are for the long run of the tests. */
const REQUESTS = process.env['MARRAM_DEEP'] ? 10_000 : 1_000
const AT_ONCE = 16
const BOUND_MS = 180_000

interface Marked {
  academyId: string
  slug: string
  /** A word that nobody else's rows have. */
  mark: string
  cookie: string
}

const world = await useWorld({ poolSize: 2 })
const { db } = world.services
const agent = new Agent({ keepAlive: true, maxSockets: AT_ONCE })
let academies: Marked[]

beforeAll(async () => {
  academies = [await openMarked('heron'), await openMarked('plover')]
})
afterAll(() => agent.destroy())

async function openMarked(mark: string): Promise<Marked> {
  const { slug, owner, venue } = await openAcademy(world, {
    clinic: { title: `The ${mark} hour` },
  })
  await owner.person.must('venues.change', {
    params: { academy: slug, venueId: venue.id },
    body: { name: `The ${mark} range` },
  })
  const academyId = (await findAcademyBySlug(db, slug)) ?? ''
  return { academyId, slug, mark, cookie: `marram=${owner.person.cookie('marram') ?? ''}` }
}

/** Lets the academies take turns, many at once, and gathers what was wrong with an answer. */
async function takeTurns(
  count: number,
  read: (academy: Marked, round: number) => Promise<string>,
): Promise<{ wrong: string[]; turns: Record<string, number> }> {
  const wrong: string[] = []
  const turns: Record<string, number> = {}
  let next = 0
  const go = async () => {
    while (next < count) {
      const turn = next
      next += 1
      const own = academies[turn % 2]!
      const other = academies[(turn + 1) % 2]!
      const text = await read(own, Math.floor(turn / 2))
      if (!text.includes(own.mark) || text.includes(other.mark)) wrong.push(text)
      turns[own.mark] = (turns[own.mark] ?? 0) + 1
    }
  }
  await Promise.all(Array.from({ length: AT_ONCE }, go))
  return { wrong: wrong.slice(0, 3), turns }
}

const half = (count: number) => ({ heron: count / 2, plover: count / 2 })
const namesOf = (rows: readonly { name: string }[]) => rows.map(({ name }) => name).join(', ')

const NAMES = { name: 'names', text: 'SELECT name FROM venues', values: [] }

/** The roads on which a transaction comes by its academy, and the ways in which it ends. */
const TRANSACTIONS: ((academy: Marked) => Promise<string>)[] = [
  ({ academyId }) => inAcademy(db, academyId, async (trx) => namesOf(await listVenues(trx))),
  ({ academyId }) => inAcademy(db, academyId, async (trx) => namesOf(await trx('venues'))),
  async ({ slug }) => namesOf(await askPageOf<{ name: string }>(db, slug, NAMES)),
  async ({ slug, mark }) => {
    const broken = askPageOf(db, slug, { name: 'broken', text: 'SELECT 1 / 0', values: [] })
    return broken.then(
      () => 'nobody',
      () => `${mark}: a question that failed`,
    )
  },
  async ({ academyId }) => {
    let seen = ''
    const undone = inAcademy(db, academyId, async (trx) => {
      await trx('venues').update({ address: 'Nowhere' })
      seen = namesOf(await trx('venues'))
      throw new Error('undo')
    })
    await undone.catch(() => {})
    return seen
  },
  async ({ mark }) => {
    const rows = await inPlain(db, async (trx) => namesOf(await trx('venues')))
    return rows || `${mark}: nothing outside an academy`
  },
]

it(
  'keeps two academies apart over ten thousand transactions on two connections',
  async () => {
    const seen = await takeTurns(TURNS, async (academy, round) =>
      TRANSACTIONS[round % TRANSACTIONS.length]!(academy),
    )
    expect(seen).toEqual({ wrong: [], turns: half(TURNS) })
  },
  BOUND_MS,
)

const READINGS = ['page.read', 'venues.list', 'clinics.list'] as const

it(
  'keeps two academies apart over as many requests as there is time for',
  async () => {
    const seen = await takeTurns(REQUESTS, (academy, round) =>
      get(READINGS[round % READINGS.length]!, academy),
    )
    expect(seen).toEqual({ wrong: [], turns: half(REQUESTS) })
  },
  BOUND_MS,
)

function get(key: RouteKey, { slug, cookie }: Marked): Promise<string> {
  const url = `${world.url}${pathOf(key, { academy: slug })}`
  return new Promise((resolve, reject) => {
    const asked = request(url, { agent, headers: { cookie } }, (response) => {
      let text = ''
      response.setEncoding('utf8')
      response.on('data', (chunk: string) => (text += chunk))
      response.on('end', () => resolve(text))
    })
    asked.on('error', reject)
    asked.end()
  })
}
