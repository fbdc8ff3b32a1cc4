import { randomBytes } from "node:crypto"
import { sql } from "kysely"
import { type Trx, withoutTenant, withTenant } from "@/db"
import { recordAct } from "@/lib/audit"
import type { Call, Ctx } from "@/lib/context"
import { env } from "@/lib/env"
import { TarnwrightError } from "@/lib/errors"
import { lockReport } from "./find"
import { authorizeOn } from "./may-manage"
import type { Report } from "./report"

type OfReport = { readonly report_id: string }

/** Address of a shared report's page: whoever has it can read the report, until sharing ends. */
export function sharedUrl(slug: string): string {
  return `${env().PUBLIC_URL}/r/${slug}`
}

/**
 * Gives a report a page that needs no sign-in. The address cannot be guessed; a report that is shared keeps its own.
 *
 * @throws TarnwrightError `not_found`, `forbidden`.
 */
export function shareReport({ ctx, input }: Call<OfReport>): Promise<{ share_slug: string; url: string }> {
  return withTenant(ctx.account_id, async (trx) => {
    const report = await lockReport(trx, ctx, input.report_id)
    authorizeOn(ctx, report)
    const share_slug = report.share_slug ?? (await startSharing(trx, ctx, report))
    return { share_slug, url: sharedUrl(share_slug) }
  })
}

async function startSharing(trx: Trx, ctx: Ctx, { id, title }: Report): Promise<string> {
  const share_slug = randomBytes(18).toString("base64url")
  await setSlug(trx, ctx, id, share_slug)
  await recordAct(trx, ctx, { action: "report.shared", target: id, detail: { title } })
  return share_slug
}

/** Ends the sharing of a report: its page is gone at once, and a new one has a new address. */
export function unshareReport({ ctx, input }: Call<OfReport>): Promise<void> {
  return withTenant(ctx.account_id, async (trx) => {
    const report = await lockReport(trx, ctx, input.report_id)
    authorizeOn(ctx, report)
    if (report.share_slug === null) return
    await setSlug(trx, ctx, report.id, null)
    await recordAct(trx, ctx, {
      action: "report.unshared",
      target: report.id,
      detail: { title: report.title },
    })
  })
}

async function setSlug(trx: Trx, ctx: Ctx, report_id: string, share_slug: string | null): Promise<void> {
  await trx
    .updateTable("report")
    .set({ share_slug })
    .where("account_id", "=", ctx.account_id)
    .where("id", "=", report_id)
    .execute()
}

/** A report as its shared page shows it: not whom it was made for, nor by whom. */
export interface SharedReport
  extends Pick<Report, "id" | "kind" | "title" | "input" | "answer" | "engine_version" | "created_at"> {
  readonly account_name: string
}

/** @throws TarnwrightError `not_found` when nothing is shared under this address, or no longer. */
export async function readSharedReport(slug: string): Promise<SharedReport> {
  const { rows } = await withoutTenant((trx) =>
    sql<SharedReport>`select * from shared_report(${slug})`.execute(trx),
  )
  const [report] = rows
  if (!report) {
    throw new TarnwrightError(
      "not_found",
      "This report is not shared, or no longer. Ask the shop for a new link.",
    )
  }
  return report
}
