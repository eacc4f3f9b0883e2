import { existsSync, readFileSync, mkdirSync, rmSync } from 'node:fs'
import { dirname, join, resolve } from 'node:path'
import { spawn } from 'node:child_process'
import { fileURLToPath } from 'node:url'
import { ensurePackages } from './packages.mjs'
import { aptInstall, ensurePostgres } from './postgres.mjs'
import { Problem } from './problem.mjs'
import { run } from './run.mjs'

const root = resolve(dirname(fileURLToPath(import.meta.url)), '..')
const results = join(root, '.marram', 'results')

/** What the tests need of Debian, and how to see that it is there. */
const NEEDED = [
  { package: 'chromium', isThere: () => existsSync('/usr/bin/chromium') },
  { package: 'python3-dateutil', isThere: () => canImport('dateutil') },
  { package: 'python3-icalendar', isThere: () => canImport('icalendar') },
]

/** Each part of the tests, in order; with names on the command line, only those. */
const PARTS = [
  { name: 'types', command: ['tsc', '--noEmit'], counts: checkOnly },
  { name: 'lint', command: ['eslint', '.'], counts: checkOnly },
  { name: 'format', command: ['prettier', '--check', '.'], counts: checkOnly },
  { name: 'unit', command: vitest('unit'), counts: fromVitest },
  { name: 'api', command: vitest('api*'), counts: fromVitest },
  {
    name: 'browser',
    command: ['playwright', 'test', '--config', 'tests/e2e/playwright.config.ts'],
    counts: fromPlaywright,
    needsBuild: true,
  },
]

async function main() {
  const wanted = process.argv.slice(2).filter((name) => !name.startsWith('--'))
  const unknown = wanted.filter((name) => !PARTS.some((part) => part.name === name))
  if (unknown.length > 0) {
    throw new Problem(
      `There is no part "${unknown[0]}". There are: ${PARTS.map(({ name }) => name).join(', ')}.`,
    )
  }
  const env = { ...process.env, ...(process.argv.includes('--deep') ? { MARRAM_DEEP: '1' } : {}) }
  await ensurePackages(root)
  await ensureDebian()
  const cluster = await ensurePostgres({ folder: join(root, '.marram', 'test'), say: line })
  rmSync(results, { recursive: true, force: true })
  mkdirSync(results, { recursive: true })
  const total = { passed: 0, failed: 0 }
  try {
    for (const part of PARTS) {
      if (wanted.length > 0 && !wanted.includes(part.name)) continue
      const began = Date.now()
      line(`== ${part.name}`)
      if (part.needsBuild) await build()
      const code = await runPart(part, env)
      const { passed, failed } = part.counts({ name: part.name, code })
      // A run that broke off counts as a failure, whatever it had counted until then.
      const isBroken = code !== 0 && failed === 0
      total.passed += passed
      total.failed += failed + (isBroken ? 1 : 0)
      line(
        `   ${part.name}: ${passed} passed, ${failed + (isBroken ? 1 : 0)} failed, ${seconds(began)} s`,
      )
    }
  } finally {
    await cluster.stop().catch(() => {})
  }
  process.stdout.write(`${total.passed} passed, ${total.failed} failed\n`)
  process.exitCode = total.failed > 0 || total.passed === 0 ? 1 : 0
}

function vitest(project) {
  const output = `--outputFile=${join(results, `${project.replace('*', '')}.json`)}`
  return ['vitest', 'run', '--project', project, '--reporter=dot', '--reporter=json', output]
}

async function build() {
  const { ensureBuild } = await import('./build.mjs')
  await ensureBuild(root)
}

function runPart({ command }, env) {
  const [name, ...args] = command
  const program = join(root, 'node_modules', '.bin', name)
  return new Promise((done) => {
    const child = spawn(program, args, {
      cwd: root,
      env: { ...env, PLAYWRIGHT_JSON_OUTPUT_NAME: join(results, 'browser.json') },
      stdio: ['ignore', 'inherit', 'inherit'],
    })
    child.on('error', () => done(127))
    child.on('exit', (code) => done(code ?? 1))
  })
}

/** A check that only passes or fails as a whole. */
function checkOnly({ code }) {
  return code === 0 ? { passed: 1, failed: 0 } : { passed: 0, failed: 1 }
}

function fromVitest({ name }) {
  const report = readReport(name)
  return { passed: report?.numPassedTests ?? 0, failed: report?.numFailedTests ?? 0 }
}

function fromPlaywright({ name }) {
  const stats = readReport(name)?.stats
  return { passed: stats?.expected ?? 0, failed: (stats?.unexpected ?? 0) + (stats?.flaky ?? 0) }
}

function readReport(name) {
  const file = join(results, `${name}.json`)
  return existsSync(file) ? JSON.parse(readFileSync(file, 'utf8')) : null
}

async function ensureDebian() {
  const missing = []
  for (const need of NEEDED) {
    if (!(await need.isThere())) missing.push(need.package)
  }
  if (missing.length === 0) return
  if (process.getuid() !== 0) {
    throw new Problem(
      `The tests need ${missing.join(', ')}. Run "sudo apt-get install ${missing.join(' ')}" once.`,
    )
  }
  line(`Installing ${missing.join(', ')} from Debian packages`)
  await aptInstall(missing)
}

function canImport(module) {
  return run('/usr/bin/python3', ['-c', `import ${module}`]).then(
    () => true,
    () => false,
  )
}

const line = (text) => process.stdout.write(`${text}\n`)
const seconds = (began) => ((Date.now() - began) / 1000).toFixed(1)

try {
  await main()
} catch (error) {
  process.stderr.write(`${error instanceof Problem ? error.message : error.stack}\n`)
  process.stdout.write('0 passed, 1 failed\n')
  process.exitCode = 1
}
