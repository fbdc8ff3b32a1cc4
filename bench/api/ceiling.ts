import { createServer } from "node:http"
import { z } from "zod"
import { commitUsage } from "@/lib/usage"

/**
 * The least that a metered call could cost on this machine: Node's HTTP server, a schema, a key in memory, the same
 * group commit, as many bytes as a real answer. `KEYS` holds `SECRET ACCOUNT_ID KEY_ID` lines.
 */
const keys = new Map(
  (process.env.KEYS ?? "").split("\n").map((line) => {
    const [secret = "", account_id = "", key_id = ""] = line.split(" ")
    return [`Bearer ${secret}`, { account_id, key_id }]
  }),
)
const schema = z.strictObject({ ph: z.number().min(4).max(9.5), kh_dkh: z.number().min(0.1).max(30) })
const answer = Buffer.from(JSON.stringify({ filler: "x".repeat(Number(process.env.ANSWER_BYTES) - 13) }))

const server = createServer(async (incoming, outgoing) => {
  const key = keys.get(incoming.headers.authorization ?? "")
  const chunks: Buffer[] = []
  for await (const chunk of incoming) chunks.push(chunk as Buffer)
  const input = schema.safeParse(JSON.parse(Buffer.concat(chunks).toString()))
  if (!key || !input.success) {
    outgoing.writeHead(400).end()
    return
  }
  await commitUsage({ ...key, mode: "live", operation: "ceiling", calls: 1, units: 1, request_id: "ceiling" })
  outgoing.writeHead(200, { "content-type": "application/json", "content-length": answer.byteLength })
  outgoing.end(answer)
})
server.listen(0, "127.0.0.1", () => {
  const address = server.address()
  console.log(`ready http://127.0.0.1:${typeof address === "object" && address ? address.port : 0}`)
})
process.once("SIGTERM", () => process.exit(0))
