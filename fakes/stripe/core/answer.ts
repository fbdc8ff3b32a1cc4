import type { IncomingMessage, ServerResponse } from "node:http"
import { ApiError } from "./errors"

const MAX_BODY = 1024 * 1024

/** @throws ApiError 413 beyond 1 MiB */
export async function readBody(request: IncomingMessage): Promise<string> {
  const chunks: Buffer[] = []
  let size = 0
  for await (const chunk of request as AsyncIterable<Buffer>) {
    size += chunk.length
    if (size > MAX_BODY)
      throw new ApiError(413, { type: "invalid_request_error", message: "Body too large." })
    chunks.push(chunk)
  }
  return Buffer.concat(chunks).toString("utf8")
}

export function sendJson(
  response: ServerResponse,
  status: number,
  body: string,
  headers: Record<string, string> = {},
): void {
  response.writeHead(status, {
    "content-type": "application/json",
    "content-length": Buffer.byteLength(body),
    ...headers,
  })
  response.end(body)
}

export function sendHtml(response: ServerResponse, status: number, body: string): void {
  response.writeHead(status, {
    "content-type": "text/html; charset=utf-8",
    "content-length": Buffer.byteLength(body),
    "cache-control": "no-store",
    "content-security-policy":
      "default-src 'none'; img-src data:; style-src 'unsafe-inline'; base-uri 'none'",
    "referrer-policy": "same-origin",
  })
  response.end(body)
}

export function redirect(response: ServerResponse, to: string): void {
  response.writeHead(303, { location: to, "cache-control": "no-store" })
  response.end()
}
