import { z } from "zod"
import type { Enquiry } from "@/lib/enquiries"
import { languages } from "@/lib/mail"
import { tankFields } from "../widgets/[widget_id]/tank-fields"

export const enquiryId = z
  .string()
  .regex(/^enq_[0-9a-z]{26}$/)
  .meta({ description: "The enquiry's id" })

const erasable = (description: string) =>
  z.union([z.string(), z.null()]).meta({ description: `${description}; null once it was erased` })

/** An enquiry as the API shows it. */
export const shownEnquiry = z.object({
  id: z.string(),
  created_at: z.iso.datetime(),
  widget_id: z.string(),
  page_origin: z.string().meta({ description: "Origin of the page on which the shopper wrote" }),
  language: z.enum(languages).meta({ description: "Language in which the shopper wants to be answered" }),
  name: z
    .union([z.string(), z.null()])
    .meta({ description: "null when none was given, or once it was erased" }),
  email: erasable("Where to answer"),
  message: erasable("The question, as plain text"),
  tank: z.union([tankFields, z.null()]).meta({ description: "What the widget showed" }),
  consent: z.object({
    version: z.string(),
    wording: z.string().meta({ description: "The words that the shopper agreed to" }),
    given_at: z.iso.datetime(),
  }),
  erased_at: z.union([z.iso.datetime(), z.null()]),
})

export const exampleEnquiry: z.output<typeof shownEnquiry> = {
  id: "enq_01kbc0x7qzf0ra2w6v8n4m3h5t",
  created_at: "2026-12-01T09:30:00.000Z",
  widget_id: "wdgt_01kbc0x7qzf0ra2w6v8n4m3h5t",
  page_origin: "https://fernhollow.example",
  language: "en",
  name: "Ebba",
  email: "ebba@shopper.example",
  message: "Will the Rill 25 do for my 180 litre tank?",
  tank: { ph: 6.8, kh_dkh: 4, temperature_c: 25, level: "in_range" },
  consent: {
    version: "2026-12-01.en.3fa94c0d21b7",
    wording: "Fernhollow Aquatics may keep my e-mail address, my message …",
    given_at: "2026-12-01T09:30:00.000Z",
  },
  erased_at: null,
}

export function showEnquiryAs(enquiry: Enquiry): z.output<typeof shownEnquiry> {
  const { consent_version, consent_wording, consented_at, erased_by: _, ...rest } = enquiry
  return {
    ...rest,
    created_at: enquiry.created_at.toISOString(),
    erased_at: enquiry.erased_at?.toISOString() ?? null,
    consent: { version: consent_version, wording: consent_wording, given_at: consented_at.toISOString() },
  }
}
