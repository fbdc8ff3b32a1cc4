import { createServer, request } from "node:http"
import { type AddressInfo, connect, type Socket } from "node:net"
import { ownAddress, randomAddress } from "../support/address"

/** The way of a browser that has a network address of its own, since limits count by address. */
export async function ownWay(): Promise<{ server: string; close(): void }> {
  const localAddress = randomAddress()
  const agent = ownAddress(localAddress)
  const tunnels = new Set<Socket>()
  const way = createServer((incoming, outgoing) => {
    const { url = "", method, headers } = incoming
    const onward = request(url, { method, headers, agent }, (answer) => {
      outgoing.writeHead(answer.statusCode ?? 502, answer.headers)
      answer.pipe(outgoing)
    })
    onward.on("error", () => outgoing.destroy())
    incoming.pipe(onward)
  })
  // What a test itself fetches for a page goes through a tunnel.
  way.on("connect", ({ url = "" }, socket: Socket) => {
    const { hostname: host, port } = new URL(`http://${url}`)
    const onward = connect({ host, port: Number(port), localAddress }, () => {
      socket.write("HTTP/1.1 200 OK\r\n\r\n")
      onward.pipe(socket).pipe(onward)
    })
    for (const end of [socket, onward]) {
      tunnels.add(end)
      end.on("error", () => {})
      end.on("close", () => {
        socket.destroy()
        onward.destroy()
      })
    }
  })
  await new Promise<void>((ready) => way.listen(0, "127.0.0.1", ready))
  return {
    server: `http://127.0.0.1:${(way.address() as AddressInfo).port}`,
    close() {
      for (const tunnel of tunnels) tunnel.destroy()
      way.closeAllConnections()
      way.close()
    },
  }
}
