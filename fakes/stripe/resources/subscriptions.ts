import { z } from "zod"
import { changeItems } from "../billing/change"
import { currentPeriod, end } from "../billing/renew"
import { releaseSchedule } from "../billing/schedule"
import { isLive, setStatus } from "../billing/status"
import { subscribe } from "../billing/subscribe"
import type { Subscription } from "../billing/subscription-shape"
import { invalid } from "../core/errors"
import { type Fake, idOf } from "../core/fake"
import { page as pageOf } from "../core/lists"
import { bool, clearable, count, mergeMetadata, metadata, page, str } from "../core/params"
import { route } from "../core/route"

const automaticTax = z.strictObject({ enabled: bool })
const behavior = z.enum([
  "allow_incomplete",
  "default_incomplete",
  "error_if_incomplete",
  "pending_if_incomplete",
])
const quantity = count.pipe(z.number().min(1)).optional()
const prorationBehavior = z.enum(["create_prorations", "always_invoice", "none"]).default("create_prorations")

export const subscriptions = [
  route(
    "POST",
    "/v1/subscriptions",
    z.strictObject({
      customer: str,
      items: z
        .array(z.strictObject({ price: str, quantity, metadata: metadata.optional() }))
        .min(1)
        .max(20),
      automatic_tax: automaticTax.optional(),
      cancel_at_period_end: bool.optional(),
      default_payment_method: str.optional(),
      description: clearable.optional(),
      metadata: metadata.optional(),
      off_session: bool.optional(),
      payment_behavior: behavior.default("allow_incomplete"),
    }),
    ({ fake, params }) => {
      const items = params.items.map((item, index) => ({
        price: fake.get("price", item.price, `items[${index}][price]`),
        quantity: item.quantity,
        metadata: mergeMetadata({}, item.metadata),
      }))
      const { subscription } = subscribe(
        fake,
        {
          customer: params.customer,
          items,
          metadata: mergeMetadata({}, params.metadata),
          defaultPaymentMethod: params.default_payment_method ?? null,
          automaticTax: params.automatic_tax?.enabled ?? false,
          description: params.description ?? null,
          cancelAtPeriodEnd: params.cancel_at_period_end ?? false,
        },
        { behavior: params.payment_behavior, confirmed: false },
      )
      return subscription
    },
  ),
  route(
    "GET",
    "/v1/subscriptions",
    z.strictObject({
      ...page,
      customer: str.optional(),
      price: str.optional(),
      status: str.optional(),
      test_clock: str.optional(),
    }),
    ({ fake, params }) => {
      const found = fake
        .all("subscription")
        .filter((one) => !params.customer || one.customer === params.customer)
        .filter((one) => !params.test_clock || one.test_clock === params.test_clock)
        .filter((one) => !params.price || one.items.data.some((item) => item.price.id === params.price))
        .filter((one) => wanted(one, params.status))
      return pageOf(found, params, "/v1/subscriptions")
    },
  ),
  route("GET", "/v1/subscriptions/:id", z.strictObject({}), ({ fake, path }) =>
    fake.get("subscription", path.id!),
  ),
  route(
    "POST",
    "/v1/subscriptions/:id",
    z.strictObject({
      automatic_tax: automaticTax.optional(),
      cancel_at_period_end: bool.optional(),
      default_payment_method: clearable.optional(),
      description: clearable.optional(),
      items: z
        .array(
          z.strictObject({
            id: str.optional(),
            price: str.optional(),
            quantity,
            deleted: bool.optional(),
            clear_usage: bool.optional(),
          }),
        )
        .max(20)
        .optional(),
      metadata: metadata.optional(),
      payment_behavior: behavior.default("allow_incomplete"),
      proration_behavior: prorationBehavior,
      proration_date: count.optional(),
    }),
    ({ fake, params, path }) => {
      const subscription = fake.get("subscription", path.id!)
      if (!isLive(subscription) && subscription.status !== "incomplete") {
        throw invalid("A canceled subscription can only update its cancellation_details and metadata.")
      }
      if (params.items) {
        changeItems(fake, subscription, {
          items: params.items,
          proration: params.proration_behavior,
          behavior: params.payment_behavior,
          prorationDate: params.proration_date,
        })
      }
      applyFields(fake, subscription, params)
      return subscription
    },
  ),
  route(
    "DELETE",
    "/v1/subscriptions/:id",
    z.strictObject({
      cancellation_details: z
        .strictObject({ comment: clearable.optional(), feedback: str.optional() })
        .optional(),
      invoice_now: bool.optional(),
      prorate: bool.optional(),
    }),
    ({ fake, path }) => {
      const subscription = fake.get("subscription", path.id!)
      if (!isLive(subscription) && subscription.status !== "incomplete") {
        throw invalid(`No such subscription: '${subscription.id}'`, "id", "resource_missing")
      }
      if (subscription.status === "incomplete") setStatus(fake, subscription, "incomplete_expired")
      else end(fake, subscription)
      return subscription
    },
  ),
]

/** Asks that the subscription end with its period, or takes that back. */
export function setCancelAtPeriodEnd(fake: Fake, subscription: Subscription, wanted: boolean): void {
  if (subscription.cancel_at_period_end === wanted) return
  const schedule = fake.state.objects.subscription_schedule[idOf(subscription.schedule) ?? ""]
  if (schedule) releaseSchedule(fake, schedule)
  const before = {
    cancel_at_period_end: subscription.cancel_at_period_end,
    cancel_at: subscription.cancel_at,
  }
  subscription.cancel_at_period_end = wanted
  subscription.cancel_at = wanted ? currentPeriod(subscription).end : null
  subscription.canceled_at = wanted ? fake.now(idOf(subscription.customer)) : null
  subscription.cancellation_details!.reason = wanted ? "cancellation_requested" : null
  fake.changed()
  fake.emit("customer.subscription.updated", subscription, before)
}

function applyFields(
  fake: Fake,
  subscription: Subscription,
  params: {
    metadata?: z.output<typeof metadata> | undefined
    default_payment_method?: string | null | undefined
    description?: string | null | undefined
    automatic_tax?: { enabled: boolean } | undefined
    cancel_at_period_end?: boolean | undefined
  },
): void {
  const before: Record<string, unknown> = {}
  const set = (field: "metadata" | "default_payment_method" | "description", value: unknown) => {
    before[field] = subscription[field]
    Object.assign(subscription, { [field]: value })
  }
  if (params.metadata !== undefined) set("metadata", mergeMetadata(subscription.metadata, params.metadata))
  if (params.default_payment_method !== undefined)
    set("default_payment_method", params.default_payment_method)
  if (params.description !== undefined) set("description", params.description)
  if (params.automatic_tax) subscription.automatic_tax.enabled = params.automatic_tax.enabled
  if (Object.keys(before).length > 0) fake.emit("customer.subscription.updated", subscription, before)
  if (params.cancel_at_period_end !== undefined) {
    setCancelAtPeriodEnd(fake, subscription, params.cancel_at_period_end)
  }
  fake.changed()
}

function wanted(subscription: Subscription, status: string | undefined): boolean {
  if (status === "all") return true
  if (status === "ended") return !isLive(subscription)
  if (status) return subscription.status === status
  return subscription.status !== "canceled" && subscription.status !== "incomplete_expired"
}
