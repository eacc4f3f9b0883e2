import { Writable } from 'node:stream'
import { makeLogger, type Logger } from '../../apps/api/src/platform/logging'

/** A line of the log at level `error`, as it was written. */
export interface ErrorLine {
  msg: string
  err?: { message?: string; code?: string; constraint?: string }
  [field: string]: unknown
}

/** A logger that keeps its error lines, so that a test can expect them or fail on them. */
export function watchErrors(): { log: Logger; take(): ErrorLine[]; expectNone(): void } {
  let lines: ErrorLine[] = []
  const destination = new Writable({
    write(chunk: Buffer, _encoding, done) {
      // The logger writes one JSON object a line.
      lines.push(JSON.parse(chunk.toString('utf8')) as ErrorLine)
      done()
    },
  })
  const take = () => {
    const taken = lines
    lines = []
    return taken
  }
  return {
    log: makeLogger({ level: 'error', destination }),
    take,
    expectNone() {
      const left = take()
      if (left.length > 0) {
        const texts = left.map((line) => JSON.stringify(line))
        throw new Error(`Nobody expected these error lines:\n${texts.join('\n')}`)
      }
    },
  }
}
