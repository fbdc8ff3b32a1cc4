import { Agent } from "node:http"

/** Calls from a network address of the test's own: all of 127.0.0.0/8 is this machine, and limits count by address. */
export function ownAddress(): Agent {
  const part = () => 1 + Math.floor(Math.random() * 250)
  return new Agent({ localAddress: `127.${part()}.${part()}.${part()}` })
}
