import { expect, it } from 'vitest'
import { makeLogger } from './logging'

it('writes nothing of the statement that the model layer puts into an error', () => {
  const lines: string[] = []
  const log = makeLogger({ level: 'info', destination: { write: (line) => lines.push(line) } })
  const native = Object.assign(new Error('invalid input: "Priya"'), { severity: 'ERROR' })
  const err = Object.assign(new Error('select … where name = Priya - invalid input: "Priya"'), {
    nativeError: native,
  })

  log.error({ err }, 'unexpected error')

  expect(lines.join('')).toContain('database error')
  expect(lines.join('')).not.toContain('Priya')
})
