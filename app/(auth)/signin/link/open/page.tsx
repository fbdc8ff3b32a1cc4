import type { Metadata } from "next"
import type { WithQuery } from "@/app/page-props"
import { ButtonLink } from "@/app/ui/button"
import { addressToSignIn } from "@/lib/accounts"
import { AuthHead } from "../../../auth-head"
import { OpenLink } from "./open-link"

export const metadata: Metadata = { title: "Sign in by a link" }

export default async function OpenSignInLink({ searchParams }: WithQuery) {
  const { token } = await searchParams
  const input = { token: typeof token === "string" ? token : "" }
  const address = await addressToSignIn({ visitor: { now: new Date() }, input })
  if (!address) {
    return (
      <>
        <AuthHead title="This link is no longer good">
          It was used before, or it is older than 30 minutes.
        </AuthHead>
        <div className="flex flex-wrap gap-3">
          <ButtonLink look="primary" href="/signin/link">
            Send a new one
          </ButtonLink>
          <ButtonLink href="/signin">Sign in with your password</ButtonLink>
        </div>
      </>
    )
  }
  return (
    <>
      <AuthHead title="Sign in">
        As <strong className="font-semibold break-all text-ink">{address}</strong>.
      </AuthHead>
      <OpenLink token={input.token} />
    </>
  )
}
