import type { Metadata } from "next"
import { cookies } from "next/headers"
import type { ReactNode } from "react"
import type { OfAccount } from "@/app/page-props"
import { openAccount } from "@/app/session"
import { themeOf } from "@/app/theme"
import { Area } from "@/app/ui/area"
import { Notice } from "@/app/ui/notice"
import { PersonMenu } from "@/app/ui/person-menu"
import { StepUp } from "@/app/ui/step-up"
import { can, listMemberships } from "@/lib/accounts"
import { planOf } from "@/lib/billing/plans"
import { menu } from "../menu"

export async function generateMetadata({ params }: OfAccount): Promise<Metadata> {
  const { account } = await openAccount((await params).account)
  return { title: { template: `%s · ${account.name} · Tarnwright`, default: account.name } }
}

export default async function AccountLayout({ params, children }: OfAccount & { children: ReactNode }) {
  const { account, role, actor, person, second_factor } = await openAccount((await params).account)
  const base = `/portal/${account.slug}`
  const groups = menu
    .map(({ group, items }) => ({
      group,
      items: items
        .filter(({ right }) => can(actor, right))
        .map(({ path, label }) => ({ href: base + path, label })),
    }))
    .filter(({ items }) => items.length > 0)
  const others = (await listMemberships({ user_id: person.id }))
    .filter((membership) => membership.account.id !== account.id)
    .map((membership) => ({ href: `/portal/${membership.account.slug}`, label: membership.account.name }))
  const links = [...others, ...(person.is_admin ? [{ href: "/admin", label: "Platform admin" }] : [])]
  return (
    <Area
      name={account.name}
      mark={
        <p className="hidden border border-line px-2 py-0.5 text-sm text-soft sm:block">
          {planOf(account.plan).name}, {role}
        </p>
      }
      menuLabel="Pages of this account"
      groups={groups}
      person={<PersonMenu name={person.name} email={person.email} links={links} />}
      theme={themeOf(await cookies())}
    >
      {account.status === "suspended" && (
        <div className="mb-8">
          <Notice severity="danger" title="This account is suspended">
            Its keys are refused and nothing in it can be changed. Write to us to settle it.
          </Notice>
        </div>
      )}
      {account.status === "closing" && (
        <div className="mb-8">
          <Notice severity="danger" title="This account is being deleted">
            Its keys and widgets have stopped. An owner can take it back under Settings.
          </Notice>
        </div>
      )}
      {children}
      <StepUp secondFactor={second_factor} />
    </Area>
  )
}
