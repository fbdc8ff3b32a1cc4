import type { Fake } from "../core/fake"
import { mergeMetadata } from "../core/params"
import type { Objects } from "../core/state"
import type { NewSession } from "./checkout-sessions"

type Session = Objects["checkout.session"]

interface Made {
  id: string
  now: number
  expiresAt: number
  lines: NonNullable<Session["line_items"]>["data"]
}

/** A session that waits for a person, with every field that the SDK's type promises. */
export function blankSession(fake: Fake, params: NewSession, made: Made): Session {
  const total = made.lines.reduce((sum, line) => sum + line.amount_total, 0)
  const taxed = params.automatic_tax?.enabled ?? false
  const customer = params.customer ? fake.get("customer", params.customer) : undefined
  const email = customer?.email ?? params.customer_email ?? null
  return {
    id: made.id,
    object: "checkout.session",
    adaptive_pricing: { enabled: false },
    after_expiration: null,
    allow_promotion_codes: params.allow_promotion_codes ?? null,
    allowed_payment_method_types: null,
    amount_subtotal: total,
    amount_total: total,
    automatic_tax: {
      enabled: taxed,
      liability: taxed ? { type: "self" } : null,
      provider: taxed ? "stripe" : null,
      status: taxed ? "requires_location_inputs" : null,
    },
    billing_address_collection: params.billing_address_collection ?? null,
    cancel_url: params.cancel_url ?? null,
    client_reference_id: params.client_reference_id ?? null,
    client_secret: null,
    collected_information: null,
    consent: null,
    consent_collection: null,
    created: made.now,
    currency: made.lines[0]!.currency,
    currency_conversion: null,
    custom_fields: [],
    custom_text: {
      after_submit: null,
      shipping_address: null,
      submit: null,
      terms_of_service_acceptance: null,
    },
    customer: params.customer ?? null,
    customer_account: null,
    customer_creation: params.customer ? null : "always",
    customer_details: {
      address: customer?.address ?? null,
      business_name: null,
      email,
      individual_name: null,
      name: customer?.name ?? null,
      phone: null,
      tax_exempt: "none",
      tax_ids: [],
    },
    customer_email: params.customer_email ?? null,
    discounts: [],
    expires_at: made.expiresAt,
    integration_identifier: null,
    invoice: null,
    invoice_creation: null,
    line_items: {
      object: "list",
      data: made.lines,
      has_more: false,
      url: `/v1/checkout/sessions/${made.id}/line_items`,
    },
    livemode: false,
    locale: (params.locale as Session["locale"]) ?? null,
    managed_payments: null,
    metadata: mergeMetadata({}, params.metadata),
    mode: "subscription",
    origin_context: null,
    payment_intent: null,
    payment_link: null,
    payment_method_collection: params.payment_method_collection ?? "always",
    payment_method_configuration_details: null,
    payment_method_options: {},
    payment_method_types: ["card"],
    payment_status: "unpaid",
    permissions: null,
    phone_number_collection: { enabled: false },
    recovered_from: null,
    saved_payment_method_options: {
      allow_redisplay_filters: ["always"],
      payment_method_remove: "disabled",
      payment_method_save: null,
    },
    setup_intent: null,
    shipping_address_collection: null,
    shipping_cost: null,
    shipping_options: [],
    status: "open",
    submit_type: null,
    subscription: null,
    success_url: params.success_url,
    tax_id_collection: { enabled: params.tax_id_collection?.enabled ?? false, required: "never" },
    total_details: { amount_discount: 0, amount_shipping: 0, amount_tax: 0 },
    ui_mode: "hosted_page",
    url: `${fake.base}/checkout/${made.id}`,
    wallet_options: null,
  }
}
