import { hash, verify } from '@node-rs/argon2'

/** The library's number for argon2id; its enum exists only for the compiler. */
const ARGON2ID = 2
/** OWASP's recommendation for argon2id: 19 MiB, two passes, one lane. */
const COST = { algorithm: ARGON2ID, memoryCost: 19_456, timeCost: 2, parallelism: 1 }
const AT_ONCE = 4

const waiting: (() => void)[] = []
let running = 0

/** Hashing is meant to be heavy: no more than a few at a time, the others wait their turn. */
async function inTurn<T>(work: () => Promise<T>): Promise<T> {
  if (running >= AT_ONCE) await new Promise<void>((resolve) => waiting.push(resolve))
  running += 1
  try {
    return await work()
  } finally {
    running -= 1
    waiting.shift()?.()
  }
}

export const hashPassword = (password: string): Promise<string> =>
  inTurn(() => hash(password, COST))

/** False for a wrong password, and, after the same work, for an account that has none. */
export async function isPassword(stored: string | null, password: string): Promise<boolean> {
  const against = stored ?? (await nobodysHash())
  const fits = await inTurn(() => verify(against, password))
  return fits && stored !== null
}

let nobody: Promise<string> | undefined
const nobodysHash = (): Promise<string> => (nobody ??= hashPassword('nobody has this password'))
