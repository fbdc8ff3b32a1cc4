import type { Metadata } from "next"
import type { OfAccount } from "@/app/page-props"
import { openAccountFor } from "@/app/session"
import { asJson } from "@/app/ui/json"
import { PageHead, Section } from "@/app/ui/sheet"
import { dayOf } from "@/app/ui/time"
import { deletionOf, GRACE_DAYS, readClosing } from "@/lib/closing"
import { EXPORT_DAYS, listExports } from "@/lib/exports"
import { Closing } from "./closing"
import { Exports } from "./exports"
import { NameForm } from "./name-form"

export const metadata: Metadata = { title: "Settings" }

export default async function SettingsPage({ params }: OfAccount) {
  const { account, ctx } = await openAccountFor("account.manage", params)
  const exports = asJson(await listExports({ ctx }))
  const closing = await readClosing({ ctx })
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
      <Section
        title="Your data"
        id="export"
        note={`A zip of everything that is stored here, as JSON and CSV. It can be fetched for ${EXPORT_DAYS} days.`}
      >
        <Exports account={account.slug} initial={exports} />
      </Section>
      <Section
        title="Delete the account"
        id="delete"
        note={`There are ${GRACE_DAYS} days in which any owner can take it back.`}
      >
        <Closing
          account={account.slug}
          name={account.name}
          days={GRACE_DAYS}
          deletedOn={closing && dayOf(deletionOf(closing))}
        />
      </Section>
    </>
  )
}
