import { withTenant } from "@/db"
import { recordAct } from "@/lib/audit"
import type { Call } from "@/lib/context"
import { findReport } from "./find"
import { authorizeOn } from "./may-manage"

/** Deletes a report; its shared page is gone with it. @throws TarnwrightError `not_found`, `forbidden`. */
export function deleteReport({ ctx, input }: Call<{ readonly report_id: string }>): Promise<void> {
  return withTenant(ctx.account_id, async (trx) => {
    const report = await findReport(trx, ctx, input.report_id)
    authorizeOn(ctx, report)
    await trx
      .deleteFrom("report")
      .where("account_id", "=", ctx.account_id)
      .where("id", "=", report.id)
      .execute()
    await recordAct(trx, ctx, {
      action: "report.deleted",
      target: report.id,
      detail: { title: report.title },
    })
  })
}
