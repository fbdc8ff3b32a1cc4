import { createServer, request } from "node:http"
import type { AddressInfo } from "node:net"
import { ownAddress } from "../support/address"

/** The way of a browser that has a network address of its own, since limits count by address. */
export async function ownWay(): Promise<{ server: string; close(): void }> {
  const agent = ownAddress()
  const way = createServer((incoming, outgoing) => {
    const { url = "", method, headers } = incoming
    const onward = request(url, { method, headers, agent }, (answer) => {
      outgoing.writeHead(answer.statusCode ?? 502, answer.headers)
      answer.pipe(outgoing)
    })
    onward.on("error", () => outgoing.destroy())
    incoming.pipe(onward)
  })
  await new Promise<void>((ready) => way.listen(0, "127.0.0.1", ready))
  return {
    server: `http://127.0.0.1:${(way.address() as AddressInfo).port}`,
    close() {
      way.closeAllConnections()
      way.close()
    },
  }
}
