import { z } from "zod"
import { defineOperation } from "@/lib/api/define-operation"
import { eraseEnquiry, showEnquiry } from "@/lib/enquiries"
import { enquiryId, exampleEnquiry, showEnquiryAs, shownEnquiry } from "../shown-enquiry"

const request = z.strictObject({ enquiry_id: enquiryId })
const example = { enquiry_id: exampleEnquiry.id }

export const readShopperEnquiry = defineOperation({
  id: "readEnquiry",
  method: "GET",
  path: "/enquiries/{enquiry_id}",
  tag: "Enquiries",
  summary: "One enquiry with the record of its consent",
  access: { kind: "key", scope: "enquiries" },
  units: 0,
  request,
  response: shownEnquiry,
  example: { request: example, response: exampleEnquiry },
  async run({ input, caller: { ctx } }) {
    return showEnquiryAs(await showEnquiry({ ctx, input }))
  },
})

export const eraseShopperEnquiry = defineOperation({
  id: "eraseEnquiry",
  method: "DELETE",
  path: "/enquiries/{enquiry_id}",
  tag: "Enquiries",
  summary: "Erase what is personal in an enquiry",
  description:
    "Name, address, message and the tank's figures are gone for good. That somebody asked, when, and to which words " +
    "they had agreed stays.",
  access: { kind: "key", scope: "enquiries" },
  units: 0,
  status: 204,
  request,
  response: z.null(),
  example: { request: example, response: null },
  async run({ input, caller: { ctx } }) {
    await eraseEnquiry({ ctx, input })
    return null
  },
})
