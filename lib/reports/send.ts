import { withTenant } from "@/db"
import { recordAct } from "@/lib/audit"
import type { Call } from "@/lib/context"
import { TarnwrightError } from "@/lib/errors"
import { enqueueMail } from "@/lib/mail"
import { rateLimiter } from "@/lib/usage"
import { findReport, showReport } from "./find"
import { authorizeOn } from "./may-manage"
import type { Report } from "./report"
import { shareReport } from "./share"
import { sheetOf } from "./sheet"

// A stranger's mailbox must not be filled through us.
const lettersTo = { points: 5, window_s: 3600 }
const lettersFrom = { points: 60, window_s: 3600 }

/**
 * Mails a report to a customer: its answer, its gravest cautions and the link to its shared page. The address is kept
 * nowhere once the mail is gone.
 *
 * @throws TarnwrightError `not_found`, `forbidden`, `rate_limited`.
 */
export async function sendReport({
  ctx,
  input,
}: Call<{ readonly report_id: string; readonly email: string }>): Promise<{ url: string; email: string }> {
  authorizeOn(ctx, await showReport({ ctx, input }))
  await refuseFlood(ctx.account_id, input.email)
  const { url } = await shareReport({ ctx, input })
  await withTenant(ctx.account_id, async (trx) => {
    const report = await findReport(trx, ctx, input.report_id)
    const { name } = await trx
      .selectFrom("account")
      .select("name")
      .where("id", "=", ctx.account_id)
      .executeTakeFirstOrThrow()
    const sheet = sheetOf(report)
    await enqueueMail(trx, {
      to: input.email,
      template: "shared_report",
      data: {
        account_name: name,
        title: report.title,
        summary: sheet.answer.map(({ name, metric }) => `${name}: ${metric}`),
        cautions: [
          ...cautionsOf(report, "danger").map((message) => `Danger: ${message}`),
          ...cautionsOf(report, "warning").map((message) => `Caution: ${message}`),
        ],
        url,
      },
    })
    // Not to whom: the address is kept nowhere.
    await recordAct(trx, ctx, { action: "report.sent", target: report.id, detail: { title: report.title } })
  })
  return { url, email: input.email }
}

function cautionsOf({ answer }: Report, wanted: string): string[] {
  return answer.cautions.filter(({ severity }) => severity === wanted).map(({ message }) => message)
}

async function refuseFlood(account_id: string, email: string): Promise<void> {
  const taken = await Promise.all([
    rateLimiter().take(`report-to:${email}`, lettersTo),
    rateLimiter().take(`report-from:${account_id}`, lettersFrom),
  ])
  const refused = taken.find(({ allowed }) => !allowed)
  if (refused) {
    throw new TarnwrightError(
      "rate_limited",
      "That is too many letters in an hour. Wait before you send more.",
      {
        retryAfterS: Math.max(1, refused.reset_s),
      },
    )
  }
}
