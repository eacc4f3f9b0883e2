import type { Knex } from 'knex'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { connect } from '../../apps/api/src/platform/db/connect'
import { inPlain, type AcademyTrx } from '../../apps/api/src/platform/tenancy/transaction'
import { takeDatabase, type TestDatabase } from '../support/database'
import {
  AREA,
  OURS,
  THEIRS,
  TwinArea,
  TwinVenue,
  VENUE,
  areaRow,
  inOurs,
  makeTwins,
  venueRow,
} from './twins'

/** The model layer alone: connected as the superuser, whom no row-level security holds. */
let database: TestDatabase
let db: Knex

beforeAll(async () => {
  database = await takeDatabase()
  db = connect({ url: database.superuserUrl, poolSize: 2, name: 'tests' })
  await makeTwins(db)
})
afterAll(async () => {
  await db.destroy()
  await database.drop()
})

const namesOf = (rows: readonly { name: string }[]) => rows.map(({ name }) => name)

describe('without the model layer', () => {
  it('this connection sees both academies', async () => {
    expect(await db('venues').where({ id: VENUE })).toHaveLength(2)
  })
})

describe('reading', () => {
  const readings: [string, (trx: AcademyTrx) => PromiseLike<{ name: string }[]>][] = [
    ['find', (trx) => TwinVenue.query(trx)],
    ['where', (trx) => TwinVenue.query(trx).where({ id: VENUE })],
    ['orWhere at the top', (trx) => TwinVenue.query(trx).where({ id: VENUE }).orWhere('id', AREA)],
    ['orWhere first', (trx) => TwinVenue.query(trx).orWhereRaw('true')],
    [
      'orWhere inside a group',
      (trx) =>
        TwinVenue.query(trx).where((group) => {
          void group.where({ id: AREA }).orWhere((inner) => {
            void inner.where({ id: VENUE }).orWhereRaw('true')
          })
        }),
    ],
    ['whereNot', (trx) => TwinVenue.query(trx).whereNot({ id: AREA })],
    [
      'orWhere of the other academy',
      (trx) => TwinVenue.query(trx).where({ id: VENUE }).orWhere({ academyId: THEIRS }),
    ],
    ['under an alias', (trx) => TwinVenue.query(trx).alias('v').orWhereRaw('true')],
    ['a union', (trx) => TwinVenue.query(trx).unionAll(TwinVenue.query(trx).where('id', AREA))],
    ['a page', async (trx) => (await TwinVenue.query(trx).orWhereRaw('true').page(0, 9)).results],
    ['a sum over its group', (trx) => TwinVenue.query(trx).select('name').groupBy('name')],
    [
      'a sub-query in where',
      (trx) => TwinVenue.query(trx).whereIn('id', TwinArea.query(trx).select('venueId')),
    ],
    [
      'an existing related row',
      (trx) => TwinVenue.query(trx).whereExists(TwinVenue.relatedQuery('areas')),
    ],
    ['a joined relation', (trx) => TwinVenue.query(trx).joinRelated('areas').select('venues.name')],
    [
      'a joined relation with or',
      (trx) => TwinVenue.query(trx).joinRelated('areas').orWhereRaw('true').select('venues.name'),
    ],
  ]

  it.each(readings)('%s finds our row and not its twin', async (_, read) => {
    expect(namesOf(await inOurs(db, async (trx) => read(trx)))).toEqual(['Venue of ours'])
  })

  it('counts our rows only', async () => {
    const counts = await inOurs(db, async (trx) => ({
      size: await TwinVenue.query(trx).orWhereRaw('true').resultSize(),
      page: (await TwinVenue.query(trx).orWhereRaw('true').page(0, 1)).total,
    }))
    expect(counts).toEqual({ size: 1, page: 1 })
  })

  it('finds nothing under the key of the other academy', async () => {
    const found = await inOurs(db, async (trx) => TwinVenue.query(trx).findById([THEIRS, VENUE]))
    expect(found).toBeUndefined()
  })
})

describe('relations joined by id alone', () => {
  const graphs: [string, (trx: AcademyTrx) => PromiseLike<TwinVenue[]>][] = [
    ['fetched', (trx) => TwinVenue.query(trx).withGraphFetched('areas')],
    ['fetched two steps deep', (trx) => TwinVenue.query(trx).withGraphFetched('areas.venue')],
    ['joined', (trx) => TwinVenue.query(trx).withGraphJoined('areas')],
    [
      'fetched with or',
      (trx) =>
        TwinVenue.query(trx)
          .withGraphFetched('areas')
          .modifyGraph('areas', (areas) => void areas.orWhereRaw('true')),
    ],
  ]

  it.each(graphs)('a graph that is %s holds our rows only', async (_, read) => {
    const [venue, ...others] = await inOurs(db, async (trx) => read(trx))
    expect(others).toEqual([])
    expect(namesOf(venue?.areas ?? [])).toEqual(['Area of ours'])
    expect(venue?.areas?.[0]?.venue?.name ?? 'Venue of ours').toBe('Venue of ours')
  })

  it('a relation asked for by a sub-query holds our rows only', async () => {
    const areas = await inOurs(db, async (trx) =>
      TwinVenue.relatedQuery('areas', trx).for(TwinVenue.query(trx).where({ id: VENUE })),
    )
    expect(namesOf(areas)).toEqual(['Area of ours'])
  })

  it("a relation of another academy's row holds our rows only", async () => {
    const forged = TwinVenue.fromJson({ academyId: THEIRS, ...venueRow('forged') })
    const areas = await inOurs(db, async (trx) => forged.$relatedQuery('areas', trx))
    expect(namesOf(areas)).toEqual(['Area of ours'])
  })
})

