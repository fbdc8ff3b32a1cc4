import { withTenant } from "@/db"
import { ownersOf } from "@/lib/accounts"
import type { Ctx } from "@/lib/context"
import { stripe } from "./stripe-client"

/** The account's Stripe customer, made when there is none. Two calls at once make one: the key of the request is fixed. */
export async function customerOf(ctx: Ctx): Promise<string> {
  const { account, owner } = await withTenant(ctx.account_id, async (trx) => ({
    account: await trx
      .selectFrom("account")
      .select(["name", "slug", "stripe_customer_id"])
      .where("id", "=", ctx.account_id)
      .executeTakeFirstOrThrow(),
    owner: (await ownersOf(trx, ctx.account_id)).at(0),
  }))
  if (account.stripe_customer_id) return account.stripe_customer_id
  const made = await stripe().customers.create(
    {
      name: account.name,
      ...(owner && { email: owner.email }),
      metadata: { account_id: ctx.account_id, slug: account.slug },
    },
    { idempotencyKey: `customer:${ctx.account_id}:${ctx.now.toISOString().slice(0, 10)}` },
  )
  await withTenant(ctx.account_id, (trx) =>
    trx
      .updateTable("account")
      .set({ stripe_customer_id: made.id })
      .where("id", "=", ctx.account_id)
      .where("stripe_customer_id", "is", null)
      .execute(),
  )
  return made.id
}
