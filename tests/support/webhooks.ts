import { createServer, type IncomingHttpHeaders } from 'node:http'

export interface Received {
  body: string
  headers: IncomingHttpHeaders
}

export interface WebhookReceiver {
  url: string
  received: Received[]
  /** The next deliveries are answered with a status that is no thanks. */
  refuseNext: (count: number) => void
  close: () => Promise<void>
}

/** A tiny server that keeps the raw bodies it is sent, as a webhook's signature needs them. */
export async function startReceiver(): Promise<WebhookReceiver> {
  const received: Received[] = []
  let refusals = 0
  const server = createServer((request, response) => {
    const chunks: Buffer[] = []
    request.on('data', (chunk: Buffer) => chunks.push(chunk))
    request.on('end', () => {
      received.push({ body: Buffer.concat(chunks).toString('utf8'), headers: request.headers })
      response.writeHead(refusals > 0 ? 500 : 204).end()
      if (refusals > 0) refusals -= 1
    })
  })
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve))
  const address = server.address()
  if (address === null || typeof address === 'string') throw new Error('no address to listen on')
  return {
    url: `http://127.0.0.1:${address.port}/webhooks`,
    received,
    refuseNext: (count) => void (refusals += count),
    close: () =>
      new Promise((resolve) => {
        server.close(() => resolve())
        server.closeAllConnections()
      }),
  }
}
