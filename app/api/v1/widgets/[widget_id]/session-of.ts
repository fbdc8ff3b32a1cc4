import type { Caller } from "@/lib/api/define-operation"
import { TarnwrightError } from "@/lib/errors"
import { verifySessionToken } from "@/lib/widgets"

/**
 * How long after its ten minutes a token still lets its shopper finish a sentence: asking a question costs nothing, so
 * a second session would charge the shop for one page view twice.
 */
const late_s = 2 * 3600

/**
 * The id of the session that a token stands for.
 *
 * @throws TarnwrightError `origin_not_allowed` when it is not of this widget and this page.
 */
export async function sessionOf(
  { ctx, origin }: Caller,
  { widget_id, session_token }: { readonly widget_id: string; readonly session_token: string },
): Promise<string> {
  const session = await verifySessionToken(session_token, origin ?? "", ctx.now, late_s)
  if (session.widget_id === widget_id && session.account_id === ctx.account_id) return session.session_id
  throw new TarnwrightError(
    "origin_not_allowed",
    "This session is another widget's. Open one of this widget.",
  )
}
