import { z } from "zod"
import { calculators, widgetSettings } from "@/lib/widgets"

/** Path parameter of the operations on one widget. */
export const widgetId = z
  .string()
  .regex(/^wdgt_[0-9a-z]{26}$/)
  .meta({ description: "The widget's id, as it stands in the snippet" })

/** Members of an answer that say how a page shows a widget. */
export const shownWidget = {
  calculator: z.enum(calculators).meta({ description: "Which calculator the widget is" }),
  settings: widgetSettings.meta({ description: "What the retailer decided about it" }),
  credit_line: z.boolean().meta({ description: "Whether the widget carries our credit line" }),
}
