import { describe, expect, it } from 'vitest'
import { makeLogger } from './logging'

function linesOf(write: (log: ReturnType<typeof makeLogger>) => void): string {
  const lines: string[] = []
  const log = makeLogger({
    level: 'info',
    destination: { write: (line: string) => void lines.push(line) },
  })
  write(log)
  return lines.join('')
}

/** What the driver throws, and what the model layer makes of it. */
function databaseError() {
  const own = new Error('duplicate key: (email)=(orla@mail.example)')
  return Object.assign(own, { severity: 'ERROR', code: '23505', constraint: 'accounts_email_key' })
}

describe('what is logged', () => {
  it('drops every field that is not on the list', () => {
    const text = linesOf((log) => log.info({ email: 'orla@mail.example', status: 422 }, 'done'))
    expect(text).toContain('"status":422')
    expect(text).not.toContain('orla')
  })

  it.each([
    { name: 'the driver', make: databaseError },
    {
      name: 'the model layer',
      make: () => {
        const nativeError = databaseError()
        return Object.assign(new Error(nativeError.message), { nativeError })
      },
    },
  ])('says the code of an error of $name, and nothing of the row', ({ make }) => {
    const text = linesOf((log) => log.error({ err: make() }, 'a request failed'))
    expect(text).toContain('23505')
    expect(text).toContain('accounts_email_key')
    expect(text).not.toContain('orla')
  })

  it('keeps the message and the way of an error of our own', () => {
    const text = linesOf((log) => log.error({ err: new Error('the order is gone') }, 'failed'))
    expect(text).toContain('the order is gone')
    expect(text).toContain('logging.test')
  })
})
