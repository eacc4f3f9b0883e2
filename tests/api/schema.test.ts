import { readFileSync } from 'node:fs'
import { expect, inject, it } from 'vitest'
import { dumpSchema } from '../../infra/schema.mjs'
import { takeDatabase } from '../support/database'

const majorOf = (text: string) => /PostgreSQL (\d+)/.exec(text)?.[1]

it('migrations/schema.sql says what the migrations make', async (context) => {
  const written = readFileSync('migrations/schema.sql', 'utf8')
  const database = await takeDatabase()
  try {
    const made = await dumpSchema({ bin: inject('postgresBin'), url: database.superuserUrl })
    // Each major version prints the same schema in its own way.
    context.skip(majorOf(made) !== majorOf(written), `printed by PostgreSQL ${majorOf(written)}`)
    expect(made, 'Run "npm run schema" and commit what it writes.').toBe(written)
  } finally {
    await database.drop()
  }
})
