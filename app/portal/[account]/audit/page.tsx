import type { Metadata } from "next"
import type { OfAccount } from "@/app/page-props"
import { openAccountFor } from "@/app/session"
import { asJson } from "@/app/ui/json"
import { PageHead } from "@/app/ui/sheet"
import { reachOf } from "@/lib/accounts"
import { actionNames, listActs } from "@/lib/audit"
import { Audit } from "./audit"

export const metadata: Metadata = { title: "Audit" }

const limit = 2_000

export default async function AuditPage({ params }: OfAccount) {
  const { account, actor, ctx } = await openAccountFor("audit.read", params)
  const ownOnly = reachOf(actor, "audit.read") === "own"
  const acts = await listActs({ ctx, input: { limit, ...(ownOnly && { actor_id: actor.id }) } })
  const rows = acts.map(({ id, at, actor_kind, actor_name, action, target, detail, ip }) => ({
    id,
    at,
    who: whoDid(actor_kind, actor_name),
    what: (actionNames as Record<string, string>)[action] ?? action,
    target,
    detail,
    ip,
  }))
  const lead = ownOnly
    ? "What you changed in this account. Owners see everybody's."
    : "Who changed what, from where. Entries cannot be changed or taken out."
  return (
    <>
      <PageHead
        title="Audit"
        lead={acts.length < limit ? lead : `${lead} The newest ${limit.toLocaleString("en")} are shown.`}
      />
      <Audit account={account.slug} rows={asJson(rows)} />
    </>
  )
}

function whoDid(kind: "user" | "admin" | "key" | "system", name: string | null): string {
  switch (kind) {
    case "user":
      return name ?? "someone who is gone"
    case "admin":
      return "the Tarnwright team"
    case "key":
      return "a key of the account"
    case "system":
      return "Tarnwright itself"
  }
}
