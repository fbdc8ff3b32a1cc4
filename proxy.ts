import { type NextRequest, NextResponse } from "next/server"

/**
 * Gives each page its content security policy with a fresh nonce, which Next puts on its own scripts. Nothing is
 * decided here about who may see what: pages and routes do that themselves.
 */
export function proxy(request: NextRequest): NextResponse {
  const nonce = btoa(crypto.randomUUID())
  const policy = policyFor(nonce)
  const headers = new Headers(request.headers)
  headers.set("content-security-policy", policy)
  const response = NextResponse.next({ request: { headers } })
  response.headers.set("content-security-policy", policy)
  return response
}

export const config = { matcher: [{ source: "/((?!api/|embed/|_next/|w/|.*\\.(?:svg|png|ico|woff2)$).*)" }] }

// React evaluates code in development only, to rebuild the server's stack traces.
const development = process.env.NODE_ENV === "development" ? " 'unsafe-eval'" : ""

/** @source PLATFORM 6.1. Styles may stand in attributes: charts and the explorer place things by them. */
function policyFor(nonce: string): string {
  return [
    "default-src 'self'",
    `script-src 'nonce-${nonce}' 'strict-dynamic'${development}`,
    "style-src 'self' 'unsafe-inline'",
    "img-src 'self' data: blob:",
    "connect-src 'self'",
    "object-src 'none'",
    "base-uri 'none'",
    "frame-ancestors 'none'",
    "form-action 'self' https://checkout.stripe.com https://billing.stripe.com",
  ].join("; ")
}
