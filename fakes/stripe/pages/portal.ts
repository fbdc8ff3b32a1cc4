import { CARDS, isCardKind } from "../billing/cards"
import { settle } from "../billing/collection"
import { productName } from "../billing/lines"
import { currentPeriod } from "../billing/renew"
import { isLive } from "../billing/status"
import type { Subscription } from "../billing/subscription-shape"
import { ApiError, missing } from "../core/errors"
import { type Fake, idOf } from "../core/fake"
import type { Objects } from "../core/state"
import { saveCard } from "../resources/payment-methods"
import { setCancelAtPeriodEnd } from "../resources/subscriptions"
import { cardsField } from "./cards-field"
import { day, document, type Html, html, money } from "./html"
import { invoiceTable } from "./invoice"
import type { Page } from "./page"

type PortalSession = Objects["billing_portal.session"]

const OPEN_FOR_S = 3600

/** The hosted portal of a customer: end or keep the subscription, change the card, pay what is open. */
export function portalPage(fake: Fake, page: Page): string | { to: string } {
  const session = fake.get("billing_portal.session", page.id)
  if (fake.now(session.customer) > session.created + OPEN_FOR_S) {
    return document("This page has ended", html`<h1>This page has ended</h1><p>${back(session)}</p>`)
  }
  if (page.method === "GET") return document("Your subscription", home(fake, session, null))
  const problem = act(fake, session, page)
  if (problem) return document("Your subscription", home(fake, session, problem))
  return { to: `${fake.base}/portal/${session.id}` }
}

/** Does what a posted form asks; a refusal of the card comes back as words. */
function act(fake: Fake, session: PortalSession, page: Page): string | null {
  const subscription = current(fake, session.customer)
  try {
    switch (page.part) {
      case "cancel":
        if (subscription) setCancelAtPeriodEnd(fake, subscription, true)
        return null
      case "keep":
        if (subscription) setCancelAtPeriodEnd(fake, subscription, false)
        return null
      case "card":
        changeCard(fake, session.customer, page.form.get("card") ?? "")
        return null
      case "pay":
        return pay(fake, session.customer, page.form.get("invoice") ?? "")
      default:
        throw missing("page", page.part)
    }
  } catch (error) {
    if (error instanceof ApiError && error.status === 402) return error.message
    throw error
  }
}

function changeCard(fake: Fake, customerId: string, kind: string): void {
  if (!isCardKind(kind)) throw missing("card", kind, "card")
  const customer = fake.get("customer", customerId)
  const method = saveCard(fake, kind, customerId)
  customer.invoice_settings.default_payment_method = method.id
  fake.emit("customer.updated", customer)
  const subscription = current(fake, customerId)
  if (!subscription) return
  const before = subscription.default_payment_method
  subscription.default_payment_method = method.id
  fake.changed()
  fake.emit("customer.subscription.updated", subscription, { default_payment_method: before })
}

function pay(fake: Fake, customer: string, id: string): string | null {
  const invoice = fake.get("invoice", id)
  if (idOf(invoice.customer) !== customer) throw missing("invoice", id)
  return settle(fake, invoice, true)?.message ?? null
}

/** The subscription that a person means: the newest that still runs. */
function current(fake: Fake, customer: string): Subscription | undefined {
  return fake
    .all("subscription")
    .filter((one) => idOf(one.customer) === customer && isLive(one))
    .at(-1)
}

function home(fake: Fake, session: PortalSession, problem: string | null): Html {
  const subscription = current(fake, session.customer)
  const invoices = fake
    .all("invoice")
    .filter((one) => idOf(one.customer) === session.customer && one.status !== "draft")
    .reverse()
  const card = cardOf(fake, session.customer, subscription)
  return html`<h1>Your subscription</h1>
<p>${back(session)}</p>
${problem ? html`<p class="problem" role="alert">${problem}</p>` : ""}
${subscription ? plan(fake, session, subscription) : html`<p>There is no subscription that runs.</p>`}
<h2>Card</h2>
<p>${card ? `Card ending ${card}` : "No card is saved."}</p>
<form method="post" action="/portal/${session.id}/card">
${cardsField("pays")}
<button class="plain">Use this card from now on</button>
</form>
<h2>Invoices</h2>
${invoiceTable(invoices, `/portal/${session.id}/pay`)}`
}

function plan(fake: Fake, session: PortalSession, subscription: Subscription): Html {
  const { end } = currentPeriod(subscription)
  const lines = subscription.items.data.map(
    (item) =>
      html`<tr><td>${productName(fake, item)}</td><td>${
        item.price.unit_amount === null || item.quantity === undefined
          ? "by use"
          : `${money(item.price.unit_amount * item.quantity, item.price.currency)} each ${item.price.recurring?.interval ?? ""}`
      }</td></tr>`,
  )
  const ending = subscription.cancel_at_period_end
  return html`<table>${lines}</table>
<p class="note">State: ${subscription.status}. ${ending ? `It ends on ${day(end)}.` : `It renews on ${day(end)}.`}</p>
<form method="post" action="/portal/${session.id}/${ending ? "keep" : "cancel"}">
<button class="plain">${ending ? "Keep the subscription" : "End the subscription with this period"}</button>
</form>`
}

function cardOf(fake: Fake, customerId: string, subscription: Subscription | undefined): string | undefined {
  const customer = fake.get("customer", customerId)
  const id =
    idOf(subscription?.default_payment_method ?? null) ??
    idOf(customer.invoice_settings.default_payment_method)
  const kind = id ? fake.state.cards[id] : undefined
  return kind && CARDS[kind].last4
}

function back(session: PortalSession): Html {
  return session.return_url ? html`<a href="${session.return_url}">Back to where you came from</a>` : html``
}
