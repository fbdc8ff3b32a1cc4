import type { IncomingMessage, ServerResponse } from "node:http"
import { readBody, redirect, sendHtml } from "../core/answer"
import { ApiError, missing } from "../core/errors"
import type { Fake } from "../core/fake"
import { checkoutPage } from "./checkout"
import { document, html } from "./html"
import { invoicePage } from "./invoice"
import type { Page } from "./page"
import { portalPage } from "./portal"

const pages: Record<string, (fake: Fake, page: Page) => string | { to: string }> = {
  checkout: checkoutPage,
  portal: portalPage,
  invoice: invoicePage,
}

/** Answers a visit to a hosted page. */
export async function servePage(
  fake: Fake,
  incoming: IncomingMessage,
  response: ServerResponse,
): Promise<void> {
  try {
    const [, kind = "", id = "", part = ""] = new URL(incoming.url ?? "/", fake.base).pathname.split("/")
    const show = Object.hasOwn(pages, kind) ? pages[kind] : undefined
    if (!show || !id) throw missing("page", kind)
    const method = incoming.method ?? "GET"
    const form = new URLSearchParams(method === "POST" ? await readBody(incoming) : "")
    const shown = show(fake, { method, id, part, form })
    if (typeof shown === "string") sendHtml(response, 200, shown)
    else redirect(response, shown.to)
  } catch (error) {
    if (!(error instanceof ApiError)) throw error
    sendHtml(
      response,
      error.status,
      document("Not possible", html`<h1>Not possible</h1><p>${error.message}</p>`),
    )
  }
}
