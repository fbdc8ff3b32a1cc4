import type { Metadata } from "next"
import type { OfAccount } from "@/app/page-props"
import { openAccountFor } from "@/app/session"
import { asJson } from "@/app/ui/json"
import { can } from "@/lib/accounts"
import { planOf } from "@/lib/billing/plans"
import { listInvitations, listTeam } from "@/lib/team"
import { Team } from "./team"

export const metadata: Metadata = { title: "Team" }

export default async function TeamPage({ params }: OfAccount) {
  const { account, role, ctx, person, second_factor } = await openAccountFor("team.read", params)
  const manages = can(ctx.actor, "team.manage")
  const members = asJson(await listTeam({ ctx }))
  const invitations = manages ? asJson(await listInvitations({ ctx })) : undefined
  const { name, team } = planOf(account.plan)
  const places = team === null ? "as many people as you like" : `${team} people`
  return (
    <Team
      account={account.slug}
      lead={`Who may work in ${account.name}, and as what. ${name} holds ${places}.`}
      me={person.id}
      initial={members}
      initialInvitations={invitations}
      offerSecondFactor={role === "owner" && !second_factor}
    />
  )
}
