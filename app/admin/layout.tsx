import type { Metadata } from "next"
import { cookies } from "next/headers"
import type { ReactNode } from "react"
import { openAdmin } from "@/app/session"
import { themeOf } from "@/app/theme"
import { Area } from "@/app/ui/area"
import { PersonMenu } from "@/app/ui/person-menu"
import { StepUp } from "@/app/ui/step-up"
import { listMemberships } from "@/lib/accounts"

export const metadata: Metadata = {
  title: { template: "%s · Platform admin · Tarnwright", default: "Platform admin" },
}

const groups = [
  {
    group: "Platform",
    items: [
      { href: "/admin", label: "Accounts" },
      { href: "/admin/keys", label: "Keys" },
    ],
  },
]

export default async function AdminLayout({ children }: { children: ReactNode }) {
  const { person } = await openAdmin()
  const memberships = await listMemberships({ user_id: person.id })
  const links = memberships.map(({ account }) => ({ href: `/portal/${account.slug}`, label: account.name }))
  return (
    <Area
      name="Platform admin"
      menuLabel="Pages of the admin area"
      groups={groups}
      person={<PersonMenu name={person.name} email={person.email} links={links} />}
      theme={themeOf(await cookies())}
    >
      {children}
      <StepUp secondFactor />
    </Area>
  )
}
