import http from "node:http"
import https from "node:https"
import { isIP, type LookupFunction } from "node:net"
import { type Resolve, resolveTarget, type TargetPolicy, TargetRefused } from "./target"

/** Why an attempt failed, in the words that a delivery log shows. */
export const deliveryFailures = {
  target_refused: "The address is not public, or the URL is not allowed",
  name_not_found: "The host name has no address",
  connection_failed: "No connection, or it was lost",
  tls_failed: "The certificate is not valid for this host",
  timed_out: "No answer within 15 seconds",
  redirected: "The answer was a redirect, and redirects are not followed",
  refused: "The answer had another status than 2xx",
  gone: "The answer was 410, so the endpoint was switched off",
  endpoint_off: "The endpoint was switched off before the attempt",
} as const

export type DeliveryFailure = keyof typeof deliveryFailures

/** How one attempt ended. `failure` null: the receiver took it. */
export interface Outcome {
  readonly status: number | null
  readonly failure: DeliveryFailure | null
  readonly duration_ms: number
}

export interface Message {
  readonly url: string
  readonly headers: Readonly<Record<string, string>>
  readonly body: string
}

// @source PLATFORM 6.2, 6.3
const timeout_ms = 15_000
const largestAnswer_bytes = 64 * 1024

/**
 * Posts a message to a target that a customer named: once, without following redirects, to an address that was checked,
 * within 15 s from look-up to answer. Of the answer the status counts and nothing else is kept.
 */
export async function send(message: Message, policy: TargetPolicy, resolve?: Resolve): Promise<Outcome> {
  const began = performance.now()
  const signal = AbortSignal.timeout(timeout_ms)
  try {
    const url = new URL(message.url)
    const addresses = await untilAborted(resolveTarget(url, policy, resolve), signal)
    const status = await post(url, addresses, message, signal)
    return { status, failure: failureOf(status), duration_ms: elapsed() }
  } catch (error) {
    return { status: null, failure: signal.aborted ? "timed_out" : causeOf(error), duration_ms: elapsed() }
  }

  function elapsed(): number {
    return Math.round(performance.now() - began)
  }
}

function post(
  url: URL,
  addresses: readonly string[],
  { headers, body }: Message,
  signal: AbortSignal,
): Promise<number> {
  return new Promise((resolve, reject) => {
    const request = (url.protocol === "http:" ? http : https).request(url, {
      method: "POST",
      headers: {
        ...headers,
        "content-type": "application/json",
        "content-length": Buffer.byteLength(body),
        "user-agent": "Tarnwright-Webhooks/1",
      },
      // A connection of its own, to an address that was checked: the name is not looked up a second time, when it
      // could lead elsewhere. The certificate is still checked against the name.
      agent: false,
      lookup: answering(addresses),
      signal,
    })
    request.on("error", reject)
    request.on("response", (response) => {
      let length = 0
      response.on("data", (chunk: Buffer) => {
        length += chunk.length
        if (length > largestAnswer_bytes) response.destroy()
      })
      // The status has come, so the receiver has answered, whatever becomes of the rest.
      response.on("error", () => {})
      response.on("close", () => resolve(response.statusCode ?? 0))
    })
    request.end(body)
  })
}

function answering(addresses: readonly string[]): LookupFunction {
  const known = addresses.map((address) => ({ address, family: isIP(address) }))
  return (_host, options, callback) => {
    if (options.all) callback(null, known)
    else callback(null, known[0]!.address, known[0]!.family)
  }
}

function failureOf(status: number): DeliveryFailure | null {
  if (status >= 200 && status < 300) return null
  if (status === 410) return "gone"
  return status >= 300 && status < 400 ? "redirected" : "refused"
}

const nameErrors = new Set(["ENOTFOUND", "ENODATA", "EAI_AGAIN", "EAI_NODATA"])
const tlsErrors = /^(ERR_TLS_|ERR_SSL_|CERT_|DEPTH_ZERO_|SELF_SIGNED_|UNABLE_TO_|HOSTNAME_MISMATCH|EPROTO)/

function causeOf(error: unknown): DeliveryFailure {
  if (error instanceof TargetRefused) return "target_refused"
  const code = error instanceof Error && "code" in error ? String(error.code) : ""
  if (nameErrors.has(code)) return "name_not_found"
  return tlsErrors.test(code) ? "tls_failed" : "connection_failed"
}

/** A look-up of the system cannot be ended, but need not be waited for. */
function untilAborted<T>(work: Promise<T>, signal: AbortSignal): Promise<T> {
  return new Promise((resolve, reject) => {
    signal.addEventListener("abort", () => reject(signal.reason), { once: true })
    work.then(resolve, reject)
  })
}
