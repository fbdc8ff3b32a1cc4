import type { ApiRequest, ApiResponse } from "./request"
import type { Router } from "./router"

const exposed = [
  "X-Request-Id",
  "RateLimit",
  "RateLimit-Policy",
  "Retry-After",
  "Tarnwright-Units",
  "Tarnwright-Units-Remaining",
  "Tarnwright-Method",
  "Deprecation",
  "Sunset",
  "Link",
].join(", ")

/** Headers that let the page of an allowed origin read the answer; none for anybody else. */
export function corsHeaders(origin: string | undefined): Record<string, string> {
  if (!origin) return { vary: "Authorization, Origin" }
  return {
    "access-control-allow-origin": origin,
    "access-control-expose-headers": exposed,
    vary: "Authorization, Origin",
  }
}

/**
 * Answers a browser's preflight without a look at the database: it carries no key, so any origin may ask what a
 * browser could call. The call itself is then answered only to the key's or the widget's own origins.
 */
export function preflight(router: Router, request: ApiRequest): ApiResponse {
  const match = router.find(request.header("access-control-request-method") ?? "POST", request.path)
  const origin = request.header("origin")
  const access = match && "operation" in match ? match.operation.access : undefined
  const fromBrowsers = access?.kind === "widget" || (access?.kind === "key" && access.scope === "calculate")
  return {
    status: 204,
    headers: {
      vary: "Origin",
      ...(origin &&
        fromBrowsers && {
          "access-control-allow-origin": origin,
          "access-control-allow-methods": "POST",
          "access-control-allow-headers": "Authorization, Content-Type, Idempotency-Key, X-Request-Id",
          "access-control-max-age": "7200",
        }),
    },
    body: null,
  }
}
