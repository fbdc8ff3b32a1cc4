import { createServer } from "node:http"
import type { AddressInfo } from "node:net"
import Stripe from "stripe"
import { afterAll, beforeAll } from "vitest"

export interface Received {
  readonly id: string
  readonly type: string
  readonly signature: string
  readonly body: string
  /** Whether the SDK's own check passes at the time of arrival. */
  readonly genuine: boolean
  readonly at_ms: number
}

export interface Receiver {
  readonly secret: string
  url(): string
  readonly received: Received[]
  /** Answers to give to the next deliveries, in order; 200 when there is none. */
  readonly answers: number[]
}

/** An endpoint that takes webhooks and remembers them. */
export function givenReceiver(): Receiver {
  const sdk = new Stripe("sk_test_unused")
  const received: Received[] = []
  const answers: number[] = []
  const secret = "whsec_practice"
  const server = createServer(async (request, response) => {
    const chunks: Buffer[] = []
    for await (const chunk of request) chunks.push(chunk as Buffer)
    const body = Buffer.concat(chunks).toString("utf8")
    const signature = String(request.headers["stripe-signature"])
    let genuine = true
    try {
      sdk.webhooks.signature!.verifyHeader(body, signature, secret, 300)
    } catch {
      genuine = false
    }
    const { id, type } = JSON.parse(body) as { id: string; type: string }
    received.push({ id, type, signature, body, genuine, at_ms: Date.now() })
    response.writeHead(answers.shift() ?? 200).end()
  })
  beforeAll(() => new Promise<void>((resolve) => server.listen(0, "127.0.0.1", resolve)))
  afterAll(() => new Promise((resolve) => server.close(resolve)))
  const url = () => `http://127.0.0.1:${(server.address() as AddressInfo).port}/hook`
  return { secret, url, received, answers }
}
