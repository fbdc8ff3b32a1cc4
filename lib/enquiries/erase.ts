import { withTenant } from "@/db"
import { recordAct } from "@/lib/audit"
import type { Call } from "@/lib/context"
import { findEnquiry } from "./find"

/**
 * Erases everything personal of an enquiry: name, address, message and the tank's figures. What is left says that a
 * shopper asked, when, by which widget, and that they had agreed. Erasing twice is erasing once.
 *
 * @throws TarnwrightError `not_found` when the account has no such enquiry.
 */
export async function eraseEnquiry({ ctx, input }: Call<{ readonly enquiry_id: string }>): Promise<void> {
  await withTenant(ctx.account_id, async (trx) => {
    const { id, erased_at } = await findEnquiry(trx, ctx, input.enquiry_id)
    if (erased_at) return
    await trx
      .updateTable("enquiry")
      .set({
        name: null,
        email: null,
        message: null,
        tank: null,
        erased_at: ctx.now,
        erased_by: ctx.actor.id,
      })
      .where("account_id", "=", ctx.account_id)
      .where("id", "=", id)
      .execute()
    await recordAct(trx, ctx, { action: "enquiry.erased", target: id })
  })
}
