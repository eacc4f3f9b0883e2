import { spawn } from 'node:child_process'
import { createWriteStream, mkdirSync } from 'node:fs'
import { join } from 'node:path'
import { createInterface } from 'node:readline'
import { Problem } from './problem.mjs'

/** Starts processes that stop with this one, and stops them in the reverse order. */
export function makeChildren({ logs, onUnexpectedEnd }) {
  mkdirSync(logs, { recursive: true })
  const running = []
  let isStopping = false

  const start = (name, program, args, { env, cwd }) => {
    // The open pipe to its input tells a child that we are still there.
    const child = spawn(program, args, { env, cwd, stdio: ['pipe', 'pipe', 'pipe'] })
    const log = createWriteStream(join(logs, `${name}.log`))
    child.stdout.pipe(log)
    child.stderr.pipe(log)
    running.push({ name, child })
    child.on('exit', (code) => {
      if (!isStopping) onUnexpectedEnd({ name, code, log: join(logs, `${name}.log`) })
    })
    return child
  }

  return {
    start,
    /** Starts a process and resolves to the first line of JSON that it prints. */
    startAndHear(name, program, args, options) {
      const child = start(name, program, args, options)
      return new Promise((resolve, reject) => {
        const lines = createInterface({ input: child.stdout })
        lines.on('line', (line) => {
          if (line.startsWith('{')) resolve(JSON.parse(line))
        })
        child.on('exit', () =>
          reject(new Problem(`${name} did not start. See ${join(logs, `${name}.log`)}.`)),
        )
      })
    },
    async stop() {
      isStopping = true
      for (const { child } of running.reverse()) {
        if (child.exitCode !== null) continue
        const ended = new Promise((resolve) => child.once('exit', resolve))
        child.kill('SIGTERM')
        const late = setTimeout(() => child.kill('SIGKILL'), 12_000)
        await ended
        clearTimeout(late)
      }
    },
  }
}

/** Resolves once an address answers with 200; rejects after `seconds`. */
export async function waitUntilReady(url, { seconds }) {
  const until = Date.now() + seconds * 1000
  while (Date.now() < until) {
    const isUp = await fetch(url).then(
      (response) => response.ok,
      () => false,
    )
    if (isUp) return
    await new Promise((resolve) => setTimeout(resolve, 100))
  }
  throw new Problem(`${url} did not become ready within ${seconds} seconds. See the logs.`)
}
