import { createServer, type IncomingMessage, type Server, type ServerResponse } from "node:http"
import type { AddressInfo } from "node:net"
import { afterEach, describe, expect, it } from "vitest"
import { createSession, type Session, type SessionState } from "@/widgets/shared/session"

let server: Server | undefined
const asked: { method: string | undefined; cookie: string | undefined; at: number }[] = []

afterEach(() => {
  server?.closeAllConnections()
  server?.close()
  asked.length = 0
})

/** A server that gives these answers in turn, the last one for ever. */
async function answering(
  ...answers: ((request: IncomingMessage, response: ServerResponse) => void)[]
): Promise<string> {
  server = createServer((request, response) => {
    const answer = answers[Math.min(asked.length, answers.length - 1)]!
    asked.push({ method: request.method, cookie: request.headers.cookie, at: Date.now() })
    request.resume()
    answer(request, response)
  })
  await new Promise<void>((done) => server!.listen(0, "127.0.0.1", done))
  return `http://127.0.0.1:${(server!.address() as AddressInfo).port}/api/v1/widgets/wdgt_1`
}

const status =
  (code: number, headers = {}) =>
  (_: IncomingMessage, response: ServerResponse) =>
    response.writeHead(code, headers).end("{}")
const hangUp = (request: IncomingMessage) => void request.socket.destroy()

/** The states that an opened session goes through, until it rests. */
function states(session: Session, open = session.begin): Promise<SessionState[]> {
  return new Promise((done) => {
    const seen: SessionState[] = [session.state]
    const stop = session.subscribe(() => {
      seen.push(session.state)
      if (session.state !== "opening") {
        stop()
        done(seen)
      }
    })
    open()
  })
}

describe("a widget's session", () => {
  it("hands its token to whoever waits for it, and opens once for all of them", async () => {
    const opened = (_: IncomingMessage, response: ServerResponse) => response.end('{"token":"t1"}')
    const session = createSession(await answering(opened))
    expect(session.token).toBeNull()
    expect(await Promise.all([session.opened(), session.opened()])).toEqual(["t1", "t1"])
    session.begin()
    expect(await session.opened()).toBe("t1")
    expect(asked).toHaveLength(1)
  })

  it("has no token where it is closed, and tries anew where it rested", async () => {
    expect(await createSession(await answering(status(403))).opened()).toBeNull()
    asked.length = 0
    const opened = (_: IncomingMessage, response: ServerResponse) => response.end('{"token":"t2"}')
    const session = createSession(await answering(status(500), opened))
    expect(await session.opened()).toBeNull()
    expect(session.state).toBe("resting")
    expect(await session.opened()).toBe("t2")
  })

  it("asks for nothing until it is opened, and once however often it is", async () => {
    const session = createSession(await answering(status(200)))
    expect(asked).toHaveLength(0)
    const seen = states(session)
    session.begin()
    session.retry()
    expect(await seen).toEqual(["unopened", "opening", "open"])
    session.begin()
    session.retry()
    await new Promise((done) => setTimeout(done, 50))
    expect(asked).toHaveLength(1)
    expect(asked[0]).toMatchObject({ method: "POST", cookie: undefined })
  })

  it("tries twice more when the service rests or is out of reach", async () => {
    expect(await states(createSession(await answering(status(503), hangUp, status(200))))).toContain("open")
    expect(asked).toHaveLength(3)
  })

  it("waits as long as the service asks it to", async () => {
    await states(createSession(await answering(status(503, { "retry-after": "1" }), status(200))))
    expect(asked[1]!.at - asked[0]!.at).toBeGreaterThanOrEqual(990)
  })

  it("rests at once when it would have to wait longer than a shopper does", async () => {
    const session = createSession(await answering(status(503, { "retry-after": "60" })))
    expect(await states(session)).toEqual(["unopened", "opening", "resting"])
    expect(asked).toHaveLength(1)
  })

  it("rests after three tries, does not try by itself, and opens when the shopper tries again", async () => {
    const session = createSession(await answering(hangUp, hangUp, hangUp, status(200)))
    expect(await states(session)).toContain("resting")
    expect(asked).toHaveLength(3)
    session.begin()
    expect(asked).toHaveLength(3)
    expect(await states(session, session.retry)).toEqual(["resting", "opening", "open"])
  })

  it.each([402, 403, 404])("is closed by a %d and does not try again", async (code) => {
    const session = createSession(await answering(status(code)))
    expect(await states(session)).toEqual(["unopened", "opening", "closed"])
    session.begin()
    session.retry()
    await new Promise((done) => setTimeout(done, 50))
    expect(asked).toHaveLength(1)
  })
})
