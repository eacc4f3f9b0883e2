import { spawn } from 'node:child_process'
import { dirname, join, resolve } from 'node:path'
import { fileURLToPath } from 'node:url'
import { ensurePackages } from './packages.mjs'
import { ensurePostgres } from './postgres.mjs'
import { Problem } from './problem.mjs'

const root = resolve(dirname(fileURLToPath(import.meta.url)), '..')

/** Makes sure of what the measurements need, then hands over to them; they are TypeScript. */
async function main() {
  await ensurePackages(root)
  const say = (text) => process.stderr.write(`${text}\n`)
  const cluster = await ensurePostgres({ folder: join(root, '.marram', 'test'), say })
  try {
    const args = ['--import', 'tsx', 'tests/load/bench.ts', ...process.argv.slice(2)]
    const child = spawn(process.execPath, args, { cwd: root, stdio: 'inherit' })
    process.exitCode = await new Promise((done) => child.on('exit', (code) => done(code ?? 1)))
  } finally {
    await cluster.stop().catch(() => {})
  }
}

try {
  await main()
} catch (error) {
  process.stderr.write(`${error instanceof Problem ? error.message : error.stack}\n`)
  process.exitCode = 1
}
