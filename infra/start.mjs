import { existsSync, mkdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { dirname, join, resolve } from 'node:path'
import { fileURLToPath } from 'node:url'
import { ensureBuild } from './build.mjs'
import { makeChildren, waitUntilReady } from './children.mjs'
import { say, step } from './console.mjs'
import { forgetDemo, isHalfLoaded, whileLoading } from './demo-data.mjs'
import { ensurePackages } from './packages.mjs'
import { ensurePostgres } from './postgres.mjs'
import { Problem, explain } from './problem.mjs'
import { run } from './run.mjs'
import { chooseFakePorts, choosePort, demoEnvironment, readSecrets } from './settings.mjs'

const root = resolve(dirname(fileURLToPath(import.meta.url)), '..')
const folder = join(root, '.marram', 'demo')
const isDevelopment = process.argv.includes('--dev')

/** Starts the demo: database, stand-ins, web process and worker, in that order. */
async function main() {
  requireNode()
  process.stdout.write('\nMarram\n\n')
  const lock = takeLock()
  let cluster
  let children
  let isStopping = false
  const stop = async (code) => {
    if (isStopping) return
    isStopping = true
    process.stdout.write('\n  Stopping\n')
    await children?.stop()
    await cluster?.stop().catch(() => {})
    rmSync(lock, { force: true })
    process.exit(code)
  }
  process.on('SIGINT', () => void stop(0))
  process.on('SIGTERM', () => void stop(0))
  try {
    await ensurePackages(root)
    if (!isDevelopment) await ensureBuild(root)
    cluster = await ensurePostgres({ folder, say })
    children = makeChildren({
      logs: join(folder, 'logs'),
      onUnexpectedEnd: ({ name, log }) => {
        process.stderr.write(`\n  ${name} ended unexpectedly. Its last words are in ${log}.\n`)
        void stop(1)
      },
    })
    await up({ cluster, children, lock })
  } catch (error) {
    const known = explain(error, { doing: 'the start' })
    process.stderr.write(`\n  ${known instanceof Problem ? known.message : known.stack}\n`)
    await stop(1)
  }
}

async function up({ cluster, children, lock }) {
  if (isHalfLoaded(folder)) {
    await step('Clearing a demo that was cut off while it was loaded', () =>
      forgetDemo({ folder, cluster }),
    )
  }
  const secrets = readSecrets(folder)
  const port = await choosePort(process.env.MARRAM_PORT)
  const ports = await chooseFakePorts(folder)
  const webPort = isDevelopment ? await choosePort(undefined).then((free) => free + 1) : port
  const publicUrl = `http://127.0.0.1:${webPort}`
  const base = demoEnvironment({ cluster, secrets, publicUrl, port, ports, folder })
  const entry = (name) => entryOf(name)
  const fakes = await children.startAndHear('stand-ins', ...entry('fakes'), {
    env: base,
    cwd: root,
  })
  const env = { ...base, MARRAM_MAIL_WEBHOOK_PUBLIC_KEY: fakes.mailWebhookPublicKey }

  const [program, args] = entry('manage')
  await whileLoading(folder, async () => {
    await step('Bringing the schema up to date', () =>
      run(program, [...args, 'prepare'], { env, cwd: root }),
    )
    await step('Looking after the demo (half a minute the first time)', () =>
      run(program, [...args, 'demo'], { env, cwd: root }),
    )
  })
  children.start('web', ...entry('main'), { env, cwd: root })
  children.start('worker', ...entry('worker'), { env, cwd: root })
  await waitUntilReady(`http://127.0.0.1:${port}/readyz`, { seconds: 30 })
  if (isDevelopment) {
    const vite = join(root, 'node_modules', 'vite', 'bin', 'vite.js')
    const listen = ['--host', '127.0.0.1', '--port', String(webPort), '--strictPort']
    const viteEnv = { ...process.env, MARRAM_API_PORT: String(port) }
    children.start('vite', process.execPath, [vite, ...listen], { env: viteEnv, cwd: root })
    await waitUntilReady(publicUrl, { seconds: 30 })
  }
  writeFileSync(lock, JSON.stringify({ pid: process.pid, url: publicUrl }))
  await announce({ publicUrl, mailbox: `http://127.0.0.1:${ports.mail}`, port })
}

/** How an entry is run: built, or from its source with reload in development. */
function entryOf(name) {
  if (!isDevelopment)
    return [process.execPath, ['--enable-source-maps', join(root, 'dist', 'api', `${name}.js`)]]
  const source = name === 'fakes' ? 'packages/fakes/src/run.ts' : `apps/api/src/${name}.ts`
  const tsx = join(root, 'node_modules', 'tsx', 'dist', 'cli.mjs')
  const isLongRunning = name !== 'manage' && name !== 'fakes'
  return [
    process.execPath,
    [tsx, ...(isLongRunning ? ['watch', '--clear-screen=false'] : []), source],
  ]
}

async function announce({ publicUrl, mailbox, port }) {
  const answer = await fetch(`http://127.0.0.1:${port}/api/demo-people`)
  const { people, password } = await answer.json()
  const width = Math.max(...people.map(({ email }) => email.length))
  const lines = people.map(
    ({ email, name, what, academy }) => `    ${email.padEnd(width)}  ${name}, ${what} (${academy})`,
  )
  process.stdout.write(
    [
      '',
      `  Marram is at ${publicUrl}`,
      '',
      `  Sign in as one of these; the password of each is: ${password}`,
      ...lines,
      '',
      `  Mail that was sent: ${mailbox}`,
      '  Stop with Ctrl-C.',
      '',
      '',
    ].join('\n'),
  )
}

/** One start at a time in one checkout; what a killed one left behind is taken over. */
function takeLock() {
  mkdirSync(folder, { recursive: true })
  const lock = join(folder, 'running.json')
  if (existsSync(lock)) {
    const { pid, url } = JSON.parse(readFileSync(lock, 'utf8') || '{}')
    if (pid && isStart(pid)) {
      process.stderr.write(
        `  This checkout runs already${url ? ` at ${url}` : ''} (process ${pid}). Stop it there first.\n`,
      )
      process.exit(1)
    }
  }
  writeFileSync(lock, JSON.stringify({ pid: process.pid }))
  return lock
}

function isStart(pid) {
  try {
    return readFileSync(`/proc/${pid}/cmdline`, 'utf8').includes('infra/start.mjs')
  } catch {
    return false
  }
}

function requireNode() {
  const [major = 0, minor = 0] = process.versions.node.split('.').map(Number)
  if (major === 20 && minor >= 20) return
  process.stderr.write(`Marram runs on Node.js 20.20 or a later 20; this is ${process.version}.\n`)
  process.exit(1)
}

await main()
