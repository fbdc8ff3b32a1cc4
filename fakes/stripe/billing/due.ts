import { type Fake, idOf } from "../core/fake"
import type { Objects } from "../core/state"
import { settle } from "./collection"
import { draftInvoice, voidInvoice } from "./invoices"
import { dropPendingUpdate } from "./pending-update"
import { periodEnd } from "./periods"
import { closeDraft, currentPeriod, end, paidAheadLines, renew, usedLines } from "./renew"
import { isLive, setStatus } from "./status"
import type { Subscription } from "./subscription-shape"

const INCOMPLETE_S = 23 * 3600
const UPCOMING_S = 3 * 86_400

interface Due {
  at: number
  run(): void
}

/**
 * Does everything that has come due up to a moment, in the order of time: renewals, drafts to close, payments to try
 * again, things to expire.
 *
 * @param clock a test clock, which is set to each moment in turn; null for what lives in real time
 */
export function runDue(fake: Fake, clock: Objects["test_helpers.test_clock"] | null, until: number): void {
  for (;;) {
    const next = earliest(fake, clock?.id ?? null)
    if (!next || next.at > until) return
    if (clock) clock.frozen_time = Math.max(clock.frozen_time, next.at)
    next.run()
    fake.changed()
  }
}

function earliest(fake: Fake, clock: string | null): Due | undefined {
  const ours = (customer: string | null) =>
    ((customer && fake.state.objects.customer[customer]?.test_clock) ?? null) === clock
  const dues = [
    ...fake
      .all("subscription")
      .filter((one) => ours(idOf(one.customer)))
      .flatMap((subscription) => subscriptionDues(fake, subscription)),
    ...fake
      .all("invoice")
      .filter((one) => ours(idOf(one.customer)))
      .flatMap((invoice) => invoiceDues(fake, invoice)),
    ...fake
      .all("checkout.session")
      .filter((one) => one.status === "open" && ours(idOf(one.customer)))
      .map((session) => ({ at: session.expires_at, run: () => expireSession(fake, session) })),
  ]
  return dues.reduce<Due | undefined>((best, due) => (!best || due.at < best.at ? due : best), undefined)
}

export function expireSession(fake: Fake, session: Objects["checkout.session"]): void {
  session.status = "expired"
  session.url = null
  fake.emit("checkout.session.expired", session)
}

/** What the next renewal would bill. */
export function upcomingInvoice(fake: Fake, subscription: Subscription): Objects["invoice"] {
  const used = currentPeriod(subscription)
  const recurring = subscription.items.data[0]!.price.recurring!
  const next = { start: used.end, end: periodEnd(subscription.billing_cycle_anchor, recurring, used.end) }
  const lines = [...usedLines(fake, subscription, used), ...paidAheadLines(fake, subscription, next)]
  const customer = idOf(subscription.customer)!
  return draftInvoice(fake, { customer, subscription, reason: "upcoming", lines, period: used })
}

function subscriptionDues(fake: Fake, subscription: Subscription): Due[] {
  if (subscription.status === "incomplete") {
    return [
      {
        at: subscription.created + INCOMPLETE_S,
        run: () => setStatus(fake, subscription, "incomplete_expired"),
      },
    ]
  }
  if (!isLive(subscription)) return []
  const period = currentPeriod(subscription).end
  const pending = subscription.pending_update
  const dues: Due[] = [{ at: period, run: () => renew(fake, subscription) }]
  if (subscription.cancel_at && subscription.cancel_at < period) {
    dues.push({ at: subscription.cancel_at, run: () => end(fake, subscription) })
  }
  if (pending) dues.push({ at: pending.expires_at, run: () => expirePending(fake, subscription) })
  if (!subscription.cancel_at_period_end && fake.state.announced[subscription.id] !== period) {
    dues.push({ at: period - UPCOMING_S, run: () => announce(fake, subscription, period) })
  }
  return dues
}

function announce(fake: Fake, subscription: Subscription, end: number): void {
  fake.state.announced[subscription.id] = end
  fake.emit("invoice.upcoming", { ...upcomingInvoice(fake, subscription), id: undefined })
}

function expirePending(fake: Fake, subscription: Subscription): void {
  dropPendingUpdate(fake, subscription)
  const invoice = fake.state.objects.invoice[idOf(subscription.latest_invoice) ?? ""]
  if (invoice?.status === "open" && invoice.billing_reason === "subscription_update")
    voidInvoice(fake, invoice)
}

function invoiceDues(fake: Fake, invoice: Objects["invoice"]): Due[] {
  if (invoice.status === "draft" && invoice.automatically_finalizes_at) {
    return [{ at: invoice.automatically_finalizes_at, run: () => closeDraft(fake, invoice) }]
  }
  if (invoice.status === "open" && invoice.next_payment_attempt) {
    return [{ at: invoice.next_payment_attempt, run: () => void settle(fake, invoice) }]
  }
  return []
}
