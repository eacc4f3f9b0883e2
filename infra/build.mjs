import { createHash } from 'node:crypto'
import { existsSync, readFileSync, readdirSync, statSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { step } from './console.mjs'
import { run } from './run.mjs'

const SOURCES = ['apps', 'packages', 'index.html', 'vite.config.ts', 'package-lock.json']

/** Builds the web app and the API's processes, unless nothing changed since the last time. */
export async function ensureBuild(root) {
  const wanted = fingerprint(root)
  const stamp = join(root, 'dist', '.marram-built')
  if (existsSync(stamp) && readFileSync(stamp, 'utf8') === wanted) return
  const vite = join(root, 'node_modules', 'vite', 'bin', 'vite.js')
  await step('Building the web app', () => run(process.execPath, [vite, 'build'], { cwd: root }))
  await step('Building the server', () =>
    run(process.execPath, [vite, 'build', '--config', 'apps/api/vite.config.ts'], { cwd: root }),
  )
  writeFileSync(stamp, wanted)
}

/** Changes with any source: its path, its size and when it was written. */
function fingerprint(root) {
  const hash = createHash('sha256')
  const visit = (path) => {
    const stats = statSync(join(root, path))
    if (stats.isDirectory()) {
      for (const name of readdirSync(join(root, path)).sort()) {
        if (name !== 'node_modules') visit(join(path, name))
      }
      return
    }
    hash.update(`${path}\0${stats.size}\0${stats.mtimeMs}\n`)
  }
  for (const source of SOURCES.filter((name) => existsSync(join(root, name)))) visit(source)
  return hash.digest('hex')
}
