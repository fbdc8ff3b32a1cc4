import { z } from "zod"
import { end } from "../billing/renew"
import { isLive } from "../billing/status"
import { invalid } from "../core/errors"
import { type Fake, idOf } from "../core/fake"
import { newId } from "../core/ids"
import { page as pageOf } from "../core/lists"
import { clearable, mergeMetadata, metadata, page, str } from "../core/params"
import { route } from "../core/route"

const address = z.strictObject({
  city: clearable.optional(),
  country: clearable.optional(),
  line1: clearable.optional(),
  line2: clearable.optional(),
  postal_code: clearable.optional(),
  state: clearable.optional(),
})

const fields = {
  name: clearable.optional(),
  email: clearable.optional(),
  phone: clearable.optional(),
  description: clearable.optional(),
  address: z.union([z.literal("").transform(() => null), address]).optional(),
  metadata: metadata.optional(),
  tax_exempt: z.enum(["none", "exempt", "reverse"]).optional(),
  invoice_settings: z.strictObject({ default_payment_method: clearable.optional() }).optional(),
}

export const customers = [
  route(
    "POST",
    "/v1/customers",
    z.strictObject({ ...fields, payment_method: str.optional(), test_clock: str.optional() }),
    ({ fake, params }) => {
      const clock = params.test_clock && fake.get("test_helpers.test_clock", params.test_clock, "test_clock")
      const id = newId("cus")
      const customer = fake.put("customer", {
        id,
        object: "customer",
        address: fullAddress(params.address),
        balance: 0,
        created: clock ? clock.frozen_time : fake.now(),
        currency: null,
        default_source: null,
        delinquent: false,
        description: params.description ?? null,
        email: params.email ?? null,
        invoice_prefix: id.slice(4, 12).toUpperCase(),
        invoice_settings: {
          custom_fields: null,
          default_payment_method: params.invoice_settings?.default_payment_method ?? null,
          footer: null,
          rendering_options: null,
        },
        livemode: false,
        metadata: mergeMetadata({}, params.metadata),
        name: params.name ?? null,
        phone: params.phone ?? null,
        preferred_locales: [],
        shipping: null,
        tax_exempt: params.tax_exempt ?? "none",
        test_clock: params.test_clock ?? null,
      })
      fake.emit("customer.created", customer)
      return customer
    },
  ),
  route(
    "GET",
    "/v1/customers",
    z.strictObject({ ...page, email: str.optional(), test_clock: str.optional() }),
    ({ fake, params }) => {
      const found = fake
        .all("customer")
        .filter((one) => !("deleted" in one))
        .filter((one) => !params.email || one.email === params.email)
        .filter((one) => (one.test_clock ?? null) === (params.test_clock ?? null))
      return pageOf(found, params, "/v1/customers")
    },
  ),
  route("GET", "/v1/customers/:id", z.strictObject({}), ({ fake, path }) => {
    const found = fake.state.objects.customer[path.id!]
    return found ?? fake.get("customer", path.id!)
  }),
  route("POST", "/v1/customers/:id", z.strictObject(fields), ({ fake, params, path }) => {
    const customer = fake.get("customer", path.id!)
    const { metadata: change, address: where, invoice_settings: settings, ...rest } = params
    const card = settings?.default_payment_method
    if (card) checkOwned(fake, card, customer.id)
    Object.assign(customer, rest, { metadata: mergeMetadata(customer.metadata, change) })
    if (where !== undefined) customer.address = fullAddress(where)
    if (card !== undefined) customer.invoice_settings.default_payment_method = card
    fake.changed()
    fake.emit("customer.updated", customer)
    return customer
  }),
  route("DELETE", "/v1/customers/:id", z.strictObject({}), ({ fake, path }) => {
    const customer = fake.get("customer", path.id!)
    for (const subscription of fake.all("subscription")) {
      if (idOf(subscription.customer) === customer.id && isLive(subscription)) end(fake, subscription)
    }
    for (const invoice of fake.all("invoice")) {
      if (idOf(invoice.customer) !== customer.id) continue
      invoice.next_payment_attempt = null
      invoice.automatically_finalizes_at = null
    }
    for (const session of fake.all("checkout.session")) {
      if (idOf(session.customer) === customer.id && session.status === "open") session.status = "expired"
    }
    fake.emit("customer.deleted", customer)
    const gone = { id: customer.id, object: "customer", deleted: true } as const
    fake.put("customer", gone as never)
    return gone
  }),
]

function fullAddress(value: z.output<typeof address> | null | undefined) {
  if (!value) return null
  const { city = null, country = null, line1 = null, line2 = null, postal_code = null, state = null } = value
  return { city, country, line1, line2, postal_code, state }
}

function checkOwned(fake: Fake, card: string, customer: string): void {
  const method = fake.get("payment_method", card, "invoice_settings[default_payment_method]")
  if (idOf(method.customer) !== customer) {
    throw invalid(
      "The customer does not have a payment method with this ID.",
      "invoice_settings[default_payment_method]",
    )
  }
}
