import { existsSync, mkdirSync, rmSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { run } from './run.mjs'

const markOf = (folder) => join(folder, 'loading')
const loadedOf = (folder) => join(folder, 'loaded')

/** Forgets the demo's database and what the stand-ins remember of it. */
export async function forgetDemo({ folder, cluster }) {
  const server = `--maintenance-db=${cluster.url('postgres')}`
  await run(join(cluster.bin, 'dropdb'), ['--if-exists', '--force', server, 'marram'])
  rmSync(join(folder, 'fakes'), { recursive: true, force: true })
  rmSync(markOf(folder), { force: true })
  rmSync(loadedOf(folder), { force: true })
}

/** Whether the demo was being loaded when the power went: half of it is worth nothing. */
export const isHalfLoaded = (folder) => existsSync(markOf(folder))

/** Runs the loading. A first one that is cut off is seen at the next start; a later one harms nothing. */
export async function whileLoading(folder, load) {
  if (existsSync(loadedOf(folder))) return load()
  mkdirSync(folder, { recursive: true })
  writeFileSync(markOf(folder), '')
  await load()
  writeFileSync(loadedOf(folder), '')
  rmSync(markOf(folder), { force: true })
}
