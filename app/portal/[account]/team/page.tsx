import type { Metadata } from "next"
import type { OfAccount } from "@/app/page-props"
import { openAccountFor } from "@/app/session"
import { asJson } from "@/app/ui/json"
import { PageHead } from "@/app/ui/sheet"
import { listTeam } from "@/lib/accounts"
import { planOf } from "@/lib/billing/plans"
import { Team } from "./team"

export const metadata: Metadata = { title: "Team" }

export default async function TeamPage({ params }: OfAccount) {
  const { account, ctx } = await openAccountFor("team.read", params)
  const members = asJson(await listTeam({ ctx }))
  const { name, team } = planOf(account.plan)
  const places = team === null ? "as many people as you like" : `${team} people`
  return (
    <>
      <PageHead
        title="Team"
        lead={`Who may work in ${account.name}, and as what. ${name} holds ${places}.`}
      />
      <Team account={account.slug} members={members} />
    </>
  )
}
