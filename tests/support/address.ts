import { Agent } from "node:http"

/** A network address of the test's own: all of 127.0.0.0/8 is this machine, and limits count by address. */
export function randomAddress(): string {
  const part = () => 1 + Math.floor(Math.random() * 250)
  return `127.${part()}.${part()}.${part()}`
}

/** Calls from a network address of the test's own. */
export function ownAddress(localAddress = randomAddress()): Agent {
  return new Agent({ localAddress })
}
