import { type Trx, withTenant } from "@/db"
import { authorize } from "@/lib/accounts"
import { recordAct } from "@/lib/audit"
import { setRenewal } from "@/lib/billing"
import type { Call, Ctx } from "@/lib/context"
import { TarnwrightError } from "@/lib/errors"
import { notifyOwners } from "@/lib/mail"

/** Days in which an owner may take the deletion of an account back. */
export const GRACE_DAYS = 14

/** When an account that was closed at this time is deleted. */
export function deletionOf(closing_since: Date): Date {
  return new Date(closing_since.getTime() + GRACE_DAYS * 86_400_000)
}

/** Since when an account is closing; null: it is not. */
export async function readClosing({ ctx }: { ctx: Ctx }): Promise<Date | null> {
  authorize(ctx.actor, "account.manage")
  return withTenant(ctx.account_id, async (trx) => (await read(trx, ctx)).closing_since)
}

/**
 * Closes the account: its keys and widgets stop at once, its subscription is not renewed, and after fourteen days
 * everything in it is deleted. Its owners are told, and any of them may take it back until then.
 *
 * @throws TarnwrightError `validation_failed` when the name that was typed is not the account's; `conflict` when it
 * is closing already or suspended.
 */
export async function closeAccount({ ctx, input }: Call<{ readonly name: string }>): Promise<void> {
  authorize(ctx.actor, "account.manage")
  await withTenant(ctx.account_id, async (trx) => {
    const { name } = await read(trx, ctx)
    if (input.name.trim() !== name) {
      const detail = `Write the name of the account as it stands here: ${name}`
      throw new TarnwrightError("validation_failed", detail, { errors: [{ pointer: "/name", detail }] })
    }
    const closed = await trx
      .updateTable("account")
      .set({ status: "closing", closing_since: ctx.now })
      .where("id", "=", ctx.account_id)
      .where("status", "=", "active")
      .executeTakeFirst()
    if (closed.numUpdatedRows !== 1n) {
      throw new TarnwrightError("conflict", "This account is closing already, or suspended.")
    }
    await recordAct(trx, ctx, { action: "account.closed", target: ctx.account_id })
    await notifyOwners(trx, ctx.account_id, ({ account_name, portal_url }) => ({
      template: "account_closing",
      data: {
        account_name,
        deleted_on: deletionOf(ctx.now).toISOString(),
        settings_url: `${portal_url}/settings#delete`,
      },
    }))
    // Last, so that an account whose subscription cannot be reached is not closed either.
    await setRenewal(ctx.account_id, false)
  })
}

/**
 * Takes the deletion of the account back: its keys and widgets work again.
 *
 * @throws TarnwrightError `conflict` when it is not closing.
 */
export async function reopenAccount({ ctx }: { ctx: Ctx }): Promise<void> {
  authorize(ctx.actor, "account.manage")
  await withTenant(ctx.account_id, async (trx) => {
    const reopened = await trx
      .updateTable("account")
      .set({ status: "active", closing_since: null })
      .where("id", "=", ctx.account_id)
      .where("status", "=", "closing")
      .executeTakeFirst()
    if (reopened.numUpdatedRows !== 1n) throw new TarnwrightError("conflict", "This account is not closing.")
    await recordAct(trx, ctx, { action: "account.reopened", target: ctx.account_id })
    await setRenewal(ctx.account_id, true)
  })
}

function read(trx: Trx, ctx: Ctx) {
  return trx
    .selectFrom("account")
    .select(["name", "closing_since"])
    .where("id", "=", ctx.account_id)
    .executeTakeFirstOrThrow()
}
