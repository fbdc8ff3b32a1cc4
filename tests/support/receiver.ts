import { createServer, type IncomingHttpHeaders, type Server, type ServerResponse } from "node:http"
import type { AddressInfo } from "node:net"
import { Webhook } from "standardwebhooks"
import { until } from "./subscriber"

/** One request as it came, byte for byte. */
export interface Received {
  readonly path: string
  readonly headers: IncomingHttpHeaders
  readonly body: string
  readonly at: number
}

export interface Receiver {
  readonly url: string
  readonly received: readonly Received[]
  /** What to do with each request from now on; at first 204. */
  answerWith(answer: (response: ServerResponse, request: Received) => void): void
  /** Waits until so many requests have come. */
  waitFor(count: number, within_ms?: number): Promise<readonly Received[]>
  close(): Promise<void>
}

/** A customer's webhook receiver on loopback. */
export async function startReceiver(): Promise<Receiver> {
  const received: Received[] = []
  let answer: (response: ServerResponse, request: Received) => void = (response) =>
    response.writeHead(204).end()
  const server: Server = createServer(async (incoming, response) => {
    const chunks: Buffer[] = []
    for await (const chunk of incoming) chunks.push(chunk as Buffer)
    const body = Buffer.concat(chunks).toString()
    const request = { path: incoming.url ?? "", headers: incoming.headers, body, at: Date.now() }
    received.push(request)
    answer(response, request)
  })
  await new Promise<void>((resolve) => server.listen(0, "127.0.0.1", resolve))
  return {
    url: `http://127.0.0.1:${(server.address() as AddressInfo).port}`,
    received,
    answerWith(next) {
      answer = next
    },
    async waitFor(count, within_ms) {
      await until(async () => received.length >= count, within_ms)
      return received
    },
    async close() {
      server.closeAllConnections()
      await new Promise((resolve) => server.close(resolve))
    },
  }
}

/** What the request says, if its signature fits the secret: as a receiver with the published library does it. */
export function verified(
  request: Received,
  secret: string,
): { type: string; timestamp: string; data: unknown } {
  const headers = request.headers as Record<string, string>
  return new Webhook(secret).verify(request.body, headers) as ReturnType<typeof verified>
}
