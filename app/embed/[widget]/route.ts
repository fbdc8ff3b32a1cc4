import type { NextRequest } from "next/server"
import { accessOfWidget, originMatches } from "@/lib/keys"
import { showWidget } from "@/lib/widgets"
import { embedPage, missingPage } from "./page-text"

export const dynamic = "force-dynamic"

/**
 * The framed form of a widget: a page that only the widget's own origins may frame.
 *
 * Query: `parent`, the origin of the page around it, which is told how tall the widget is; `lang` and `theme`.
 */
export async function GET(request: NextRequest, { params }: { params: Promise<{ widget: string }> }) {
  const { widget: widget_id } = await params
  const access = await accessOfWidget(widget_id)
  if (!access || access.revoked_at || access.account_status !== "active") {
    return page(missingPage(), 404, [])
  }
  const { account_id, origins } = access
  const ctx = { account_id, actor: { kind: "system", id: "embed" }, now: new Date() } as const
  const shown = await showWidget({ ctx, input: { widget_id } })
  const query = request.nextUrl.searchParams
  const parent = query.get("parent") ?? ""
  const text = embedPage({
    widget_id,
    shown,
    parent: originMatches(parent, origins) ? parent : null,
    lang: query.get("lang"),
    theme: query.get("theme"),
    home: shown.settings.link?.url ?? origins.find((origin) => !origin.includes("*")) ?? null,
  })
  return page(text, 200, origins)
}

/** @source PLATFORM 4.3: framed by the widget's own origins and by nobody else; our portal shows a preview. */
function page(text: string, status: number, origins: readonly string[]): Response {
  const ancestors = status === 200 ? ["'self'", ...origins].join(" ") : "'none'"
  const policy = [
    "default-src 'none'",
    "script-src 'self'",
    "connect-src 'self'",
    "base-uri 'none'",
    "form-action 'none'",
    `frame-ancestors ${ancestors}`,
  ]
  return new Response(text, {
    status,
    headers: {
      "content-type": "text/html; charset=utf-8",
      "content-security-policy": policy.join("; "),
      "cache-control": "no-store",
      // The page around it is another origin by nature.
      "cross-origin-resource-policy": "cross-origin",
    },
  })
}
