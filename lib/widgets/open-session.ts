import type { Call } from "@/lib/context"
import { SESSION_SECONDS, signSessionToken } from "./session-token"
import { type ShownWidget, showWidget } from "./show"

export interface SessionRequest {
  readonly widget_id: string
  /** The page's origin, already found on the widget's list. */
  readonly origin: string
}

export interface WidgetSession extends ShownWidget {
  readonly token: string
  readonly expires_in_s: number
}

/**
 * Opens a session: all that one shopper calculates on one page view. Counting its units is the caller's work.
 *
 * @throws TarnwrightError `not_found` when the account has no such widget.
 */
export async function openSession({ ctx, input }: Call<SessionRequest>): Promise<WidgetSession> {
  const { widget_id, origin } = input
  const shown = await showWidget({ ctx, input: { widget_id } })
  const token = await signSessionToken({ widget_id, account_id: ctx.account_id, origin }, ctx.now)
  return { token, expires_in_s: SESSION_SECONDS, ...shown }
}
