import { spawn } from 'node:child_process'
import { dirname, resolve } from 'node:path'
import { fileURLToPath } from 'node:url'
import { ensurePackages } from './packages.mjs'
import { Problem } from './problem.mjs'

const root = resolve(dirname(fileURLToPath(import.meta.url)), '..')

/** Installs what is missing, then hands over to the measurements, which are TypeScript. */
async function main() {
  await ensurePackages(root)
  const args = ['--import', 'tsx', 'tests/load/bench.ts', ...process.argv.slice(2)]
  const child = spawn(process.execPath, args, { cwd: root, stdio: 'inherit' })
  process.exitCode = await new Promise((done) => child.on('exit', (code) => done(code ?? 1)))
}

try {
  await main()
} catch (error) {
  process.stderr.write(`${error instanceof Problem ? error.message : error.stack}\n`)
  process.exitCode = 1
}
