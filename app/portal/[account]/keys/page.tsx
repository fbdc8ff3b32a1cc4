import type { Metadata } from "next"
import type { OfAccount } from "@/app/page-props"
import { openAccountFor } from "@/app/session"
import { asJson } from "@/app/ui/json"
import { can } from "@/lib/accounts"
import { listKeys } from "@/lib/keys"
import { Keys } from "./keys"

export const metadata: Metadata = { title: "Keys" }

export default async function KeysPage({ params }: OfAccount) {
  const { account, actor, ctx } = await openAccountFor("key.read", params)
  return (
    <Keys
      account={account.slug}
      initial={asJson(await listKeys({ ctx }))}
      may={{
        create: can(actor, "key.create"),
        rotate: can(actor, "key.rotate"),
        revoke: can(actor, "key.revoke"),
      }}
    />
  )
}
