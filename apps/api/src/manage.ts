import { resolve } from 'node:path'
import { z } from 'zod'
import { loadDemo } from './demo/load'
import { readConfigOrExit, makeServices } from './platform/boot'
import { makeMovableClock, systemClock } from './platform/clock'
import { makeDatabase, makeRoles, prepareDatabase } from './platform/db/bootstrap'
import { connect } from './platform/db/connect'
import { migrate } from './platform/db/migrate'
import { makeQueues } from './platform/outbox/outbox'

const preparation = z.object({
  MARRAM_SUPERUSER_DATABASE_URL: z.string(),
  MARRAM_DATABASE_NAME: z.string().regex(/^[a-z][a-z0-9_]*$/),
  MARRAM_OWNER_PASSWORD: z.string().min(8),
  MARRAM_APP_PASSWORD: z.string().min(8),
  MARRAM_DISPATCH_PASSWORD: z.string().min(8),
  MARRAM_MIGRATIONS_FOLDER: z.string().default('migrations'),
})

/** Makes the roles, the database and its schema, or brings them up to date. */
async function prepare(): Promise<void> {
  const env = preparation.parse(process.env)
  const rootUrl = new URL(env.MARRAM_SUPERUSER_DATABASE_URL)
  const at = (user: { name: string; password: string } | null) => {
    const url = new URL(rootUrl)
    url.pathname = `/${env.MARRAM_DATABASE_NAME}`
    if (user) Object.assign(url, { username: user.name, password: user.password })
    return url.toString()
  }
  const root = connect({ url: rootUrl.toString(), poolSize: 1, name: 'marram-manage' })
  await makeRoles(root, {
    owner: env.MARRAM_OWNER_PASSWORD,
    app: env.MARRAM_APP_PASSWORD,
    dispatch: env.MARRAM_DISPATCH_PASSWORD,
  })
  const { isNew } = await makeDatabase(root, env.MARRAM_DATABASE_NAME)
  await root.destroy()
  if (isNew) {
    const there = connect({ url: at(null), poolSize: 1, name: 'marram-manage' })
    await prepareDatabase(there)
    await there.destroy()
  }
  const url = at({ name: 'marram_owner', password: env.MARRAM_OWNER_PASSWORD })
  const owner = connect({ url, poolSize: 1, name: 'marram-manage' })
  const applied = await migrate(owner, resolve(env.MARRAM_MIGRATIONS_FOLDER))
  await makeQueues({ url, knex: owner })
  await owner.destroy()
  process.stdout.write(`${applied.length} migrations applied\n`)
}

/** Loads the demo academies, unless some academy is there already. */
async function demo(): Promise<void> {
  const config = readConfigOrExit()
  const clock = makeMovableClock(systemClock.now())
  const services = makeServices(config, { name: 'marram-demo', clock })
  try {
    await loadDemo(services, { clock, say: (line) => process.stdout.write(`${line}\n`) })
  } finally {
    await services.db.destroy()
  }
}

const commands: Record<string, () => Promise<void>> = { prepare, demo }
const [, , name = ''] = process.argv
const command = commands[name]
if (!command) {
  process.stderr.write(
    `There is no command "${name}". There are: ${Object.keys(commands).join(', ')}.\n`,
  )
  process.exit(64)
}
await command()
