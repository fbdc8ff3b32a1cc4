import { readFileSync, writeFileSync } from "node:fs"
import { createServer } from "node:net"
import path from "node:path"

/** The services that listen beside the application itself. */
export type PortName = "postgres" | "stripe" | "mail" | "smtp" | "shop"

const names: readonly PortName[] = ["postgres", "stripe", "mail", "smtp", "shop"]

/**
 * A loopback port for each service: the one of the last run where it is still free, so that bookmarks, keys with
 * allowed origins and open pages keep working, and a new one otherwise. The choice is kept in the data folder.
 */
export async function choosePorts(dataDir: string): Promise<Record<PortName, number>> {
  const file = path.join(dataDir, "ports.json")
  const remembered = readRemembered(file)
  const chosen = new Map<PortName, number>()
  for (const name of names) {
    const last = remembered[name]
    chosen.set(name, last !== undefined && (await isFree(last)) ? last : await freePort([...chosen.values()]))
  }
  const ports = Object.fromEntries(chosen) as Record<PortName, number>
  writeFileSync(file, `${JSON.stringify(ports, null, 2)}\n`)
  return ports
}

/** A port that nothing listens on now; `taken` are ports promised to others that do not listen yet. */
export async function freePort(taken: readonly number[] = []): Promise<number> {
  for (;;) {
    const port = await listenOnce(0)
    if (port !== undefined && !taken.includes(port)) return port
  }
}

export async function isFree(port: number): Promise<boolean> {
  return (await listenOnce(port)) !== undefined
}

function listenOnce(port: number): Promise<number | undefined> {
  return new Promise((resolve) => {
    const server = createServer()
    server.once("error", () => resolve(undefined))
    server.listen(port, "127.0.0.1", () => {
      const address = server.address()
      server.close(() => resolve(typeof address === "object" && address ? address.port : undefined))
    })
  })
}

function readRemembered(file: string): Partial<Record<PortName, number>> {
  try {
    return JSON.parse(readFileSync(file, "utf8"))
  } catch {
    return {}
  }
}
