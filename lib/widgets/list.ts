import { withTenant } from "@/db"
import type { Ctx } from "@/lib/context"
import { type WidgetRow, widgetRow } from "./row"

/** The account's widgets, newest first, switched-off ones among them. */
export async function listWidgets({ ctx }: { ctx: Ctx }): Promise<WidgetRow[]> {
  const stored = await withTenant(ctx.account_id, (trx) =>
    trx
      .selectFrom("widget")
      .selectAll()
      .where("account_id", "=", ctx.account_id)
      .orderBy("created_at", "desc")
      .orderBy("id", "desc")
      .execute(),
  )
  return stored.map(widgetRow)
}
