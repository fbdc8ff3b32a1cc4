import { createServer } from "node:http"
import next from "next"
import { registry } from "@/app/api/v1/registry"
import { isApiPath, nodeMount } from "@/lib/api/node-mount"
import { createServe } from "@/lib/api/serve"

// The App Router costs more for each request than all of our work on it, so the API is answered before Next sees it.
const host = process.env.HOST ?? "127.0.0.1"
const port = Number(process.env.PORT ?? 3000)
const publicUrl = process.env.PUBLIC_URL ?? `http://${host}:${port}`
const apiOnly = process.env.TARN_API_ONLY === "1"
const behindProxy = process.env.BEHIND_PROXY === "1"
const drain_ms = 25_000

const serve = createServe({
  registry,
  publicUrl,
  onFault: (error, requestId) => console.error(`request ${requestId} failed:`, error),
})
const api = nodeMount(serve, { behindProxy })
const app = apiOnly ? undefined : next({ dev: process.env.NODE_ENV === "development", hostname: host, port })
const pages = app?.getRequestHandler()
await app?.prepare()

const server = createServer((incoming, outgoing) => {
  if (isApiPath(incoming.url ?? "")) api(incoming, outgoing)
  else if (pages) {
    // The pages read the caller's address from this header, which only a proxy of ours may set.
    if (!behindProxy) incoming.headers["x-forwarded-for"] = incoming.socket.remoteAddress
    pages(incoming, outgoing)
  } else outgoing.writeHead(404).end()
})
server.headersTimeout = 10_000
server.requestTimeout = 30_000
server.listen(port, host, () => {
  const address = server.address()
  console.log(`ready http://${host}:${typeof address === "object" && address ? address.port : port}`)
})

for (const signal of ["SIGTERM", "SIGINT"] as const) {
  process.once(signal, () => {
    server.close(() => process.exit(0))
    server.closeIdleConnections()
    setTimeout(() => process.exit(1), drain_ms).unref()
  })
}
