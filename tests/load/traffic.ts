import { Agent, request } from 'node:http'

export interface Call {
  method: 'GET' | 'POST'
  path: string
  headers?: Record<string, string>
  body?: string
}

/**
 * Keeps `connections` busy with calls, one after the other on each, and resolves to how many were
 * answered in a second. A call that is not answered with 200 ends the measurement: speed without
 * the answer is none.
 */
export async function answersPerSecond(
  port: number,
  given: { connections: number; calls: readonly Call[] },
): Promise<number> {
  const agent = new Agent({ keepAlive: true, maxSockets: given.connections })
  // One iterator for all: whoever is free takes the next call.
  const waiting = given.calls.values()
  const keepBusy = async (): Promise<void> => {
    for (const call of waiting) await answerTo(port, call, agent)
  }
  const began = performance.now()
  try {
    await Promise.all(Array.from({ length: given.connections }, keepBusy))
  } finally {
    agent.destroy()
  }
  return (given.calls.length * 1000) / (performance.now() - began)
}

/** The text of one answer. Rejects for any status but 200. */
export function answerTo(port: number, call: Call, agent?: Agent): Promise<string> {
  const { method, path, body = '' } = call
  const headers = {
    ...call.headers,
    ...(method === 'POST'
      ? { 'content-type': 'application/json', 'content-length': String(Buffer.byteLength(body)) }
      : {}),
  }
  return new Promise((resolve, reject) => {
    const sent = request({ host: '127.0.0.1', port, method, path, headers, agent }, (response) => {
      const parts: Buffer[] = []
      response.on('data', (part: Buffer) => parts.push(part))
      response.on('error', reject)
      response.on('end', () => {
        const text = Buffer.concat(parts).toString('utf8')
        if (response.statusCode === 200) resolve(text)
        else reject(new Error(`${method} ${path}: ${response.statusCode} ${text.slice(0, 300)}`))
      })
    })
    sent.on('error', reject)
    sent.end(body)
  })
}
