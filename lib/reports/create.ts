import { withTenant } from "@/db"
import { authorize } from "@/lib/accounts"
import { recordAct } from "@/lib/audit"
import type { Call } from "@/lib/context"
import { newId } from "@/lib/id"
import { publishEvent } from "@/lib/webhooks"
import { type ReportKind, reportKinds } from "./kinds"
import { type Report, type ReportAnswer, reportColumns } from "./report"

export interface NewReport {
  readonly kind: ReportKind
  readonly title?: string | undefined
  readonly shopper?: string | undefined
  /** The question as it was asked. */
  readonly input: object
  readonly answer: ReportAnswer
  /** Meters the report. What it throws keeps the report from being stored. */
  readonly charge: () => Promise<unknown>
}

/**
 * Keeps a result. It is stored if, and only if, its units were charged.
 *
 * @throws what `charge` throws
 */
export function createReport({ ctx, input }: Call<NewReport>): Promise<Report> {
  if (ctx.actor.kind === "user") authorize(ctx.actor, "report.create")
  const { kind, answer } = input
  const title = input.title?.trim() || reportKinds[kind]
  return withTenant(ctx.account_id, async (trx) => {
    const stored = await trx
      .insertInto("report")
      .values({
        account_id: ctx.account_id,
        id: newId("report"),
        kind,
        title,
        shopper: input.shopper?.trim() || null,
        input: JSON.stringify(input.input),
        answer: JSON.stringify(answer),
        engine_version: answer.method.version,
        created_by: ctx.actor.id,
        created_at: ctx.now,
        share_slug: null,
      })
      .returning(reportColumns)
      .executeTakeFirstOrThrow()
    await recordAct(trx, ctx, { action: "report.created", target: stored.id, detail: { kind, title } })
    await publishEvent(trx, ctx.account_id, "report.created", {
      report_id: stored.id,
      kind,
      title,
      created_at: ctx.now.toISOString(),
    })
    // The ledger has its own transaction. Charged last, so that little is left that could undo a report that is paid.
    await input.charge()
    return stored as unknown as Report
  })
}
