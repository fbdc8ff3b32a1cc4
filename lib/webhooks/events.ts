import { z } from "zod"

const instant = (description: string) => z.iso.datetime().meta({ description: `${description}, RFC 3339` })
const units = (description: string) => z.int().meta({ description, "x-unit": "1" })
const share = <Percent extends number>(percent: Percent) => z.literal(percent).meta({ "x-unit": "%" })

/** Everything known about each event, a row each: what it tells, the data it carries, an example. */
export const webhookEvents = {
  "report.created": {
    summary: "A report was stored",
    data: z.object({
      report_id: z.string(),
      kind: z.string().meta({ description: "What was calculated, as `plan`" }),
      title: z.string().nullable(),
      created_at: instant("When it was stored"),
    }),
    example: {
      report_id: "rep_01kbc0x7qzf0ra2w6v8n4m3h5t",
      kind: "plan",
      title: "180 l, medium light",
      created_at: "2026-12-01T09:30:00.000Z",
    },
  },
  "enquiry.created": {
    summary: "A shopper sent an enquiry through a widget; read it with `GET /enquiries`",
    // No name and no address: what is personal stays where it can be erased.
    data: z.object({
      enquiry_id: z.string(),
      widget_id: z.string().nullable(),
      created_at: instant("When it came"),
    }),
    example: {
      enquiry_id: "enq_01kbc0x7qzf0ra2w6v8n4m3h5t",
      widget_id: "wdgt_01kbc0x7qzf0ra2w6v8n4m3h5t",
      created_at: "2026-12-01T09:30:00.000Z",
    },
  },
  "usage.threshold_reached": {
    summary: "80 or 100 percent of the period's units are spent; once for each and period",
    data: z.object({
      percent: z.union([share(80), share(100)]).meta({ description: "Share of them that is spent" }),
      units: units("Units spent when it was reached"),
      unit_cap: units("Units that the account may spend in the period"),
      period_start: instant("First instant of the period"),
      period_end: instant("When counting begins anew"),
    }),
    example: {
      percent: 80,
      units: 40_000,
      unit_cap: 50_000,
      period_start: "2026-12-01T00:00:00.000Z",
      period_end: "2027-01-01T00:00:00.000Z",
    },
  },
  "key.revoked": {
    summary: "A key was revoked, by a member of the team or by us",
    data: z.object({
      key_id: z.string(),
      name: z.string(),
      kind: z.enum(["server", "browser"]),
      mode: z.enum(["live", "sandbox"]),
      last4: z.string().meta({ description: "Its last four characters" }),
      reason: z.string().nullable(),
      revoked_at: instant("Since when it is refused"),
    }),
    example: {
      key_id: "key_01kbc0x7qzf0ra2w6v8n4m3h5t",
      name: "Shop back end",
      kind: "server",
      mode: "live",
      last4: "9fQ2",
      reason: "Found in a public repository",
      revoked_at: "2026-12-01T09:30:00.000Z",
    },
  },
  "subscription.changed": {
    summary: "The plan, its state or its period changed",
    data: z.object({
      plan: z.string().meta({ description: "Plan now in force, as `storefront`" }),
      status: z.string().meta({ description: "State of the subscription; new values may come" }),
      current_period_end: instant("End of the paid period").nullable(),
      cancel_at_period_end: z.boolean(),
    }),
    example: {
      plan: "storefront",
      status: "active",
      current_period_end: "2027-01-01T00:00:00.000Z",
      cancel_at_period_end: false,
    },
  },
  "webhook.test": {
    summary: "Sent to one endpoint when you ask for it",
    data: z.object({ message: z.string() }),
    example: { message: "This is a test. Nothing happened in your account." },
  },
} as const

export type WebhookEventType = keyof typeof webhookEvents
export type WebhookData<Type extends WebhookEventType> = z.output<(typeof webhookEvents)[Type]["data"]>

/** Events that an endpoint may ask for; the test comes unasked. */
export const subscribableEvents = [
  "report.created",
  "enquiry.created",
  "usage.threshold_reached",
  "key.revoked",
  "subscription.changed",
] as const satisfies readonly WebhookEventType[]

export type SubscribableEvent = (typeof subscribableEvents)[number]
