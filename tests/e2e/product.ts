import { spawn } from 'node:child_process'
import { resolve } from 'node:path'
import { createInterface } from 'node:readline'
import type { KeptMail } from '@marram/fakes'

/** The product under test, in a process of its own. */
export interface Product {
  url: string
  begins: Date
  /** Handles what has happened, and what that causes, until nothing is left to do. */
  drain(): Promise<void>
  /** Finds what has become due, and handles it. */
  sweep(): Promise<void>
  moveClock(to: Date): Promise<void>
  mailsTo(address: string): Promise<KeptMail[]>
  /** Rejects when the product wrote an error line that no test expected. */
  stop(): Promise<void>
}

interface Whereabouts {
  url: string
  controlUrl: string
  mailUrl: string
  begins: string
}

export async function startProduct(): Promise<Product> {
  const tsx = resolve('node_modules/tsx/dist/cli.mjs')
  const child = spawn(process.execPath, [tsx, resolve('tests/e2e/server.ts')], {
    stdio: ['pipe', 'pipe', 'inherit'],
  })
  const ended = new Promise<number>((done) => child.on('exit', (code) => done(code ?? 1)))
  const at = await new Promise<Whereabouts>((done, fail) => {
    createInterface({ input: child.stdout }).once('line', (line) => {
      // The server prints this line itself.
      done(JSON.parse(line) as Whereabouts)
    })
    void ended.then((code) => fail(new Error(`The product did not start (${code}).`)))
  })
  const control = async (name: string, body: object = {}) => {
    const response = await fetch(`${at.controlUrl}/${name}`, {
      method: 'POST',
      headers: { 'content-type': 'application/json' },
      body: JSON.stringify(body),
    })
    if (!response.ok) throw new Error(`${name}: ${await response.text()}`)
  }
  return {
    url: at.url,
    begins: new Date(at.begins),
    drain: () => control('drain'),
    sweep: () => control('sweep'),
    moveClock: (to) => control('clock', { at: to.toISOString() }),
    async mailsTo(address) {
      const query = new URLSearchParams({ to: address })
      const response = await fetch(`${at.mailUrl}/_control/messages?${query}`)
      return (await response.json()) as KeptMail[]
    },
    async stop() {
      child.stdin.end()
      const code = await ended
      if (code !== 0) throw new Error(`The product ended with ${code}: see its error lines above.`)
    },
  }
}
