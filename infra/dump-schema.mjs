import { writeFileSync } from 'node:fs'
import { dirname, join, resolve } from 'node:path'
import { fileURLToPath } from 'node:url'
import { copyDatabase } from '../tests/support/copy-database.ts'
import { makeTemplate } from '../tests/support/template.ts'
import { dumpSchema } from './schema.mjs'

/** Writes migrations/schema.sql anew, from a database made by the migrations. */
process.chdir(resolve(dirname(fileURLToPath(import.meta.url)), '..'))
const template = await makeTemplate()
const copy = await copyDatabase(template)
try {
  const file = join('migrations', 'schema.sql')
  writeFileSync(file, await dumpSchema({ bin: template.bin, url: copy.superuserUrl }))
  process.stdout.write(`Wrote ${file}.\n`)
} finally {
  await copy.drop()
}
