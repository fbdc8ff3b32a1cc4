import type { Metadata } from "next"
import { currentSession } from "@/app/session"
import { ButtonLink } from "@/app/ui/button"
import { PASSWORD_MIN } from "@/lib/accounts"
import { readInvitation } from "@/lib/team"
import { AuthHead } from "../../auth-head"
import { AcceptForm } from "./accept"
import { OtherPerson } from "./other-person"
import { SignUpForm } from "./sign-up"

export const metadata: Metadata = { title: "Invitation" }

export default async function Invitation({ params }: { params: Promise<{ token: string }> }) {
  const { token } = await params
  const invitation = await readInvitation({ visitor: { now: new Date() }, input: { token } })
  if (!invitation) {
    return (
      <>
        <AuthHead title="This invitation is no longer good">
          It was used before, taken back, or it is older than 72 hours. Whoever invited you can send it again.
        </AuthHead>
        <ButtonLink look="primary" href="/portal">
          To your accounts
        </ButtonLink>
      </>
    )
  }
  const { account_name, email, role, invited_by, has_sign_in } = invitation
  const person = (await currentSession())?.person
  return (
    <>
      <AuthHead title={`Join ${account_name}`}>
        {invited_by} invites <strong className="font-semibold break-all text-ink">{email}</strong> as {role}.
      </AuthHead>
      {person?.email === email ? (
        <AcceptForm token={token} account={account_name} />
      ) : person ? (
        <OtherPerson signedInAs={person.email} invited={email} />
      ) : has_sign_in ? (
        <>
          <p className="mb-5">Sign in as this address, then accept.</p>
          <ButtonLink
            look="primary"
            href={`/signin?next=${encodeURIComponent(`/invite/${token}`)}&email=${encodeURIComponent(email)}`}
          >
            Sign in
          </ButtonLink>
        </>
      ) : (
        <SignUpForm token={token} email={email} account={account_name} passwordMin={PASSWORD_MIN} />
      )}
    </>
  )
}
