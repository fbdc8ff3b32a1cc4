import { z } from "zod"
import { defineOperation } from "@/lib/api/define-operation"
import { showWidget } from "@/lib/widgets"
import { shownWidget, widgetId } from "../shown-widget"

export const readWidgetSettings = defineOperation({
  id: "readWidgetSettings",
  method: "GET",
  path: "/widgets/{widget_id}/settings",
  tag: "Widgets",
  summary: "Read what a page needs to show a widget",
  description:
    "The widget calls this once when its page has loaded. It is free: a page view is not a session yet.",
  access: { kind: "widget" },
  units: 0,
  request: z.strictObject({ widget_id: widgetId }),
  response: z.object(shownWidget),
  example: {
    request: { widget_id: "wdgt_01kbc0x7qzf0ra2w6v8n4m3h5t" },
    response: {
      calculator: "co2-level",
      settings: {
        language: "page",
        theme: "page",
        kh_unit: "dkh",
        temperature_unit: "c",
        start: { ph: 6.8, kh_dkh: 4, temperature_c: 25 },
        link: null,
        enquiries: null,
        statistics: true,
      },
      credit_line: false,
    },
  },
  run({ input, caller }) {
    return showWidget({ ctx: caller.ctx, input })
  },
})
