import type { Metadata } from "next"
import type { OfAccount } from "@/app/page-props"
import { openAccountFor } from "@/app/session"
import { PageHead, Section } from "@/app/ui/sheet"
import { NameForm } from "./name-form"

export const metadata: Metadata = { title: "Settings" }

export default async function SettingsPage({ params }: OfAccount) {
  const { account } = await openAccountFor("account.manage", params)
  return (
    <>
      <PageHead title="Settings" />
      <Section title="Name" note="As it stands here, in letters and on invoices.">
        <NameForm account={account.slug} name={account.name} />
      </Section>
      <Section title="For scripts and support">
        <dl className="grid grid-cols-[auto_minmax(0,1fr)] gap-x-6 gap-y-2 text-sm">
          <dt className="text-soft">Account id</dt>
          <dd className="font-mono break-all">{account.id}</dd>
          <dt className="text-soft">Short name in addresses</dt>
          <dd className="font-mono">{account.slug}</dd>
        </dl>
      </Section>
    </>
  )
}
