import type { Trx } from "@/db"
import type { Ctx } from "@/lib/context"
import { TarnwrightError } from "@/lib/errors"
import { type WidgetRow, widgetRow } from "./row"

/**
 * One of the account's widgets, in a transaction of the caller's.
 *
 * @throws TarnwrightError `not_found` when the account has no such widget.
 */
export async function findWidget(trx: Trx, ctx: Ctx, widget_id: string): Promise<WidgetRow> {
  const stored = await trx
    .selectFrom("widget")
    .selectAll()
    .where("account_id", "=", ctx.account_id)
    .where("id", "=", widget_id)
    .executeTakeFirst()
  if (!stored) throw new TarnwrightError("not_found", "There is no such widget in this account.")
  return widgetRow(stored)
}
