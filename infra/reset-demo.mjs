import { existsSync, readFileSync } from 'node:fs'
import { dirname, join, resolve } from 'node:path'
import { fileURLToPath } from 'node:url'
import { ensurePostgres } from './postgres.mjs'
import { say } from './console.mjs'
import { forgetDemo } from './demo-data.mjs'

const root = resolve(dirname(fileURLToPath(import.meta.url)), '..')
const folder = join(root, '.marram', 'demo')

/** Forgets the demo's data, so that the next start loads it anew. Packages and builds stay. */
if (isRunning()) {
  process.stderr.write('  The demo runs. Stop it first, then reset it.\n')
  process.exit(1)
}
const cluster = await ensurePostgres({ folder, say })
await forgetDemo({ folder, cluster })
await cluster.stop()
say('The demo is forgotten. The next "npm start" loads it anew.')

function isRunning() {
  const lock = join(folder, 'running.json')
  if (!existsSync(lock)) return false
  const { pid } = JSON.parse(readFileSync(lock, 'utf8') || '{}')
  try {
    return readFileSync(`/proc/${pid}/cmdline`, 'utf8').includes('infra/start.mjs')
  } catch {
    return false
  }
}
