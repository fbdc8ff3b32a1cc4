import type { Metadata } from "next"
import Link from "next/link"
import { redirect } from "next/navigation"
import { signedIn } from "@/app/session"
import { Wordmark } from "@/app/ui/wordmark"
import { listMemberships } from "@/lib/accounts"
import { planOf } from "@/lib/billing/plans"

export const metadata: Metadata = { title: "Your accounts" }

/** Leads to the account of whoever has one, lets whoever has several choose, and admins to their own area. */
export default async function Portal() {
  const person = await signedIn("/portal")
  const memberships = await listMemberships({ user_id: person.id })
  const [only] = memberships
  if (only && memberships.length === 1) redirect(`/portal/${only.account.slug}`)
  if (memberships.length === 0 && person.is_admin) redirect("/admin")
  return (
    <main id="main" className="mx-auto max-w-md px-5 py-8">
      <Wordmark />
      <h1 className="mt-12 mb-6 text-3xl">{only ? "Which account?" : "No account yet"}</h1>
      {!only && (
        <p className="text-soft">
          You can sign in, but you belong to no account. Ask the owner of one to invite {person.email}.
        </p>
      )}
      <ul className="divide-y divide-line border-y border-line empty:hidden">
        {memberships.map(({ account, role }) => (
          <li key={account.id}>
            <Link href={`/portal/${account.slug}`} className="flex justify-between gap-4 py-3 hover:bg-sunk">
              <span className="font-medium">{account.name}</span>
              <span className="text-sm text-soft">
                {role}, {planOf(account.plan).name}
              </span>
            </Link>
          </li>
        ))}
      </ul>
    </main>
  )
}
