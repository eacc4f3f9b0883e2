import { TextDecoder } from 'node:util'
import express, { type Request, type RequestHandler } from 'express'
import { Problem } from '../errors'

const MAX_BYTES = 64 * 1024
const MAX_DEPTH = 12
const MAX_ITEMS = 2_000

/** Reads JSON bodies. Bytes, encoding, depth and the number of items are checked before parsing. */
export const readJsonBody: RequestHandler[] = [
  (request, _response, next) => {
    const hasBody = request.headers['content-length'] ?? request.headers['transfer-encoding']
    const isEmpty = hasBody === undefined || hasBody === '0'
    if (!isEmpty && !(request.is('application/json') && isUtf8(request))) {
      throw new Problem('wrong-content-type', 'Please send JSON.')
    }
    next()
  },
  express.json({
    limit: MAX_BYTES,
    strict: true,
    inflate: false,
    verify: (_request, _response, bytes) => checkBytes(bytes),
  }),
]

/** The checks below read UTF-8; a body in another alphabet would pass them unread. */
function isUtf8({ headers }: Request): boolean {
  const charset = /;\s*charset="?([^";\s]+)/i.exec(headers['content-type'] ?? '')?.[1]
  return charset === undefined || charset.toLowerCase() === 'utf-8'
}

/** Throws a Problem for a body that must not reach the parser. */
export function checkBytes(bytes: Buffer): void {
  let text: string
  try {
    text = new TextDecoder('utf-8', { fatal: true }).decode(bytes)
  } catch {
    throw new Problem('bad-request', 'The text is not valid UTF-8.')
  }
  let depth = 0
  let items = 0
  let isInString = false
  for (let at = 0; at < text.length; at += 1) {
    const character = text[at]
    if (isInString) {
      if (character === '\\') at += 1
      else if (character === '"') isInString = false
      continue
    }
    if (character === '"') isInString = true
    else if (character === '{' || character === '[') depth += 1
    else if (character === '}' || character === ']') depth -= 1
    else if (character === ',') items += 1
    if (depth > MAX_DEPTH) throw new Problem('bad-request', 'The JSON is nested too deeply.')
    if (items > MAX_ITEMS) throw new Problem('bad-request', 'The JSON has too many parts.')
  }
}
