/**
 * A mail server for a machine without one: takes every mail that is sent to it by SMTP, sends none on, and shows
 * what came as pages and as JSON. Keeps the newest mails in memory only.
 *
 * Pages: `/`, `/mails/ID`. JSON: `GET /messages?to=ADDRESS`, `GET /messages/ID`, `DELETE /messages`.
 */
import { createServer, type ServerResponse } from "node:http"
import { simpleParser } from "mailparser"
import { SMTPServer } from "smtp-server"
import { createInbox } from "./inbox"
import { inboxPage, mailPage, missingPage } from "./pages"

const MAX_MAIL_BYTES = 2 * 1024 * 1024

const inbox = createInbox(500)

const smtp = new SMTPServer({
  authOptional: true,
  disabledCommands: ["STARTTLS", "AUTH"],
  size: MAX_MAIL_BYTES,
  logger: false,
  onData(stream, session, done) {
    simpleParser(stream)
      .then((mail) => {
        if (stream.sizeExceeded)
          throw Object.assign(new Error("The mail is too large"), { responseCode: 552 })
        inbox.add(
          mail,
          session.envelope.rcptTo.map(({ address }) => address),
        )
        done()
      })
      .catch(done)
  },
})
// A client that goes away in mid-sentence is its own affair.
smtp.on("error", (error) => console.error(error.message))

const http = createServer((request, response) => {
  const url = new URL(request.url ?? "/", "http://127.0.0.1")
  const [room = "", id] = url.pathname.split("/").slice(1)
  if (request.method === "DELETE" && room === "messages" && id === undefined) {
    inbox.clear()
    response.writeHead(204).end()
    return
  }
  if (request.method !== "GET") return sendJson(response, 405, { detail: "Use GET, or DELETE /messages." })
  if (room === "" && id === undefined) return sendPage(response, 200, inboxPage(inbox.list()))
  if (room === "messages" && id === undefined) {
    return sendJson(response, 200, { data: inbox.list(url.searchParams.get("to") ?? undefined) })
  }
  const mail = id === undefined ? undefined : inbox.find(id)
  if (room === "messages")
    return sendJson(response, mail ? 200 : 404, mail ?? { detail: "There is no such mail." })
  if (room === "mails" && mail) return sendPage(response, 200, mailPage(mail))
  return sendPage(response, 404, missingPage())
})

const smtpPort = Number(process.env.SMTP_PORT ?? 0)
const port = Number(process.env.PORT ?? 0)
smtp.listen(smtpPort, "127.0.0.1", () => {
  http.listen(port, "127.0.0.1", () => {
    const address = http.address()
    console.log(`ready http://127.0.0.1:${typeof address === "object" ? address?.port : port}`)
  })
})

for (const signal of ["SIGTERM", "SIGINT"] as const) {
  process.once(signal, () => {
    http.closeAllConnections()
    http.close()
    smtp.close()
  })
}

function sendJson(response: ServerResponse, status: number, body: unknown): void {
  response.writeHead(status, { "content-type": "application/json", "cache-control": "no-store" })
  response.end(JSON.stringify(body))
}

function sendPage(response: ServerResponse, status: number, page: string): void {
  response.writeHead(status, {
    "content-type": "text/html; charset=utf-8",
    "cache-control": "no-store",
    // Mails come from anyone: their HTML shows in a frame without scripts, and loads nothing.
    "content-security-policy":
      "default-src 'none'; style-src 'unsafe-inline'; frame-src 'self'; base-uri 'none'",
    "x-content-type-options": "nosniff",
  })
  response.end(page)
}
