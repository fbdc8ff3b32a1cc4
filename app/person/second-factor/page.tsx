import type { Metadata } from "next"
import { nextPath } from "@/app/next-path"
import type { WithQuery } from "@/app/page-props"
import { openSelf } from "@/app/session"
import { asJson } from "@/app/ui/json"
import { Notice } from "@/app/ui/notice"
import { PageHead } from "@/app/ui/sheet"
import { describeSecondFactor } from "@/lib/accounts"
import { SecondFactor } from "./second-factor"

export const metadata: Metadata = { title: "Second factor" }

export default async function SecondFactorPage({ searchParams }: WithQuery) {
  const { person } = await openSelf("/person/second-factor")
  const { next } = await searchParams
  const state = await describeSecondFactor({ user_id: person.id })
  return (
    <>
      <PageHead
        title="Second factor"
        lead="Beside your password, signing in takes a code that an authenticator app on your phone shows. Whoever learns the password alone stays outside."
      />
      {person.is_admin && !state.since && (
        <div className="mb-8">
          <Notice severity="warning" title="The admin area is closed without one">
            It reaches every account, so a password is not enough for it.
          </Notice>
        </div>
      )}
      <SecondFactor state={asJson(state)} mayRemove={!person.is_admin} next={nextPath(next, "/person")} />
    </>
  )
}
