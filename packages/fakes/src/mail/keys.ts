import { createSign, generateKeyPairSync } from 'node:crypto'

/** The pair that the event webhook is signed with: PEM to sign, base64 of DER to check. */
export interface SigningKeys {
  privateKey: string
  publicKey: string
}

export function makeSigningKeys(): SigningKeys {
  const { privateKey, publicKey } = generateKeyPairSync('ec', { namedCurve: 'prime256v1' })
  return {
    privateKey: privateKey.export({ type: 'pkcs8', format: 'pem' }).toString(),
    publicKey: publicKey.export({ type: 'spki', format: 'der' }).toString('base64'),
  }
}

/** The two headers of a delivery: a signature over the time and the bytes, and the time. */
export function signDelivery(
  { privateKey }: SigningKeys,
  { body, at }: { body: string; at: Date },
): Record<string, string> {
  const timestamp = String(Math.floor(at.getTime() / 1000))
  return {
    'x-twilio-email-event-webhook-signature': createSign('sha256')
      .update(timestamp + body)
      .sign(privateKey, 'base64'),
    'x-twilio-email-event-webhook-timestamp': timestamp,
  }
}
