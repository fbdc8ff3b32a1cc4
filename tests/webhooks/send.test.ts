import { execFile, execFileSync } from "node:child_process"
import { mkdtempSync, readFileSync, rmSync } from "node:fs"
import { createServer as createHttpsServer, type Server } from "node:https"
import { tmpdir } from "node:os"
import path from "node:path"
import { promisify } from "node:util"
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it } from "vitest"
import { type Outcome, send } from "@/lib/webhooks/send"
import { startNameServer } from "../support/dns"
import { type Receiver, startReceiver } from "../support/receiver"

const local = { allowLoopback: true }
const root = path.resolve(import.meta.dirname, "../..")

describe("a webhook", () => {
  let receiver: Receiver
  beforeEach(async () => {
    receiver = await startReceiver()
  })
  afterEach(() => receiver.close())

  const sendThere = (body = "{}") =>
    send({ url: `${receiver.url}/hooks`, headers: { "webhook-id": "evt_1" }, body }, local)

  it.each([
    [200, null],
    [204, null],
    [301, "redirected"],
    [308, "redirected"],
    [400, "refused"],
    [410, "gone"],
    [503, "refused"],
  ])("ends with status %i as %s", async (status, failure) => {
    receiver.answerWith((response) => response.writeHead(status, { location: "/elsewhere" }).end())
    expect(await sendThere()).toMatchObject({ status, failure })
    expect(receiver.received).toHaveLength(1)
  })

  it("arrives byte for byte, also beyond ASCII", async () => {
    await sendThere('{"title":"Süßwasser, 25 °C"}')
    expect(receiver.received[0]?.body).toBe('{"title":"Süßwasser, 25 °C"}')
  })

  it("reads no more than 64 kB of an answer that does not end", async () => {
    let written = 0
    receiver.answerWith((response) => {
      response.writeHead(200)
      const chunk = Buffer.alloc(16 * 1024)
      const more = () => {
        while (!response.destroyed && response.write(chunk)) written += chunk.length
        if (!response.destroyed) response.once("drain", more)
      }
      more()
    })
    const outcome = await sendThere()
    expect(outcome).toMatchObject({ status: 200, failure: null })
    expect(outcome.duration_ms).toBeLessThan(5_000)
    // What the two ends' buffers hold comes on top of what was read.
    expect(written).toBeLessThan(16 * 1024 * 1024)
  })

  it("is given up after 15 s without an answer, and after 15 s of a look-up that does not end", async () => {
    receiver.answerWith(() => {})
    const never = () => new Promise<string[]>(() => {})
    const message = { url: "https://shop.example/", headers: {}, body: "{}" }
    const outcomes = await Promise.all([sendThere(), send(message, local, never)])
    for (const { status, failure, duration_ms } of outcomes) {
      expect({ status, failure }).toEqual({ status: null, failure: "timed_out" })
      expect(duration_ms).toBeGreaterThanOrEqual(14_900)
      expect(duration_ms).toBeLessThan(16_500)
    }
  })

  it("that finds nobody listening ends as connection_failed", async () => {
    const { url } = receiver
    await receiver.close()
    const outcome = await send({ url, headers: {}, body: "{}" }, local)
    receiver = await startReceiver()
    expect(outcome).toMatchObject({ status: null, failure: "connection_failed" })
  })

  it("does not go to this machine unless the setting says so", async () => {
    const port = new URL(receiver.url).port
    for (const url of [
      receiver.url,
      `http://localhost:${port}/`,
      "https://localhost/",
      "https://127.0.0.1:8443/",
    ]) {
      const outcome = await send({ url, headers: {}, body: "{}" }, { allowLoopback: false })
      expect(outcome, url).toMatchObject({ status: null, failure: "target_refused" })
    }
    expect(receiver.received).toEqual([])
  })
})

describe("over TLS, by a name of our own name server, a webhook", { timeout: 60_000 }, () => {
  const run = promisify(execFile)
  // The same port on three addresses of loopback, so that going to another address is seen.
  const port = 8443
  const [first, second, third] = ["127.99.1.1", "127.99.1.2", "127.99.1.3"] as const
  const servers: Server[] = []
  const requests: { address: string; name: string | false | null; host: string | undefined }[] = []
  let folder: string

  beforeAll(async () => {
    folder = mkdtempSync(path.join(tmpdir(), "webhook-tls-"))
    const openssl = (...args: string[]) => execFileSync("openssl", args, { cwd: folder, stdio: "ignore" })
    openssl(
      ...[
        "req",
        "-x509",
        "-newkey",
        "ec",
        "-pkeyopt",
        "ec_paramgen_curve:prime256v1",
        "-nodes",
        "-days",
        "2",
      ],
      ...["-keyout", "key.pem", "-out", "cert.pem", "-subj", "/CN=hooks.shop.test"],
      ...["-addext", "subjectAltName=DNS:hooks.shop.test"],
    )
    const [key, cert] = ["key.pem", "cert.pem"].map((file) => readFileSync(path.join(folder, file)))
    for (const address of [first, second, third]) {
      const server = createHttpsServer({ key, cert }, (incoming, response) => {
        const name = "servername" in incoming.socket ? (incoming.socket.servername as string) : null
        requests.push({ address, name, host: incoming.headers.host })
        response.writeHead(204).end()
      })
      await new Promise<void>((resolve) => server.listen(port, address, resolve))
      servers.push(server)
    }
  })

  beforeEach(() => {
    requests.length = 0
  })

  afterAll(async () => {
    for (const server of servers) await new Promise((resolve) => server.close(resolve))
    rmSync(folder, { recursive: true })
  })

  async function sendOnce(name: string, answers: readonly string[], allowLoopback: boolean) {
    const nameServer = await startNameServer(answers)
    const input = { url: `https://${name}:${port}/hooks`, allowLoopback, nameServerPort: nameServer.port }
    const { stdout } = await run(
      process.execPath,
      ["--import", "tsx", "tests/webhooks/send-once.ts", JSON.stringify(input)],
      { cwd: root, env: { ...process.env, NODE_EXTRA_CA_CERTS: path.join(folder, "cert.pem") } },
    )
    await nameServer.close()
    return { outcome: JSON.parse(stdout) as Outcome, asked: nameServer.asked() }
  }

  it("goes to the address that was checked, though the name leads elsewhere a moment later", async () => {
    const { outcome, asked } = await sendOnce("hooks.shop.test", [first, second], true)
    expect(outcome).toMatchObject({ status: 204, failure: null })
    expect(requests).toEqual([{ address: first, name: "hooks.shop.test", host: `hooks.shop.test:${port}` }])
    expect(asked).toBe(1)
  })

  it("does not go to this machine, whatever public address the name had before", async () => {
    const { outcome } = await sendOnce("hooks.shop.test", [first], false)
    expect(outcome).toMatchObject({ status: null, failure: "target_refused" })
    expect(requests).toEqual([])
  })

  it("does not go to a private network even where this machine is allowed", async () => {
    const { outcome } = await sendOnce("hooks.shop.test", ["10.0.0.1"], true)
    expect(outcome).toMatchObject({ status: null, failure: "target_refused" })
  })

  it("is not given to a server whose certificate is another's", async () => {
    const { outcome } = await sendOnce("other.shop.test", [third], true)
    expect(outcome).toMatchObject({ status: null, failure: "tls_failed" })
    expect(requests).toEqual([])
  })
})
