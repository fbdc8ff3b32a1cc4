import { mkdirSync, readFileSync, renameSync, writeFileSync } from "node:fs"
import { dirname } from "node:path"
import type Stripe from "stripe"
import type { CardKind } from "../billing/cards"
import type { Delivery } from "./deliveries"
import type { Fault } from "./faults"
import type { StoredAnswer } from "./idempotency"

/** An SDK type as it travels: decimals are strings in JSON. */
export type Wire<T> = T extends string | number | boolean | null | undefined
  ? T
  : T extends Stripe.Decimal
    ? string
    : T extends (infer Item)[]
      ? Wire<Item>[]
      : T extends object
        ? { [Key in keyof T]: Wire<T[Key]> }
        : T

/** Everything with an id, by the name that its `object` field carries. */
export interface Objects {
  customer: Wire<Stripe.Customer>
  product: Wire<Stripe.Product>
  price: Wire<Stripe.Price>
  payment_method: Wire<Stripe.PaymentMethod>
  "checkout.session": Wire<Stripe.Checkout.Session>
  subscription: Wire<Stripe.Subscription>
  subscription_schedule: Wire<Stripe.SubscriptionSchedule>
  invoice: Wire<Stripe.Invoice>
  "billing_portal.session": Wire<Stripe.BillingPortal.Session>
  "billing.meter": Wire<Stripe.Billing.Meter>
  event: SnapshotEvent
  "v2.core.event": ThinEvent
  webhook_endpoint: Wire<Stripe.WebhookEndpoint>
  "test_helpers.test_clock": Wire<Stripe.TestHelpers.TestClock>
}

export type Kind = keyof Objects

/** Looser than the SDK's union of two hundred event types: the type is any text. */
export interface SnapshotEvent {
  id: string
  object: "event"
  api_version: string
  created: number
  data: { object: Record<string, unknown>; previous_attributes?: Record<string, unknown> }
  livemode: false
  pending_webhooks: number
  request: { id: string | null; idempotency_key: string | null }
  type: string
}

export interface ThinEvent {
  id: string
  object: "v2.core.event"
  type: string
  created: string
  livemode: false
  related_object: { id: string; type: string; url: string } | null
  reason: null
  data?: Record<string, unknown>
}

export interface MeterReading {
  meter_event_name: string
  identifier: string
  customer: string
  value: number
  timestamp: number
  received: number
  cancelled: boolean
}

export interface State {
  /** Address under which the hosted pages were last served. */
  base: string
  objects: { [Name in Kind]: Record<string, Objects[Name]> }
  cards: Record<string, CardKind>
  readings: MeterReading[]
  answers: Record<string, StoredAnswer>
  deliveries: Delivery[]
  faults: Fault[]
  /** What a checkout gives the subscription that it will start. */
  checkouts: Record<string, { description: string | null; metadata: Record<string, string> }>
  invoiceNumber: number
  /** Period end of which `invoice.upcoming` has told already, by subscription. */
  announced: Record<string, number>
  /** Where a subscription goes when the last attempt to collect a renewal has failed. */
  afterDunning: "canceled" | "unpaid" | "past_due"
}

export function emptyState(base: string): State {
  return {
    base,
    objects: {
      customer: {},
      product: {},
      price: {},
      payment_method: {},
      "checkout.session": {},
      subscription: {},
      subscription_schedule: {},
      invoice: {},
      "billing_portal.session": {},
      "billing.meter": {},
      event: {},
      "v2.core.event": {},
      webhook_endpoint: {},
      "test_helpers.test_clock": {},
    },
    cards: {},
    readings: [],
    answers: {},
    deliveries: [],
    faults: [],
    checkouts: {},
    invoiceNumber: 0,
    announced: {},
    afterDunning: "canceled",
  }
}

/** The state that a former run left, its page addresses moved to `base`; an empty one without a file. */
export function loadState(file: string | undefined, base: string): State {
  const text = file && readIfPresent(file)
  if (!text) return emptyState(base)
  const before = (JSON.parse(text) as State).base
  const left = JSON.parse(text.replaceAll(before, base)) as State
  const empty = emptyState(base)
  return { ...empty, ...left, objects: { ...empty.objects, ...left.objects } }
}

export function saveState(file: string, state: State): void {
  mkdirSync(dirname(file), { recursive: true })
  const draft = `${file}.${process.pid}`
  writeFileSync(draft, JSON.stringify(state), { mode: 0o600 })
  renameSync(draft, file)
}

function readIfPresent(file: string): string | undefined {
  try {
    return readFileSync(file, "utf8")
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === "ENOENT") return undefined
    throw error
  }
}
