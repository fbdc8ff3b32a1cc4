import { z } from "zod"
import { CARDS, type CardKind, kindOfToken, refusal, refusesSaving } from "../billing/cards"
import { invalid, missing } from "../core/errors"
import { type Fake, idOf } from "../core/fake"
import { newId } from "../core/ids"
import { page as pageOf } from "../core/lists"
import { page, str } from "../core/params"
import { route } from "../core/route"
import type { Objects } from "../core/state"

export const paymentMethods = [
  route(
    "POST",
    "/v1/payment_methods/:id/attach",
    z.strictObject({ customer: str }),
    ({ fake, params, path }) => {
      const kind = kindOfToken(path.id!)
      if (kind) return saveCard(fake, kind, params.customer)
      const known = fake.get("payment_method", path.id!)
      if (idOf(known.customer) === params.customer) return known
      throw invalid("The payment method you provided has already been attached to a customer.")
    },
  ),
  route("POST", "/v1/payment_methods/:id/detach", z.strictObject({}), ({ fake, path }) => {
    const method = fake.get("payment_method", path.id!)
    const customer = fake.state.objects.customer[idOf(method.customer) ?? ""]
    if (customer?.invoice_settings?.default_payment_method === method.id) {
      customer.invoice_settings.default_payment_method = null
    }
    method.customer = null
    fake.emit("payment_method.detached", method)
    return method
  }),
  route("GET", "/v1/payment_methods/:id", z.strictObject({}), ({ fake, path }) =>
    fake.get("payment_method", path.id!),
  ),
  route(
    "GET",
    "/v1/payment_methods",
    z.strictObject({ ...page, customer: str.optional(), type: z.literal("card").optional() }),
    ({ fake, params }) => {
      const found = fake
        .all("payment_method")
        .filter((one) => !params.customer || one.customer === params.customer)
      return pageOf(found, params, "/v1/payment_methods")
    },
  ),
]

/**
 * Saves a practice card for a customer.
 *
 * @throws ApiError 402 for a card that cannot even be saved
 */
export function saveCard(fake: Fake, kind: CardKind, customerId: string): Objects["payment_method"] {
  const customer = fake.get("customer", customerId, "customer")
  if (refusesSaving(kind)) throw refusal(kind, false) ?? missing("payment_method", kind)
  const now = fake.now(customer.id)
  const method = fake.put("payment_method", {
    id: newId("pm"),
    object: "payment_method",
    allow_redisplay: "unspecified",
    billing_details: {
      address: customer.address ?? null,
      email: customer.email,
      name: customer.name ?? null,
      phone: null,
      tax_id: null,
    },
    card: {
      brand: "unknown",
      checks: { address_line1_check: null, address_postal_code_check: null, cvc_check: "pass" },
      country: "US",
      display_brand: "other",
      exp_month: 12,
      exp_year: new Date(now * 1000).getUTCFullYear() + 3,
      fingerprint: `practice${CARDS[kind].last4}`,
      funding: "credit",
      generated_from: null,
      last4: CARDS[kind].last4,
      networks: null,
      regulated_status: "unregulated",
      three_d_secure_usage: { supported: true },
      wallet: null,
    },
    created: now,
    customer: customer.id,
    customer_account: null,
    livemode: false,
    metadata: {},
    type: "card",
  })
  fake.state.cards[method.id] = kind
  fake.emit("payment_method.attached", method)
  return method
}
