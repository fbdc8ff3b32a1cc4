import type { Metadata } from "next"
import type { OfAccount } from "@/app/page-props"
import { newestRequests } from "@/app/portal/newest-requests"
import { openAccountFor } from "@/app/session"
import { asJson } from "@/app/ui/json"
import { listKeys } from "@/lib/keys"
import { LOG_DAYS, PORTAL_KEY_ID } from "@/lib/usage"
import { Requests } from "./requests"

export const metadata: Metadata = { title: "Requests" }

export default async function RequestsPage({ params }: OfAccount) {
  const { account, ctx } = await openAccountFor("request.read", params)
  const [calls, keys] = await Promise.all([newestRequests({ ctx, input: {} }), listKeys({ ctx })])
  return (
    <Requests
      account={account.slug}
      initial={asJson(calls)}
      keyNames={{
        [PORTAL_KEY_ID]: "the portal",
        ...Object.fromEntries(keys.map(({ id, name, last4 }) => [id, `${name} …${last4}`])),
      }}
      days={LOG_DAYS}
    />
  )
}
