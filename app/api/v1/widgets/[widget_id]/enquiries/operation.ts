import { z } from "zod"
import { defineOperation } from "@/lib/api/define-operation"
import { sendEnquiry } from "@/lib/enquiries"
import { languages } from "@/lib/mail"
import { sessionOf } from "../session-of"
import { widgetId } from "../shown-widget"
import { exampleToken, sessionToken, tankFields } from "../tank-fields"

/** A text field of a form: no control characters but line breaks in what may have several lines. */
const oneLine = z
  .string()
  .trim()
  .min(1)
  .max(100)
  .regex(/^\P{Cc}*$/u, "Write it on one line.")
const text = z
  .string()
  .trim()
  .min(1)
  .max(4_000)
  .regex(/^[\P{Cc}\n\r\t]*$/u, "Leave out control characters.")

export const sendWidgetEnquiry = defineOperation({
  id: "sendWidgetEnquiry",
  method: "POST",
  path: "/widgets/{widget_id}/enquiries",
  tag: "Widgets",
  summary: "Ask the shop",
  description:
    "A shopper's question, with their consent to its being kept. The shop's owners and merchandisers are told by " +
    "mail, endpoints by `enquiry.created`, and the shopper gets a copy with a link that takes it all back. Without " +
    "consent to the words of `GET /widgets/{widget_id}/consent` nothing is kept. At most five in ten minutes from " +
    "one address.",
  access: { kind: "widget" },
  units: 0,
  status: 201,
  stores: true,
  perAddress: { points: 5, window_s: 600 },
  request: z.strictObject({
    widget_id: widgetId,
    session_token: sessionToken,
    language: z.enum(languages).meta({ description: "In which the shopper reads and is written to" }),
    name: oneLine.optional().meta({ description: "As the shopper wants to be called" }),
    email: z.email({ error: "Write an address as name@example.org." }).max(254),
    message: text.meta({ description: "The question, as plain text" }),
    tank: tankFields.optional().meta({ description: "What the widget showed when the shopper asked" }),
    consent: z
      .strictObject({
        given: z.boolean().meta({ description: "Whether the shopper ticked the box; it begins unticked" }),
        version: z.string().max(100).meta({ description: "`version` of the words beside the box" }),
      })
      .default({ given: false, version: "" }),
  }),
  response: z.object({ enquiry_id: z.string(), created_at: z.iso.datetime() }),
  example: {
    request: {
      widget_id: "wdgt_01kbc0x7qzf0ra2w6v8n4m3h5t",
      session_token: exampleToken,
      language: "en",
      name: "Ebba",
      email: "ebba@shopper.example",
      message: "Will the Rill 25 do for my 180 litre tank?",
      tank: { ph: 6.8, kh_dkh: 4, temperature_c: 25, level: "in_range" },
      consent: { given: true, version: "2026-12-01.en.3fa94c0d21b7" },
    },
    response: { enquiry_id: "enq_01kbc0x7qzf0ra2w6v8n4m3h5t", created_at: "2026-12-01T09:30:00.000Z" },
  },
  async run({ input, caller }) {
    await sessionOf(caller, input)
    const { session_token: _, ...enquiry } = input
    const sent = await sendEnquiry({
      ctx: caller.ctx,
      input: { ...enquiry, page_origin: caller.origin ?? "" },
    })
    return { enquiry_id: sent.enquiry_id, created_at: sent.created_at.toISOString() }
  },
})
