import type { Register } from './queries'

/**
 * The register that a day opens with: one that has begun and is still to be closed, the latest
 * first; else the next to come; else the first of the day.
 */
export function firstRegister(registers: readonly Register[], now: number): Register | undefined {
  const planned = registers.filter(({ session }) => session.state === 'planned')
  const startOf = ({ session }: Register) => Date.parse(session.startsAt)
  return (
    planned.findLast(
      (register) => startOf(register) <= now && register.session.registerState === 'open',
    ) ??
    planned.find((register) => startOf(register) > now) ??
    registers[0]
  )
}
