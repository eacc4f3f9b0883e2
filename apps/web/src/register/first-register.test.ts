import { describe, expect, it } from 'vitest'
import { firstRegister } from './first-register'
import type { Register } from './queries'

const AT = { five: '2026-09-17T17:00:00Z', six: '2026-09-17T18:00:00Z', seven: '2026-09-17T19:00Z' }

/** A register by its session's start; only what the choice looks at. */
const register = (startsAt: string, session: Partial<Register['session']> = {}) =>
  ({ session: { startsAt, state: 'planned', registerState: 'open', ...session } }) as Register

const closed = { registerState: 'closed' } as const

describe('the register that a day opens with', () => {
  const [five, six, seven] = [register(AT.five), register(AT.six), register(AT.seven)]
  const chosenAt = (time: string, registers: Register[]) =>
    firstRegister(registers, Date.parse(`2026-09-17T${time}Z`))

  it('is the first to come in the morning', () => {
    expect(chosenAt('09:00:00', [five, six])).toBe(five)
  })

  it('is the one that has begun, from its very start and after its end, until it is closed', () => {
    expect(chosenAt('16:59:59', [five, six])).toBe(five)
    expect(chosenAt('17:00:00', [five, six, seven])).toBe(five)
    expect(chosenAt('17:59:59', [five, six, seven])).toBe(five)
    expect(chosenAt('17:59:59', [register(AT.five, closed), six, seven])).toBe(six)
  })

  it('is the latest where two have begun', () => {
    expect(chosenAt('18:00:00', [five, six, seven])).toBe(six)
  })

  it('is not one that is called off', () => {
    const off = register(AT.five, { state: 'called-off' })
    expect(chosenAt('17:30:00', [off, six])).toBe(six)
    expect(chosenAt('17:30:00', [off])).toBe(off)
  })

  it('is the first when all are done, and none where there is none', () => {
    const done = [register(AT.five, closed), register(AT.six, closed)]
    expect(chosenAt('20:00:00', done)).toBe(done[0])
    expect(chosenAt('20:00:00', [])).toBeUndefined()
  })
})
