import { typeid } from "typeid-js"

/** Prefix of each kind of identifier; the rest is a UUIDv7 in base32, so that ids sort by the time they were made. */
const prefixes = {
  account: "acct",
  user: "user",
  session: "sess",
  invitation: "inv",
  export: "exp",
  key: "key",
  widget: "wdgt",
  call: "call",
  request: "req",
  audit: "audit",
  report: "rep",
  catalog_item: "item",
  enquiry: "enq",
  webhook_endpoint: "hook",
  webhook_event: "evt",
  webhook_delivery: "dlv",
  import: "imp",
} as const

export type IdKind = keyof typeof prefixes

/** A new identifier, as `key_01kbc…`. */
export function newId(kind: IdKind): string {
  return typeid(prefixes[kind]).toString()
}
