import express from 'express'
import { listenOnLoopback } from '../../packages/fakes/src/listen'
import { copyDatabase } from '../support/copy-database'
import type { Template } from '../support/template'
import { makeWorld } from '../support/world'

/**
 * The whole product with its pages, on a database of its own and with a clock that tests move. Prints
 * where it is as one line of JSON, and ends when its input does.
 */
const template = JSON.parse(process.env['MARRAM_TEST_TEMPLATE'] ?? '{}') as Template
const world = await makeWorld({
  database: await copyDatabase(template),
  hasPages: true,
  poolSize: 4,
})

const control = express()
control.use(express.json())
control.post('/drain', async (_request, response) => {
  await world.drain()
  response.json({})
})
control.post('/sweep', async (_request, response) => {
  await world.sweep()
  response.json({})
})
control.post('/clock', (request, response) => {
  const { at } = request.body as { at: string }
  world.clock.moveTo(new Date(at))
  response.json({})
})
const { url: controlUrl, server } = await listenOnLoopback(control, {})

process.stdout.write(
  `${JSON.stringify({
    url: world.url,
    controlUrl,
    mailUrl: world.mail.url,
    begins: world.clock.now().toISOString(),
  })}\n`,
)

process.stdin.on('end', () => {
  server.close()
  server.closeAllConnections()
  world.close().then(
    () => process.exit(0),
    (error: unknown) => {
      process.stderr.write(`${String(error)}\n`)
      process.exit(1)
    },
  )
})
process.stdin.resume()
