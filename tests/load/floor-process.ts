import express from 'express'
import { createHash } from 'node:crypto'
import { createServer } from 'node:http'
import pg from 'pg'
import { questionOf } from '../../apps/api/src/checkout/view-queries'
import { listen } from '../../apps/api/src/platform/boot'
import { holdBarely, type Wish } from './bare-hold'
import { PAGE, WHO_ASKS, beginReadingAt } from './floor-sql'
import { POOL_SIZE, sayPort } from './processes'

const pool = new pg.Pool({
  connectionString: process.env['BENCH_DATABASE_URL'],
  max: POOL_SIZE,
  // As the product's pool.
  pipeline: true,
})
const app = express()

/** Named, so that the floor too plans its question once for each connection. */
const pageOf = (slug: string) => ({ name: 'page', text: PAGE, values: [slug, new Date()] })

/** The bare handler: one question, one answer. */
app.get('/page/:slug', async (request, response) => {
  const { rows } = await pool.query<{ page: object }>(pageOf(request.params.slug))
  response.json(rows[0]?.page)
})

/** The same in a transaction that row-level security can read its academy from, sent at once. */
app.get('/walled-page/:slug', async (request, response) => {
  const { slug } = request.params
  const client = await pool.connect()
  try {
    const [, { rows }] = await Promise.all([
      client.query(beginReadingAt(slug)),
      client.query<{ page: object }>(pageOf(slug)),
      client.query('COMMIT'),
    ])
    response.json(rows[0]?.page)
  } finally {
    client.release()
  }
})

/** A hold as bare SQL; who asks is believed. */
app.post('/holds', express.json(), async (request, response) => {
  const client = await pool.connect()
  try {
    // Only the bench sends anything here.
    const { id } = await holdBarely(client, request.body as Wish)
    response.json({ id })
  } finally {
    client.release()
  }
})

/** The same by somebody who is signed in, and with the enrolment as the answer. */
app.post('/signed-in-holds', express.json(), async (request, response) => {
  const client = await pool.connect()
  try {
    const token = /marram=s%3A([\w-]+)/.exec(request.get('cookie') ?? '')?.[1] ?? ''
    const idHash = createHash('sha256').update(token).digest()
    const { rows } = await client.query<{ id: string }>({
      name: 'who-asks',
      text: WHO_ASKS,
      values: [idHash],
    })
    const [person] = rows
    if (!person) {
      response.status(401).end()
      return
    }
    const wish = { ...(request.body as Wish), accountId: person.id }
    const { shown } = await holdBarely(client, wish, async (id) => {
      const { name, text, values } = questionOf({ id })
      const views = await client.query<{ view: object }>({ name, text, values: [...values] })
      return views.rows[0]?.view ?? null
    })
    response.json(shown)
  } finally {
    client.release()
  }
})

sayPort(await listen(createServer(app), { port: 0, mode: 'test' }))
