import { fork, type ChildProcess } from 'node:child_process'
import { resolve } from 'node:path'

interface RunningServer {
  port: number
  stop(): Promise<void>
}

/**
 * Starts the product or a floor in a process of its own, both in the same way: the same Node.js,
 * the same loader, the same size of pool; their output goes nowhere.
 */
async function startServer(
  which: 'product' | 'floor',
  databaseUrl: string,
): Promise<RunningServer> {
  const child = fork(resolve(`tests/load/${which}-process.ts`), {
    execArgv: ['--import', 'tsx'],
    env: { ...process.env, NODE_ENV: 'production', BENCH_DATABASE_URL: databaseUrl },
    stdio: ['ignore', 'ignore', 'inherit', 'ipc'],
  })
  const port = await new Promise<number>((heard, failed) => {
    child.once('message', (message) => heard(Number(message)))
    child.once('exit', (code) => failed(new Error(`The ${which} ended with ${code}.`)))
  })
  return { port, stop: () => stop(child) }
}

/** Runs `work` with servers that it may start, and stops them when it is over. */
export async function withServers<T>(
  work: (start: (which: 'product' | 'floor', databaseUrl: string) => Promise<number>) => Promise<T>,
): Promise<T> {
  const running: RunningServer[] = []
  try {
    return await work(async (which, databaseUrl) => {
      const server = await startServer(which, databaseUrl)
      running.push(server)
      return server.port
    })
  } finally {
    await Promise.all(running.map((server) => server.stop()))
  }
}

function stop(child: ChildProcess): Promise<void> {
  return new Promise((done) => {
    if (child.exitCode !== null) return done()
    child.once('exit', () => done())
    child.kill('SIGTERM')
  })
}

/** In a started process: tells the port, and ends with whoever started it. */
export function sayPort(port: number): void {
  process.send?.(port)
  process.on('disconnect', () => process.exit(0))
}

export const POOL_SIZE = 10
