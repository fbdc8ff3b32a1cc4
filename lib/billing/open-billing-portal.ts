import { withTenant } from "@/db"
import { authorize } from "@/lib/accounts"
import { recordAct } from "@/lib/audit"
import type { Call } from "@/lib/context"
import { customerOf } from "./customer"
import { reachStripe } from "./reach-stripe"
import { billingPage } from "./start-checkout"
import { stripe } from "./stripe-client"

/**
 * Opens Stripe's page where an owner changes the card, ends the subscription or pays what is open, and says where.
 *
 * @throws TarnwrightError `forbidden` to anyone but an owner; `unavailable` when Stripe does not answer
 */
export async function openBillingPortal({
  ctx,
  input,
}: Call<{ readonly flow?: "payment_method_update" }>): Promise<{ url: string }> {
  authorize(ctx.actor, "billing.manage")
  const return_url = await billingPage(ctx.account_id)
  const session = await reachStripe(async () =>
    stripe().billingPortal.sessions.create({
      customer: await customerOf(ctx),
      return_url,
      ...(input.flow && { flow_data: { type: input.flow } }),
    }),
  )
  await withTenant(ctx.account_id, (trx) =>
    recordAct(trx, ctx, { action: "billing.portal_opened", target: session.id }),
  )
  return { url: session.url }
}
