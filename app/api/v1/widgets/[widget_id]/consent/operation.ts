import { z } from "zod"
import { defineOperation } from "@/lib/api/define-operation"
import { consentFor } from "@/lib/enquiries"
import { languages } from "@/lib/mail"
import { widgetId } from "../shown-widget"

export const readWidgetConsent = defineOperation({
  id: "readWidgetConsent",
  method: "GET",
  path: "/widgets/{widget_id}/consent",
  tag: "Widgets",
  summary: "Read the words that a shopper agrees to before they ask",
  description: "They name the shop, what it keeps, for what, how long, and how to withdraw.",
  access: { kind: "widget" },
  units: 0,
  request: z.strictObject({ widget_id: widgetId, language: z.enum(languages) }),
  response: z.object({
    version: z.string().meta({ description: "To be sent with the enquiry; other words have another one" }),
    wording: z.string().meta({ description: "To be shown beside a box that begins unticked" }),
    shop_name: z.string(),
    privacy_url: z.string().meta({ description: "Page that says how the shop treats personal data" }),
  }),
  example: {
    request: { widget_id: "wdgt_01kbc0x7qzf0ra2w6v8n4m3h5t", language: "en" },
    response: {
      version: "2026-12-01.en.3fa94c0d21b7",
      wording:
        "Fernhollow Aquatics may keep my e-mail address, my message, my name if I give it, and the figures of my " +
        "tank, to answer this question and for nothing else, for at most 180 days. I can withdraw this at any time " +
        "by the link in the copy that is mailed to me; my data is then erased.",
      shop_name: "Fernhollow Aquatics",
      privacy_url: "https://fernhollow.example/privacy",
    },
  },
  run({ input, caller: { ctx } }) {
    return consentFor({ ctx, input })
  },
})
