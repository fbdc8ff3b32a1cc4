import type { Metadata } from "next"
import type { OfAccount, WithQuery } from "@/app/page-props"
import { newestEnquiries } from "@/app/portal/newest-enquiries"
import { openAccountFor } from "@/app/session"
import { asJson } from "@/app/ui/json"
import { can } from "@/lib/accounts"
import { listWidgets } from "@/lib/widgets"
import { Enquiries } from "./enquiries"

export const metadata: Metadata = { title: "Enquiries" }

export default async function EnquiriesPage({ params, searchParams }: OfAccount & WithQuery) {
  const { account, actor, ctx } = await openAccountFor("enquiry.read", params)
  const [enquiries, widgets] = await Promise.all([newestEnquiries({ ctx }), listWidgets({ ctx })])
  const { open } = await searchParams
  return (
    <Enquiries
      account={account.slug}
      initial={asJson(enquiries)}
      widgetNames={Object.fromEntries(widgets.map(({ id, name }) => [id, name]))}
      takesEnquiries={widgets.some(({ settings, disabled_at }) => settings.enquiries && !disabled_at)}
      firstOpen={typeof open === "string" ? open : undefined}
      may={{ erase: can(actor, "enquiry.erase"), export: can(actor, "enquiry.export") }}
    />
  )
}
