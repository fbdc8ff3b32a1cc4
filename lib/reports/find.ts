import { type Trx, withTenant } from "@/db"
import type { Call, Ctx } from "@/lib/context"
import { TarnwrightError } from "@/lib/errors"
import { lineColumns, type Report, type ReportLine, reportColumns } from "./report"

/** @throws TarnwrightError `not_found` when the account has no such report. */
export function showReport({ ctx, input }: Call<{ readonly report_id: string }>): Promise<Report> {
  return withTenant(ctx.account_id, (trx) => findReport(trx, ctx, input.report_id))
}

/** The same inside a transaction, which holds the report until it ends. */
export async function lockReport(trx: Trx, ctx: Ctx, report_id: string): Promise<Report> {
  await trx
    .selectFrom("report")
    .select("id")
    .where("account_id", "=", ctx.account_id)
    .where("id", "=", report_id)
    .forUpdate()
    .execute()
  return findReport(trx, ctx, report_id)
}

export async function findReport(trx: Trx, ctx: Ctx, report_id: string): Promise<Report> {
  const row = await trx
    .selectFrom("report")
    .select(reportColumns)
    .where("account_id", "=", ctx.account_id)
    .where("id", "=", report_id)
    .executeTakeFirst()
  if (!row) throw new TarnwrightError("not_found", "There is no such report in this account.")
  return row as unknown as Report
}

export interface ReportQuery {
  readonly limit: number
  /** Id of the last report of the page before; ids sort by the time they were made. */
  readonly before?: string | undefined
}

/** Reports of the account, newest first. */
export async function listReports({ ctx, input }: Call<ReportQuery>): Promise<ReportLine[]> {
  const rows = await withTenant(ctx.account_id, (trx) => {
    let query = trx.selectFrom("report").select(lineColumns).where("account_id", "=", ctx.account_id)
    if (input.before) query = query.where("id", "<", input.before)
    return query.orderBy("id", "desc").limit(input.limit).execute()
  })
  return rows as ReportLine[]
}
