import { z } from "zod"
import { expireSession } from "../billing/due"
import { amountOf } from "../billing/pricing"
import { invalid } from "../core/errors"
import type { Fake } from "../core/fake"
import { newId } from "../core/ids"
import { page as pageOf } from "../core/lists"
import { bool, count, mergeMetadata, metadata, page, str } from "../core/params"
import { route } from "../core/route"
import type { Objects } from "../core/state"
import { blankSession } from "./checkout-shape"

const DAY_S = 86_400
const HALF_HOUR_S = 1800
const update = z.enum(["auto", "never"]).optional()

const newSession = z.strictObject({
  mode: z.literal("subscription"),
  line_items: z
    .array(z.strictObject({ price: str, quantity: count.pipe(z.number().min(1)).optional() }))
    .min(1)
    .max(20),
  success_url: z.url({ protocol: /^https?$/ }),
  cancel_url: z.url({ protocol: /^https?$/ }).optional(),
  customer: str.optional(),
  customer_email: str.optional(),
  client_reference_id: str.max(200).optional(),
  metadata: metadata.optional(),
  subscription_data: z
    .strictObject({ metadata: metadata.optional(), description: str.optional() })
    .optional(),
  automatic_tax: z.strictObject({ enabled: bool }).optional(),
  tax_id_collection: z.strictObject({ enabled: bool }).optional(),
  customer_update: z.strictObject({ address: update, name: update, shipping: update }).optional(),
  billing_address_collection: z.enum(["auto", "required"]).optional(),
  allow_promotion_codes: bool.optional(),
  payment_method_collection: z.enum(["always", "if_required"]).optional(),
  locale: str.optional(),
  expires_at: count.optional(),
})

export type NewSession = z.output<typeof newSession>

export const checkoutSessions = [
  route("POST", "/v1/checkout/sessions", newSession, ({ fake, params }) => {
    checkCustomer(fake, params)
    const id = newId("cs_test")
    const now = fake.now(params.customer)
    const expiresAt = params.expires_at ?? now + DAY_S
    if (expiresAt < now + HALF_HOUR_S || expiresAt > now + DAY_S) {
      throw invalid(
        "The expires_at timestamp must be between 30 minutes and 24 hours from now.",
        "expires_at",
      )
    }
    const lines = params.line_items.map((line, index) => lineItem(fake, line, index))
    const session = blankSession(fake, params, { id, now, expiresAt, lines })
    fake.state.checkouts[id] = {
      description: params.subscription_data?.description ?? null,
      metadata: mergeMetadata({}, params.subscription_data?.metadata),
    }
    return fake.put("checkout.session", session)
  }),
  route(
    "GET",
    "/v1/checkout/sessions",
    z.strictObject({
      ...page,
      customer: str.optional(),
      subscription: str.optional(),
      status: str.optional(),
    }),
    ({ fake, params }) => {
      const found = fake
        .all("checkout.session")
        .filter((one) => !params.customer || one.customer === params.customer)
        .filter((one) => !params.subscription || one.subscription === params.subscription)
        .filter((one) => !params.status || one.status === params.status)
      return pageOf(found, params, "/v1/checkout/sessions")
    },
  ),
  route("GET", "/v1/checkout/sessions/:id", z.strictObject({}), ({ fake, path }) =>
    fake.get("checkout.session", path.id!),
  ),
  route("GET", "/v1/checkout/sessions/:id/line_items", z.strictObject(page), ({ fake, params, path }) => {
    const lines = fake.get("checkout.session", path.id!).line_items!
    return pageOf([...lines.data].reverse(), { ...params, created: undefined }, lines.url)
  }),
  route("POST", "/v1/checkout/sessions/:id/expire", z.strictObject({}), ({ fake, path }) => {
    const session = fake.get("checkout.session", path.id!)
    if (session.status !== "open") throw invalid("Only open Checkout Sessions can be expired.")
    expireSession(fake, session)
    return session
  }),
]

function checkCustomer(fake: Fake, params: NewSession): void {
  if (!params.customer) return
  if (params.customer_email)
    throw invalid("You may only specify one of customer and customer_email.", "customer")
  const customer = fake.get("customer", params.customer, "customer")
  const { address, name } = params.customer_update ?? {}
  if (params.automatic_tax?.enabled && !customer.address && address !== "auto") {
    throw invalid(
      "Automatic tax calculation in Checkout requires a valid address on the Customer. Add a valid address to the Customer or set `customer_update[address]` to `auto`.",
      undefined,
      "customer_tax_location_invalid",
    )
  }
  if (params.tax_id_collection?.enabled && name !== "auto") {
    throw invalid(
      "Tax ID collection requires updating business name on the customer.",
      "customer_update[name]",
    )
  }
}

type LineItem = NonNullable<Objects["checkout.session"]["line_items"]>["data"][number]

function lineItem(fake: Fake, line: NewSession["line_items"][number], index: number): LineItem {
  const price = fake.get("price", line.price, `line_items[${index}][price]`)
  if (!price.recurring)
    throw invalid("You specified `subscription` mode with a one-time price.", `line_items[${index}]`)
  if (!price.active)
    throw invalid(`The price specified is inactive: ${price.id}`, `line_items[${index}][price]`)
  const metered = price.recurring.usage_type === "metered"
  if (metered && line.quantity !== undefined) {
    throw invalid(
      "Quantity should not be specified where usage_type is `metered`.",
      `line_items[${index}][quantity]`,
    )
  }
  const amount = metered ? 0 : amountOf(price, line.quantity ?? 1)
  return {
    id: newId("li"),
    object: "item",
    adjustable_quantity: null,
    amount_discount: 0,
    amount_subtotal: amount,
    amount_tax: 0,
    amount_total: amount,
    currency: price.currency,
    description: fake.get("product", String(price.product)).name,
    metadata: {},
    price,
    quantity: metered ? null : (line.quantity ?? 1),
  }
}
