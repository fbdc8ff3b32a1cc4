import type { Metadata } from "next"
import { headers } from "next/headers"
import { openSelf } from "@/app/session"
import { ButtonLink } from "@/app/ui/button"
import { asJson } from "@/app/ui/json"
import { PageHead, Section } from "@/app/ui/sheet"
import { dayOf } from "@/app/ui/time"
import { visitorOf } from "@/app/visitor"
import { describeSecondFactor, listOwnSessions, PASSWORD_MIN } from "@/lib/accounts"
import { NameForm } from "./name-form"
import { PasswordForm } from "./password-form"
import { Sessions } from "./sessions"

export const metadata: Metadata = { title: "Your sign-in" }

export default async function PersonPage() {
  const { person, session_id } = await openSelf("/person")
  const received = await headers()
  const visitor = visitorOf((name) => received.get(name))
  const factor = await describeSecondFactor({ user_id: person.id })
  const sessions = asJson(await listOwnSessions({ visitor, person, session_id }))
  return (
    <>
      <PageHead title="Your sign-in" lead="It is yours alone, in every account that you belong to." />
      <Section title="Name" note="As your colleagues see it.">
        <NameForm name={person.name} />
        <dl className="mt-6">
          <dt className="font-medium">E-mail</dt>
          <dd className="mt-1 break-all">{person.email}</dd>
        </dl>
      </Section>
      <Section title="Password" note="Changing it ends every other session of yours.">
        <PasswordForm email={person.email} passwordMin={PASSWORD_MIN} />
      </Section>
      <Section title="Second factor" note="A code of your phone beside the password.">
        <p className="max-w-measure">
          {factor.since
            ? `Set up on ${dayOf(factor.since)}. ${factor.recovery_codes_left} of your recovery codes are left.`
            : "None. Whoever learns your password can sign in as you."}
        </p>
        <ButtonLink className="mt-4" href="/person/second-factor">
          {factor.since ? "Change it" : "Set it up"}
        </ButtonLink>
      </Section>
      <Section title="Sessions" note="Where you are signed in. A session that you end is dead at once.">
        <Sessions initial={sessions} />
      </Section>
    </>
  )
}
