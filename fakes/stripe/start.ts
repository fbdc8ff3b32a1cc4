import { createServer, type IncomingMessage, type ServerResponse } from "node:http"
import type { AddressInfo } from "node:net"
import { runDue } from "./billing/due"
import { sendJson } from "./core/answer"
import { serveApi } from "./core/api"
import { serveControl } from "./core/control"
import { Fake, type FakeOptions } from "./core/fake"
import { loadState } from "./core/state"
import { servePage } from "./pages/serve"

const LOOPBACK = new Set(["127.0.0.1", "::1"])
const TICK_MS = 30_000

export interface StartOptions extends FakeOptions {
  /** 0 takes a free port. */
  port: number
  host?: string
}

export interface RunningFake {
  url: string
  close(): Promise<void>
}

/**
 * Starts a stand-in for Stripe on the loopback interface.
 *
 * @throws Error for any other interface: it takes whatever it is told for the truth, and a network must not reach it
 */
export async function startFake(options: StartOptions): Promise<RunningFake> {
  const host = options.host ?? "127.0.0.1"
  if (!LOOPBACK.has(host)) throw new Error(`The Stripe stand-in listens on loopback only, not on ${host}`)
  let fake: Fake | undefined
  const server = createServer((request, response) => {
    if (fake) void serve(fake, request, response)
    else response.writeHead(503).end()
  })
  await new Promise<void>((resolve, reject) => {
    server.once("error", reject)
    server.listen(options.port, host, resolve)
  })
  const { port } = server.address() as AddressInfo
  const url = `http://${host.includes(":") ? `[${host}]` : host}:${port}`
  const running = new Fake(options, loadState(options.stateFile, url))
  running.state.base = url
  fake = running
  running.deliveries.start()
  runDue(running, null, running.now())
  const tick = setInterval(() => runDue(running, null, running.now()), TICK_MS)
  tick.unref()
  return {
    url,
    async close() {
      clearInterval(tick)
      running.deliveries.stop()
      running.save()
      server.closeAllConnections()
      await new Promise((resolve) => server.close(resolve))
    },
  }
}

async function serve(fake: Fake, request: IncomingMessage, response: ServerResponse): Promise<void> {
  const path = request.url ?? "/"
  try {
    if (isForeign(fake, request)) {
      sendJson(response, 403, JSON.stringify({ error: { message: "Asked for by another site." } }))
    } else if (path.startsWith("/v1/") || path.startsWith("/v2/")) await serveApi(fake, request, response)
    else if (path.startsWith("/_fake/")) await serveControl(fake, request, response)
    else await servePage(fake, request, response)
  } catch (error) {
    console.error(error)
    if (!response.headersSent)
      sendJson(response, 500, JSON.stringify({ error: { type: "api_error", message: "Bug." } }))
    else response.destroy()
  }
}

/** A page of another origin must not click here on a person's behalf. */
function isForeign(fake: Fake, request: IncomingMessage): boolean {
  const { origin } = request.headers
  return request.method !== "GET" && origin !== undefined && origin !== fake.base
}
