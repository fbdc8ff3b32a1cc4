import { env } from "@/lib/env"
import type { AnyOperation } from "./define-operation"
import { tooLarge } from "./node-mount"
import { BODY_LIMIT_BYTES } from "./parse"
import { API_PREFIX, type ApiRequest } from "./request"
import { createServe } from "./serve"

type Handler = (request: Request) => Promise<Response>

/** Route handlers of the App Router for operations of the registry: what `next dev` and a serverless host use. */
export function nextMount(registry: readonly AnyOperation[]) {
  let serve: ReturnType<typeof createServe> | undefined
  const handle: Handler = async (request) => {
    serve ??= createServe({ registry, publicUrl: env().PUBLIC_URL })
    const { status, headers, body } = await serve(requestOf(request))
    return new Response(body as BodyInit | null, { status, headers })
  }
  return { GET: handle, POST: handle, PATCH: handle, DELETE: handle, OPTIONS: handle }
}

function requestOf(request: Request): ApiRequest {
  const url = new URL(request.url)
  return {
    method: request.method,
    path: url.pathname.slice(API_PREFIX.length),
    query: url.searchParams,
    header: (name) => request.headers.get(name) ?? undefined,
    async readBody(limit = BODY_LIMIT_BYTES) {
      if (Number(request.headers.get("content-length") ?? 0) > limit) throw tooLarge(limit)
      const bytes = new Uint8Array(await request.arrayBuffer())
      if (bytes.length > limit) throw tooLarge(limit)
      return bytes
    },
    // Next does not hand the socket on; the host's proxy names the caller.
    address: request.headers.get("x-forwarded-for")?.split(",").at(-1)?.trim() ?? "",
  }
}