describe('writing', () => {
  /** Tries something out and takes it back. Resolves to the names of both venues, ours first. */
  async function namesAfter(work: (trx: AcademyTrx) => PromiseLike<unknown>): Promise<string[]> {
    let names: string[] = []
    const undo = new Error('undo')
    const tried = inOurs(db, async (trx) => {
      await work(trx)
      names = namesOf(await trx<{ name: string }>('venues').orderBy('academyId'))
      throw undo
    })
    await expect(tried).rejects.toBe(undo)
    return names
  }
  const NEW_ID = '01900000-0000-7000-8000-000000000003'

  it.each([
    ['patch', (trx: AcademyTrx) => TwinVenue.query(trx).patch({ name: 'changed' })],
    [
      'patch with or',
      (trx: AcademyTrx) =>
        TwinVenue.query(trx).patch({ name: 'changed' }).where('id', AREA).orWhere('id', VENUE),
    ],
    [
      'patch and fetch',
      (trx: AcademyTrx) =>
        TwinVenue.query(trx).patch({ name: 'changed' }).where({ id: VENUE }).returning('*'),
    ],
  ])('%s changes our row and not its twin', async (_, work) => {
    expect(await namesAfter(work)).toEqual(['changed', 'Venue of theirs'])
  })

  it("patch by the other academy's key changes nothing", async () => {
    const names = await namesAfter((trx) =>
      TwinVenue.query(trx).findById([THEIRS, VENUE]).patch({ name: 'changed' }),
    )
    expect(names).toEqual(['Venue of ours', 'Venue of theirs'])
  })

  it('delete takes our row and not its twin', async () => {
    const names = await namesAfter(async (trx) => {
      await TwinArea.query(trx).delete().orWhereRaw('true')
      await TwinVenue.query(trx).delete().orWhereRaw('true')
    })
    expect(names).toEqual(['Venue of theirs'])
  })

  it('insert is stamped with our academy', async () => {
    const inserted = await inOurs(db, async (trx) => {
      await TwinVenue.query(trx).insert({ ...venueRow('new'), id: NEW_ID })
      const found = await trx('venues').where('id', NEW_ID).first<{ academyId: string }>()
      await trx('venues').where('id', NEW_ID).delete()
      return found.academyId
    })
    expect(inserted).toBe(OURS)
  })

  it('insert over a twin changes ours', async () => {
    const names = await namesAfter((trx) =>
      TwinVenue.query(trx)
        .insert(venueRow('merged'))
        .onConflict(['academy_id', 'id'])
        .merge(['name']),
    )
    expect(names).toEqual(['merged', 'Venue of theirs'])
  })

  const forgeries: [string, (trx: AcademyTrx) => PromiseLike<unknown>][] = [
    [
      'inserted',
      (trx) => TwinVenue.query(trx).insert({ ...venueRow('x'), id: NEW_ID, academyId: THEIRS }),
    ],
    [
      'inserted among ours',
      (trx) =>
        TwinArea.query(trx).insert([
          { ...areaRow('x'), id: NEW_ID },
          { ...areaRow('y'), academyId: THEIRS },
        ]),
    ],
    ['patched into another academy', (trx) => TwinVenue.query(trx).patch({ academyId: THEIRS })],
    [
      'patched under the name of the column',
      // The type refuses it; a row that came from elsewhere might still carry it.
      (trx) => TwinVenue.query(trx).patch({ academy_id: THEIRS } as never),
    ],
    [
      'inserted under the name of the column',
      (trx) =>
        TwinVenue.query(trx).insert({ ...venueRow('x'), id: NEW_ID, academy_id: THEIRS } as never),
    ],
  ]

  it.each(forgeries)('a row of another academy is refused when %s', async (_, work) => {
    await expect(inOurs(db, async (trx) => work(trx))).rejects.toThrow(
      'a row of another academy was about to be written',
    )
  })
})

describe('outside an academy', () => {
  it.each([
    ['on the pool', async () => TwinVenue.query(db)],
    ['in a plain transaction', () => inPlain(db, async (trx) => TwinVenue.query(trx))],
    ['when it inserts', async () => TwinVenue.query(db).insert(venueRow('x'))],
    ['when it patches', async () => TwinVenue.query(db).patch({ name: 'x' })],
    ['when it deletes', async () => TwinVenue.query(db).delete()],
  ])('a query is refused %s', async (_, query) => {
    await expect(query()).rejects.toThrow('a query on academy rows ran outside an academy')
  })

  it('a query is refused on no connection at all', async () => {
    await expect(async () => TwinVenue.query()).rejects.toThrow('knex')
  })

  it('is where a transaction is again after it has ended', async () => {
    let floating: AcademyTrx | undefined
    await inOurs(db, async (trx) => {
      floating = trx
    })
    await expect(async () => TwinVenue.query(floating)).rejects.toThrow('already complete')
  })
})
