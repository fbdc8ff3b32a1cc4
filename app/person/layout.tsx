import type { Metadata } from "next"
import { cookies } from "next/headers"
import type { ReactNode } from "react"
import { openSelf } from "@/app/session"
import { themeOf } from "@/app/theme"
import { Area } from "@/app/ui/area"
import { PersonMenu } from "@/app/ui/person-menu"
import { StepUp } from "@/app/ui/step-up"
import { listMemberships } from "@/lib/accounts"

export const metadata: Metadata = {
  title: { template: "%s · Tarnwright", default: "Your sign-in" },
}

export default async function PersonLayout({ children }: { children: ReactNode }) {
  const { person, second_factor } = await openSelf("/person")
  const accounts = (await listMemberships({ user_id: person.id })).map(({ account }) => ({
    href: `/portal/${account.slug}`,
    label: account.name,
  }))
  const places = [...accounts, ...(person.is_admin ? [{ href: "/admin", label: "Platform admin" }] : [])]
  const groups = [
    {
      group: "You",
      items: [
        { href: "/person", label: "Your sign-in" },
        { href: "/person/second-factor", label: "Second factor" },
      ],
    },
    { group: "Go to", items: places },
  ].filter(({ items }) => items.length > 0)
  return (
    <Area
      name={person.name}
      menuLabel="Pages about you"
      groups={groups}
      person={<PersonMenu name={person.name} email={person.email} links={places} />}
      theme={themeOf(await cookies())}
    >
      {children}
      <StepUp secondFactor={second_factor} />
    </Area>
  )
}
