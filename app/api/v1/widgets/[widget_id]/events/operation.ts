import { z } from "zod"
import { defineOperation } from "@/lib/api/define-operation"
import { recordTank } from "@/lib/insights"
import { sessionOf } from "../session-of"
import { widgetId } from "../shown-widget"
import { exampleToken, sessionToken, tankFields } from "../tank-fields"

export const recordWidgetEvent = defineOperation({
  id: "recordWidgetEvent",
  method: "POST",
  path: "/widgets/{widget_id}/events",
  tag: "Widgets",
  summary: "Tell what a widget was asked about",
  description:
    "The widget calls this once its shopper has come to rest, where its settings allow it. A session counts as one " +
    "tank: what it tells later takes the place of what it told before. Nothing of a person is in it, and the day is " +
    "kept instead of the time. It counts to no bill.",
  access: { kind: "widget" },
  units: 0,
  status: 204,
  perAddress: { points: 30, window_s: 60 },
  request: z.strictObject({ widget_id: widgetId, session_token: sessionToken, tank: tankFields }),
  response: z.null(),
  example: {
    request: {
      widget_id: "wdgt_01kbc0x7qzf0ra2w6v8n4m3h5t",
      session_token: exampleToken,
      tank: { ph: 6.8, kh_dkh: 4, temperature_c: 25, level: "in_range" },
    },
    response: null,
  },
  async run({ input, caller }) {
    const session_id = await sessionOf(caller, input)
    const { widget_id, tank } = input
    await recordTank({ ctx: caller.ctx, input: { widget_id, session_id, tank } })
    return null
  },
})
