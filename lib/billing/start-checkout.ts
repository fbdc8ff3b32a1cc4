import { withTenant } from "@/db"
import { authorize } from "@/lib/accounts"
import { recordAct } from "@/lib/audit"
import type { Call } from "@/lib/context"
import { env } from "@/lib/env"
import { TarnwrightError } from "@/lib/errors"
import { customerOf } from "./customer"
import { ensurePrices, type PaidPlanId } from "./ensure-prices"
import { reachStripe } from "./reach-stripe"
import { deciding, isRunning } from "./service-state"
import { stripe } from "./stripe-client"
import { subscriptionsOf } from "./subscriptions-of"

/**
 * Opens a checkout for a paid plan and says where. Nothing is granted by it, nor by coming back from it: the account
 * changes when the subscription that it may start is read from Stripe.
 *
 * @throws TarnwrightError `forbidden` to anyone but an owner; `conflict` when a subscription runs already;
 *   `unavailable` when Stripe does not answer
 */
export async function startCheckout({
  ctx,
  input,
}: Call<{ readonly plan: PaidPlanId }>): Promise<{ url: string }> {
  authorize(ctx.actor, "billing.manage")
  const session = await reachStripe(() => openSession({ ctx, input }))
  await withTenant(ctx.account_id, (trx) =>
    recordAct(trx, ctx, {
      action: "billing.checkout_started",
      target: session.id,
      detail: { plan: input.plan },
    }),
  )
  if (!session.url) throw new Error(`Checkout ${session.id} has no address`)
  return { url: session.url }
}

async function openSession({ ctx, input }: Call<{ readonly plan: PaidPlanId }>) {
  const customer = await customerOf(ctx)
  await refuseSecond(customer)
  await closeOthers(customer)
  const { base, overage } = await ensurePrices(input.plan)
  const back = await billingPage(ctx.account_id)
  return stripe().checkout.sessions.create({
    mode: "subscription",
    customer,
    client_reference_id: ctx.account_id,
    line_items: [{ price: base, quantity: 1 }, ...(overage ? [{ price: overage }] : [])],
    subscription_data: { metadata: { account_id: ctx.account_id, plan: input.plan } },
    automatic_tax: { enabled: true },
    tax_id_collection: { enabled: true },
    customer_update: { address: "auto", name: "auto" },
    success_url: `${back}?checkout=done`,
    cancel_url: `${back}?checkout=left`,
  })
}

/** Asks Stripe itself, since our own state may be a moment behind. */
async function refuseSecond(customer: string): Promise<void> {
  const current = deciding(await subscriptionsOf(customer))
  if (current && isRunning(current.status)) {
    throw new TarnwrightError(
      "conflict",
      "A subscription runs already. Change its plan instead of starting another.",
    )
  }
}

/** A checkout left open in another tab must not become a second subscription. */
async function closeOthers(customer: string): Promise<void> {
  const { data } = await stripe().checkout.sessions.list({ customer, status: "open" })
  for (const { id } of data) await stripe().checkout.sessions.expire(id)
}

/** Address of the account's billing page. */
export async function billingPage(account_id: string): Promise<string> {
  const { slug } = await withTenant(account_id, (trx) =>
    trx.selectFrom("account").select("slug").where("id", "=", account_id).executeTakeFirstOrThrow(),
  )
  return `${env().PUBLIC_URL}/portal/${slug}/billing`
}
