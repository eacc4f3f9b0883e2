import { createHash } from 'node:crypto'
import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs'
import { dirname, join } from 'node:path'
import { step } from './console.mjs'
import { Problem, explain } from './problem.mjs'
import { run } from './run.mjs'

const STAMP = 'node_modules/.marram-installed'

/** Installs the dependencies from the lock file, unless just these are there already. */
export async function ensurePackages(root) {
  const wanted = createHash('sha256')
    .update(readFileSync(join(root, 'package-lock.json')))
    .update(process.version)
    .digest('hex')
  const stamp = join(root, STAMP)
  if (existsSync(stamp) && readFileSync(stamp, 'utf8') === wanted) return
  await step('Installing packages from the lock file (one or two minutes)', () => install(root))
  mkdirSync(dirname(stamp), { recursive: true })
  writeFileSync(stamp, wanted)
}

async function install(root) {
  try {
    await run('npm', ['ci', '--no-audit', '--no-fund', '--loglevel=error'], { cwd: root })
  } catch (error) {
    const known = explain(error, { doing: 'the installation of packages' })
    if (known instanceof Problem) throw known
    const reason = (error.stderr ?? '').trim().split('\n').slice(-2).join(' ')
    throw new Problem(
      `The packages could not be installed (${reason}). Check the network, then start again.`,
    )
  }
}
