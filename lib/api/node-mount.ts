import type { IncomingMessage, RequestListener } from "node:http"
import { TarnwrightError } from "@/lib/errors"
import { BODY_LIMIT_BYTES } from "./parse"
import { API_PREFIX, type ApiRequest } from "./request"
import type { Serve } from "./serve"

export interface NodeMountOptions {
  /** Whether a proxy of ours stands in front, whose `X-Forwarded-For` may be believed. */
  readonly behindProxy?: boolean
}

/** Answers `/api/v1/*` on Node's own HTTP server. */
export function nodeMount(serve: Serve, { behindProxy = false }: NodeMountOptions = {}): RequestListener {
  return async (incoming, outgoing) => {
    const response = await serve(requestOf(incoming, behindProxy))
    const drained = drain(incoming)
    const bytes =
      typeof response.body === "string" ? Buffer.from(response.body) : (response.body ?? undefined)
    outgoing.writeHead(response.status, {
      ...response.headers,
      ...(bytes && { "content-length": bytes.byteLength }),
      ...(!drained && { connection: "close" }),
    })
    outgoing.end(bytes)
  }
}

/** Whether a request belongs to the API. */
export function isApiPath(url: string): boolean {
  return url.startsWith(`${API_PREFIX}/`)
}

function requestOf(incoming: IncomingMessage, behindProxy: boolean): ApiRequest {
  const [path = "", query = ""] = (incoming.url ?? "").split("?", 2)
  const forwarded = behindProxy
    ? incoming.headers["x-forwarded-for"]?.toString().split(",").at(-1)?.trim()
    : undefined
  return {
    method: incoming.method ?? "GET",
    path: path.slice(API_PREFIX.length),
    query: new URLSearchParams(query),
    header(name) {
      const value = incoming.headers[name]
      return Array.isArray(value) ? value.join(", ") : value
    },
    readBody: (limit) => readStream(incoming, limit),
    address: forwarded ?? incoming.socket.remoteAddress ?? "",
  }
}

/** Lets go of what a refusal left unread, so that the connection can serve again; false where that could be long. */
function drain(incoming: IncomingMessage): boolean {
  if (incoming.complete) return true
  incoming.resume()
  return Number(incoming.headers["content-length"] ?? Number.POSITIVE_INFINITY) <= BODY_LIMIT_BYTES
}

function readStream(incoming: IncomingMessage, limit: number): Promise<Uint8Array> {
  if (Number(incoming.headers["content-length"] ?? 0) > limit) return Promise.reject(tooLarge(limit))
  return new Promise((resolve, reject) => {
    const chunks: Buffer[] = []
    let length = 0
    incoming.on("data", (chunk: Buffer) => {
      length += chunk.length
      if (length > limit) {
        incoming.pause()
        reject(tooLarge(limit))
      } else {
        chunks.push(chunk)
      }
    })
    incoming.on("end", () => resolve(chunks.length === 1 ? (chunks[0] as Buffer) : Buffer.concat(chunks)))
    incoming.on("error", reject)
  })
}

/** The refusal of a body past the limit. */
export function tooLarge(limit: number): TarnwrightError {
  return new TarnwrightError(
    "body_too_large",
    `A body may have ${limit / 1024} KiB. Split the work into several calls.`,
  )
}
