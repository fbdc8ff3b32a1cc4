import { z } from "zod"
import { defineOperation } from "@/lib/api/define-operation"
import { pageOf, positionOf } from "@/lib/cursor"
import { listEnquiries } from "@/lib/enquiries"
import { listFields, listOf } from "../list-fields"
import { widgetId } from "../widgets/[widget_id]/shown-widget"
import { exampleEnquiry, showEnquiryAs, shownEnquiry } from "./shown-enquiry"

export const listShopperEnquiries = defineOperation({
  id: "listEnquiries",
  method: "GET",
  path: "/enquiries",
  tag: "Enquiries",
  summary: "What shoppers asked you, newest first",
  description: "Kept for 180 days, as each shopper was told, or until it is erased.",
  access: { kind: "key", scope: "enquiries" },
  units: 0,
  request: z.strictObject({ ...listFields, widget_id: widgetId.optional() }),
  response: listOf(shownEnquiry),
  example: { request: {}, response: { data: [exampleEnquiry], next_cursor: null } },
  async run({ input: { limit, cursor, widget_id }, caller: { ctx } }) {
    const list = `enquiries:${widget_id ?? ""}`
    const before = cursor === undefined ? undefined : positionOf(ctx, list, cursor)
    const enquiries = await listEnquiries({ ctx, input: { limit: limit + 1, before, widget_id } })
    return pageOf(ctx, list, enquiries.map(showEnquiryAs), limit, ({ id }) => id)
  },
})
