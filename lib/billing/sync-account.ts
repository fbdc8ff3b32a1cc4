import type Stripe from "stripe"
import type { Trx } from "@/db"
import { recordAct } from "@/lib/audit"
import type { Ctx } from "@/lib/context"
import { notifyOwners } from "@/lib/mail"
import { publishEvent } from "@/lib/webhooks"
import { reportSoon } from "./report-overage"
import { deciding, graceEnd, isRunning, type Standing, serviceState } from "./service-state"
import { type InvoiceSnapshot, invoiceSnapshot, type SubscriptionSnapshot } from "./snapshot"
import { stripe } from "./stripe-client"
import { subscriptionsOf } from "./subscriptions-of"

/** Invoices read anew each time; an older one no longer changes. */
const RECENT_INVOICES = 24

/**
 * Reads an account's subscriptions and invoices from Stripe and lets the account follow: its plan, its quota and the
 * invoices it shows. Safe to repeat, at any time and in any order, while the caller holds the account's billing lock.
 *
 * @throws Error when Stripe cannot be read or answers in an unknown shape; nothing is changed then
 */
export async function syncAccount(
  trx: Trx,
  { account_id, customer }: { account_id: string; customer: string },
  now: Date,
): Promise<void> {
  const { subscriptions, invoices } = await fetchState(customer)
  await storeInvoices(trx, account_id, invoices)
  const current = deciding(subscriptions)
  // An account that never paid keeps the plan it has, which the platform's admin may have given it.
  if (!current) return
  const before = await trx
    .selectFrom("subscription")
    .select(["plan", "status", "current_period_end", "cancel_at_period_end", "past_due_since"])
    .where("account_id", "=", account_id)
    .executeTakeFirst()
  const owed = current.status === "past_due"
  const past_due_since = owed ? (owedSince(current, invoices) ?? before?.past_due_since ?? now) : null
  const standing = { ...current, past_due_since }
  await storeSubscription(trx, account_id, standing, now)
  await applyToAccount(trx, account_id, standing, now)
  await tell(trx, account_id, before, standing)
  if (before && before.current_period_end < current.current_period_end) await reportSoon(trx, account_id, now)
}

async function fetchState(customer: string) {
  const [subscriptions, invoices] = await Promise.all([
    subscriptionsOf(customer),
    stripe().invoices.list({ customer, limit: RECENT_INVOICES }),
  ])
  return { subscriptions, invoices: invoices.data.filter(isIssued).map(invoiceSnapshot) }
}

function isIssued(invoice: Stripe.Invoice): boolean {
  return invoice.status !== "draft"
}

/** When the oldest invoice that is still open was issued: the same moment however late we learn of it. */
function owedSince(current: SubscriptionSnapshot, invoices: readonly InvoiceSnapshot[]): Date | undefined {
  const open = invoices.filter(({ status, subscription }) => status === "open" && subscription === current.id)
  return open.map(({ issued_at }) => issued_at).sort((a, b) => a.getTime() - b.getTime())[0]
}

async function storeInvoices(
  trx: Trx,
  account_id: string,
  invoices: readonly InvoiceSnapshot[],
): Promise<void> {
  if (invoices.length === 0) return
  await trx
    .insertInto("invoice")
    .values(invoices.map(({ subscription: _of, ...row }) => ({ account_id, ...row })))
    .onConflict((conflict) =>
      conflict.columns(["account_id", "id"]).doUpdateSet((set) => ({
        number: set.ref("excluded.number"),
        status: set.ref("excluded.status"),
        amount_minor: set.ref("excluded.amount_minor"),
        hosted_url: set.ref("excluded.hosted_url"),
        issued_at: set.ref("excluded.issued_at"),
      })),
    )
    .execute()
}

type Stored = Pick<
  Current,
  "plan" | "status" | "current_period_end" | "cancel_at_period_end" | "past_due_since"
>

/** Tells the account's own systems of every change, and its owners, once, of a payment that begins to be owed. */
async function tell(
  trx: Trx,
  account_id: string,
  before: (Omit<Stored, "plan"> & { plan: string }) | undefined,
  current: Current,
): Promise<void> {
  const { status, current_period_end, cancel_at_period_end } = current
  const changed =
    before?.plan !== current.plan ||
    before.status !== status ||
    before.cancel_at_period_end !== cancel_at_period_end ||
    before.current_period_end.getTime() !== current_period_end.getTime()
  if (changed) {
    await publishEvent(trx, account_id, "subscription.changed", {
      plan: serviceState(current, 0, current.current_period_start).plan,
      status,
      current_period_end: isRunning(status) ? current_period_end.toISOString() : null,
      cancel_at_period_end,
    })
  }
  if (current.past_due_since && !before?.past_due_since) {
    const full_until = graceEnd(current.past_due_since).toISOString()
    await notifyOwners(trx, account_id, ({ account_name, portal_url }) => ({
      template: "payment_failed",
      data: { account_name, full_until, billing_url: `${portal_url}/billing` },
    }))
  }
}

type Current = SubscriptionSnapshot & Standing

async function storeSubscription(trx: Trx, account_id: string, current: Current, now: Date): Promise<void> {
  const row = {
    stripe_subscription_id: current.id,
    plan: current.plan,
    status: current.status,
    current_period_start: current.current_period_start,
    current_period_end: current.current_period_end,
    cancel_at_period_end: current.cancel_at_period_end,
    scheduled_plan: current.scheduled_plan,
    past_due_since: current.past_due_since,
    updated_at: now,
  }
  await trx
    .insertInto("subscription")
    .values({ account_id, ...row })
    .onConflict((conflict) => conflict.column("account_id").doUpdateSet(row))
    .execute()
}

/** Puts the plan and the quota into force. The database tells every process of the change when this commits. */
async function applyToAccount(trx: Trx, account_id: string, current: Current, now: Date): Promise<void> {
  const before = await trx
    .selectFrom("account")
    .select(["plan", "unit_cap", "period_anchor", "overage_cap_minor"])
    .where("id", "=", account_id)
    .forUpdate()
    .executeTakeFirstOrThrow()
  const { plan, unit_cap } = serviceState(current, before.overage_cap_minor, now)
  const period_anchor = plan === "nano" ? null : current.billing_cycle_anchor
  const same =
    before.plan === plan &&
    before.unit_cap === unit_cap &&
    before.period_anchor?.getTime() === period_anchor?.getTime()
  if (same) return
  await trx
    .updateTable("account")
    .set({ plan, unit_cap, period_anchor })
    .where("id", "=", account_id)
    .execute()
  const ctx: Ctx = { account_id, actor: { kind: "system", id: "billing" }, now }
  const detail = {
    plan_before: before.plan,
    plan,
    unit_cap_before: before.unit_cap,
    unit_cap,
    status: current.status,
  }
  await recordAct(trx, ctx, { action: "subscription.changed", target: current.id, detail })
}
