import { createHash, randomBytes } from 'node:crypto'

/** A new UUIDv7 (RFC 9562): sorts by the millisecond in which it was made. Never a secret. */
export function newId(at: Date): string {
  const bytes = randomBytes(16)
  bytes.writeUIntBE(at.getTime(), 0, 6)
  bytes[6] = ((bytes[6] ?? 0) & 0x0f) | 0x70
  bytes[8] = ((bytes[8] ?? 0) & 0x3f) | 0x80
  const hex = bytes.toString('hex')
  return [
    hex.slice(0, 8),
    hex.slice(8, 12),
    hex.slice(12, 16),
    hex.slice(16, 20),
    hex.slice(20),
  ].join('-')
}

/** A secret for a link that acts as a key: 32 random bytes in base64url. */
export function newSecret(): string {
  return randomBytes(32).toString('base64url')
}

/** What is stored of such a secret. */
export function hashSecret(secret: string): Buffer {
  return createHash('sha256').update(secret).digest()
}
