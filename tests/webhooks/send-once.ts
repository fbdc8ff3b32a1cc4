/**
 * Sends one webhook and prints how it ended, in a process of its own: which certificates Node trusts is decided when it
 * starts. Takes one argument, JSON: `url`, `allowLoopback`, and the port of a name server on loopback.
 */
import { Resolver } from "node:dns/promises"
import { send } from "@/lib/webhooks/send"

const { url, allowLoopback, nameServerPort } = JSON.parse(process.argv[2] ?? "")
const resolver = new Resolver()
resolver.setServers([`127.0.0.1:${nameServerPort}`])

const message = { url, headers: { "webhook-id": "evt_1" }, body: "{}" }
const outcome = await send(message, { allowLoopback }, (host) => resolver.resolve4(host))
console.log(JSON.stringify(outcome))
