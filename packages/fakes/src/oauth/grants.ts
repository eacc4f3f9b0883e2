import { randomBytes } from 'node:crypto'

const CODE_SECONDS = 600
export const TOKEN_SECONDS = 3_600

interface Grant {
  sub: string
  scope: string
  expiresAtMs: number
}

/** What a person has allowed: codes that are exchanged once, and the tokens they become. */
export interface Grants {
  makeCode: (given: { sub: string; scope: string; redirectUri: string }) => string
  /** A token for a code, or null for one that is used, old, or was asked for from elsewhere. */
  exchange: (code: string, redirectUri: string) => { token: string; scope: string } | null
  /** Whose a token is and what it may read, or null. */
  read: (token: string) => { sub: string; scope: string } | null
}

export function makeGrants(now: () => Date): Grants {
  const codes = new Map<string, Grant & { redirectUri: string }>()
  const tokens = new Map<string, Grant>()
  const inSeconds = (seconds: number) => now().getTime() + seconds * 1000
  const isFresh = ({ expiresAtMs }: Grant) => now().getTime() < expiresAtMs
  return {
    makeCode(given) {
      const code = randomBytes(16).toString('hex')
      codes.set(code, { ...given, expiresAtMs: inSeconds(CODE_SECONDS) })
      return code
    },
    exchange(code, redirectUri) {
      const had = codes.get(code)
      // A code works once, whatever comes of it.
      codes.delete(code)
      if (!had || !isFresh(had) || had.redirectUri !== redirectUri) return null
      const { sub, scope } = had
      const token = randomBytes(16).toString('hex')
      tokens.set(token, { sub, scope, expiresAtMs: inSeconds(TOKEN_SECONDS) })
      return { token, scope }
    },
    read(token) {
      const had = tokens.get(token)
      return had && isFresh(had) ? { sub: had.sub, scope: had.scope } : null
    },
  }
}
