import express from 'express'
import { createServer } from 'node:http'
import pg from 'pg'
import { listen } from '../../apps/api/src/platform/boot'
import { holdBarely, type Wish } from './bare-hold'
import { PAGE, beginReadingAt } from './floor-sql'
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
    response.json({ id: await holdBarely(client, request.body as Wish) })
  } finally {
    client.release()
  }
})

sayPort(await listen(createServer(app), { port: 0, mode: 'test' }))
