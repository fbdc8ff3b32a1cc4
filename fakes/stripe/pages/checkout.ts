import { type CardKind, isCardKind, refusal } from "../billing/cards"
import { subscribe } from "../billing/subscribe"
import { ApiError, missing } from "../core/errors"
import { type Fake, idOf } from "../core/fake"
import { newId } from "../core/ids"
import type { Objects } from "../core/state"
import { saveCard } from "../resources/payment-methods"
import { cardsField } from "./cards-field"
import { document, type Html, html, money } from "./html"
import type { Page } from "./page"

type Session = Objects["checkout.session"]

const POSTAL = {
  city: "Practice City",
  country: "US",
  line1: "1 Practice Street",
  line2: null,
  postal_code: "00000",
  state: "CA",
}

/**
 * The hosted checkout. Forms post `card` to the page itself, and then, for a card that asks its owner, `answer` to
 * its `confirm` page. Leaving by the link completes nothing: the session stays open until it expires.
 */
export function checkoutPage(fake: Fake, page: Page): string | { to: string } {
  const session = fake.get("checkout.session", page.id)
  if (session.status === "complete") return { to: completedUrl(session) }
  if (session.status !== "open") return document("Checkout has ended", ended(session))
  if (page.method === "GET") return document("Checkout", form(session, "pays", null))

  const card = page.form.get("card") ?? ""
  if (!isCardKind(card)) throw missing("card", card, "card")
  if (card === "asks" && page.part !== "confirm")
    return document("Confirm the payment", confirmation(session))
  if (page.part === "confirm" && page.form.get("answer") !== "approve") {
    return document("Checkout", form(session, card, "The owner of the card refused. Nothing was paid."))
  }
  const declined = refusal(card, page.part === "confirm")
  if (declined) return document("Checkout", form(session, card, `${declined.message} Nothing was paid.`))
  complete(fake, session, card)
  return { to: completedUrl(session) }
}

function complete(fake: Fake, session: Session, card: CardKind): void {
  const customer = customerOf(fake, session)
  const method = saveCard(fake, card, customer.id)
  customer.address ??= POSTAL
  fake.emit("customer.updated", customer)
  const extra = fake.state.checkouts[session.id]
  const { subscription, invoice, declined } = subscribe(
    fake,
    {
      customer: customer.id,
      items: session.line_items!.data.map((line) => ({
        price: fake.get("price", line.price!.id),
        quantity: line.quantity ?? undefined,
      })),
      metadata: extra?.metadata ?? {},
      description: extra?.description ?? null,
      defaultPaymentMethod: method.id,
      automaticTax: session.automatic_tax.enabled,
      cancelAtPeriodEnd: false,
    },
    { behavior: "error_if_incomplete", confirmed: true },
  )
  if (declined) throw new ApiError(declined.status, declined.body)
  Object.assign(session, {
    status: "complete",
    payment_status: "paid",
    customer: customer.id,
    subscription: subscription.id,
    invoice: invoice.id,
    url: null,
  })
  session.automatic_tax.status = session.automatic_tax.enabled ? "complete" : null
  session.customer_details!.address = customer.address ?? null
  fake.changed()
  fake.emit("checkout.session.completed", session)
}

function customerOf(fake: Fake, session: Session): Objects["customer"] {
  const id = idOf(session.customer)
  if (id) return fake.get("customer", id)
  const made = newId("cus")
  return fake.put("customer", {
    id: made,
    object: "customer",
    address: POSTAL,
    balance: 0,
    created: fake.now(),
    currency: null,
    default_source: null,
    delinquent: false,
    description: null,
    email: session.customer_email,
    invoice_settings: {
      custom_fields: null,
      default_payment_method: null,
      footer: null,
      rendering_options: null,
    },
    livemode: false,
    metadata: {},
    name: null,
    phone: null,
    preferred_locales: [],
    shipping: null,
    tax_exempt: "none",
    test_clock: null,
  })
}

function completedUrl(session: Session): string {
  return session.success_url!.replaceAll("{CHECKOUT_SESSION_ID}", session.id)
}

function form(session: Session, chosen: CardKind, problem: string | null): Html {
  const total = money(session.amount_total ?? 0, session.currency ?? "usd")
  const lines = session.line_items!.data.map(
    (
      line,
    ) => html`<tr><td>${line.description}${line.quantity === null ? "" : monthly(line.price?.recurring?.interval)}</td>
<td>${line.quantity === null ? "by use" : money(line.amount_total, line.currency)}</td></tr>`,
  )
  return html`<h1>Pay ${total}</h1>
<p class="note">${session.customer_details?.email ?? ""}</p>
${problem ? html`<p class="problem" role="alert">${problem}</p>` : ""}
<table>${lines}<tr class="total"><td>To pay today</td><td>${total}</td></tr></table>
<form method="post" action="/checkout/${session.id}">
${cardsField(chosen)}
<div class="acts"><button>Pay ${total}</button>${leave(session)}</div>
</form>`
}

function confirmation(session: Session): Html {
  return html`<h1>Is this you?</h1>
<p>The bank of the card ending 3184 asks its owner to confirm the payment.</p>
<form method="post" action="/checkout/${session.id}/confirm">
<input type="hidden" name="card" value="asks">
<div class="acts"><button name="answer" value="approve">Yes, approve it</button>
<button class="plain" name="answer" value="refuse">No, refuse it</button></div>
</form>`
}

function ended(session: Session): Html {
  return html`<h1>This checkout has ended</h1>
<p>It was not finished in time, and nothing was paid.</p>
<p>${leave(session)}</p>`
}

function leave(session: Session): Html {
  return session.cancel_url ? html`<a href="${session.cancel_url}">Go back without paying</a>` : html``
}

function monthly(interval: string | undefined): string {
  return interval ? `, each ${interval}` : ""
}
