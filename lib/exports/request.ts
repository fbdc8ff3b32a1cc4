import { enqueueJob, type Trx, withTenant } from "@/db"
import { authorize } from "@/lib/accounts"
import { recordAct } from "@/lib/audit"
import type { Call, Ctx } from "@/lib/context"
import { TarnwrightError } from "@/lib/errors"
import { newId } from "@/lib/id"

/** Name of the job that makes an archive. */
export const BUILD_EXPORT = "build_export"

/** Days for which an archive can be fetched. */
export const EXPORT_DAYS = 7

const day_ms = 86_400_000
const perDay = 5

/** An archive of the account's data: under way until it is `finished_at`. */
export interface AccountExport {
  readonly id: string
  readonly requested_at: Date
  readonly finished_at: Date | null
  readonly expires_at: Date
  readonly size_bytes: number | null
}

/**
 * Asks for an archive of everything that the account has stored here. It is made in the background, and whoever asked
 * is told by mail.
 *
 * @throws TarnwrightError `rate_limited` when five were asked for within a day.
 */
export async function requestExport({ ctx }: { ctx: Ctx }): Promise<{ id: string }> {
  authorize(ctx.actor, "account.manage")
  return withTenant(ctx.account_id, async (trx) => {
    const { count } = await trx
      .selectFrom("account_export")
      .select((select) => select.fn.countAll<number>().as("count"))
      .where("account_id", "=", ctx.account_id)
      .where("requested_at", ">", new Date(ctx.now.getTime() - day_ms))
      .executeTakeFirstOrThrow()
    if (count >= perDay) {
      throw new TarnwrightError("rate_limited", `An account can be exported ${perDay} times a day.`)
    }
    const id = newId("export")
    await trx
      .insertInto("account_export")
      .values({
        account_id: ctx.account_id,
        id,
        requested_by: ctx.actor.id,
        requested_at: ctx.now,
        expires_at: new Date(ctx.now.getTime() + EXPORT_DAYS * day_ms),
      })
      .execute()
    await recordAct(trx, ctx, { action: "account.export_asked", target: id })
    await enqueueJob(trx, { task: BUILD_EXPORT, payload: { account_id: ctx.account_id, export_id: id } })
    return { id }
  })
}

/** The archives that can be fetched or are under way, newest first. */
export function listExports({ ctx }: { ctx: Ctx }): Promise<AccountExport[]> {
  authorize(ctx.actor, "account.manage")
  return withTenant(ctx.account_id, (trx) =>
    keptOf(trx, ctx)
      .select((select) => [
        "id",
        "requested_at",
        "finished_at",
        "expires_at",
        select.fn<number | null>("octet_length", ["archive"]).as("size_bytes"),
      ])
      .orderBy("id", "desc")
      .execute(),
  )
}

/** @throws TarnwrightError `not_found` when there is no such archive, it is not finished, or it is too old. */
export async function readExport({
  ctx,
  input,
}: Call<{ readonly export_id: string }>): Promise<{ archive: Buffer; finished_at: Date }> {
  authorize(ctx.actor, "account.manage")
  return withTenant(ctx.account_id, async (trx) => {
    const found = await keptOf(trx, ctx)
      .select(["archive", "finished_at"])
      .where("id", "=", input.export_id)
      .executeTakeFirst()
    if (!found?.archive || !found.finished_at) {
      throw new TarnwrightError("not_found", "There is no such archive, or it is older than seven days.")
    }
    await recordAct(trx, ctx, { action: "account.export_fetched", target: input.export_id })
    return { archive: found.archive, finished_at: found.finished_at }
  })
}

function keptOf(trx: Trx, ctx: Ctx) {
  return trx
    .selectFrom("account_export")
    .where("account_id", "=", ctx.account_id)
    .where("expires_at", ">", ctx.now)
}
