/**
 * A page of Fernhollow Aquatics, an invented shop, on an origin of its own: what a retailer has to do to put a
 * Tarnwright widget on a product page, under a content security policy as strict as a shop's can be.
 *
 * Pages: `/` with the element, `/framed` with the element in its own frame, `/plain-frame` with a bare iframe,
 * `/privacy` with what the shop says of personal data.
 * Environment: `PORT`, `APP_URL` (where Tarnwright is), `WIDGET_ID`.
 */
import { readFileSync } from "node:fs"
import { createServer } from "node:http"
import path from "node:path"
import { type Embedding, privacyPage, productPage } from "./page"

const appUrl = setting("APP_URL")
const widgetId = setting("WIDGET_ID")
const port = Number(process.env.PORT ?? 0)

/** What the shop has to allow, beside what is its own. Exactly what our guide tells it to. */
const allowed: Record<Embedding, string[]> = {
  element: [`script-src ${appUrl}`, `connect-src ${appUrl}`],
  framed: [`script-src ${appUrl}`, `frame-src ${appUrl}`],
  "plain-frame": [`frame-src ${appUrl}`],
}

const pages: Record<string, Embedding> = {
  "/": "element",
  "/framed": "framed",
  "/plain-frame": "plain-frame",
}
const files: Record<string, string> = { "/shop.css": "text/css", "/reactor.svg": "image/svg+xml" }

const server = createServer((request, response) => {
  const { pathname } = new URL(request.url ?? "/", "http://127.0.0.1")
  const embedding = pages[pathname]
  const fileType = files[pathname]
  if (embedding) {
    const policy = ["default-src 'none'", "style-src 'self'", "img-src 'self'", ...allowed[embedding]]
    response.writeHead(200, {
      "content-type": "text/html; charset=utf-8",
      "content-security-policy": [...policy, "base-uri 'none'", "form-action 'none'"].join("; "),
    })
    response.end(productPage({ appUrl, widgetId, embedding }))
  } else if (pathname === "/privacy") {
    response.writeHead(200, {
      "content-type": "text/html; charset=utf-8",
      "content-security-policy": "default-src 'none'; style-src 'self'; base-uri 'none'; form-action 'none'",
    })
    response.end(privacyPage())
  } else if (fileType) {
    response.writeHead(200, { "content-type": fileType })
    response.end(readFileSync(path.join(import.meta.dirname, pathname)))
  } else {
    response.writeHead(pathname === "/favicon.ico" ? 204 : 404).end()
  }
})

server.listen(port, "127.0.0.1", () => {
  const address = server.address()
  console.log(`ready http://127.0.0.1:${typeof address === "object" ? address?.port : port}`)
})

for (const signal of ["SIGTERM", "SIGINT"] as const) {
  process.once(signal, () => {
    server.closeAllConnections()
    server.close()
  })
}

function setting(name: string): string {
  const value = process.env[name]
  if (!value) throw new Error(`Set ${name}.`)
  return value
}
