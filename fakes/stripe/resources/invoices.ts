import { z } from "zod"
import { changedItems, prorationLines } from "../billing/change"
import { settle } from "../billing/collection"
import { upcomingInvoice } from "../billing/due"
import { draftInvoice, finalize, subscriptionOf, voidInvoice } from "../billing/invoices"
import { ApiError } from "../core/errors"
import { type Fake, idOf } from "../core/fake"
import { page as pageOf } from "../core/lists"
import { bool, count, page, str } from "../core/params"
import { route } from "../core/route"

const previewItem = z.strictObject({
  id: str.optional(),
  price: str.optional(),
  quantity: count.optional(),
  deleted: bool.optional(),
  clear_usage: bool.optional(),
})

export const invoices = [
  route(
    "GET",
    "/v1/invoices",
    z.strictObject({
      ...page,
      customer: str.optional(),
      status: z.enum(["draft", "open", "paid", "uncollectible", "void"]).optional(),
      subscription: str.optional(),
    }),
    ({ fake, params }) => {
      const found = fake
        .all("invoice")
        .filter((one) => !params.customer || one.customer === params.customer)
        .filter((one) => !params.status || one.status === params.status)
        .filter((one) => !params.subscription || subscriptionOf(fake, one)?.id === params.subscription)
      return pageOf(found, params, "/v1/invoices")
    },
  ),
  route(
    "POST",
    "/v1/invoices/create_preview",
    z.strictObject({
      customer: str.optional(),
      subscription: str,
      subscription_details: z
        .strictObject({
          items: z.array(previewItem).max(20).optional(),
          proration_behavior: z.enum(["create_prorations", "always_invoice", "none"]).optional(),
          proration_date: count.optional(),
        })
        .optional(),
    }),
    ({ fake, params }) => preview(fake, params),
  ),
  route("GET", "/v1/invoices/:id", z.strictObject({}), ({ fake, path }) => fake.get("invoice", path.id!)),
  route("GET", "/v1/invoices/:id/lines", z.strictObject(page), ({ fake, params, path }) => {
    const { lines } = fake.get("invoice", path.id!)
    return pageOf([...lines.data].reverse(), params, lines.url)
  }),
  route(
    "POST",
    "/v1/invoices/:id/finalize",
    z.strictObject({ auto_advance: bool.optional() }),
    ({ fake, path }) => {
      const invoice = fake.get("invoice", path.id!)
      finalize(fake, invoice)
      return invoice
    },
  ),
  route(
    "POST",
    "/v1/invoices/:id/pay",
    z.strictObject({ off_session: bool.optional() }),
    ({ fake, path }) => {
      const invoice = fake.get("invoice", path.id!)
      const declined = settle(fake, invoice)
      if (declined) throw declined
      return invoice
    },
  ),
  route("POST", "/v1/invoices/:id/void", z.strictObject({}), ({ fake, path }) => {
    const invoice = fake.get("invoice", path.id!)
    voidInvoice(fake, invoice)
    return invoice
  }),
]

interface PreviewParams {
  customer?: string | undefined
  subscription: string
  subscription_details?:
    | {
        items?: z.output<typeof previewItem>[] | undefined
        proration_behavior?: string | undefined
        proration_date?: number | undefined
      }
    | undefined
}

/** What a change would bill, or else what the next renewal would. Stores nothing. */
function preview(fake: Fake, params: PreviewParams): object {
  const subscription = fake.get("subscription", params.subscription, "subscription")
  const customer = idOf(subscription.customer)!
  if (params.customer && params.customer !== customer) {
    throw new ApiError(400, {
      type: "invalid_request_error",
      message: "The subscription belongs to another customer.",
      param: "customer",
    })
  }
  const { items: changes, proration_date: prorationDate } = params.subscription_details ?? {}
  if (!changes) return upcomingInvoice(fake, subscription)
  const now = fake.now(customer)
  const items = changedItems(fake, subscription, changes, now)
  const lines = prorationLines(fake, subscription, items, { prorationDate, items: changes }, now)
  const period = { start: now, end: now }
  return draftInvoice(fake, { customer, subscription, reason: "upcoming", lines, period })
}
