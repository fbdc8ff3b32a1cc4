import type { Metadata } from "next"
import type { WithQuery } from "@/app/page-props"
import { ButtonLink } from "@/app/ui/button"
import { addressToVerify } from "@/lib/accounts"
import { AuthHead } from "../auth-head"
import { VerifyForm } from "./form"

export const metadata: Metadata = { title: "Confirm your address" }

export default async function Verify({ searchParams }: WithQuery) {
  const { token } = await searchParams
  const input = { token: typeof token === "string" ? token : "" }
  const address = await addressToVerify({ visitor: { now: new Date() }, input })
  if (!address) {
    return (
      <>
        <AuthHead title="This link is no longer good">
          It was used before, or it is older than 24 hours. If you have confirmed your address already, sign
          in.
        </AuthHead>
        <div className="flex flex-wrap gap-3">
          <ButtonLink look="primary" href="/signin">
            Sign in
          </ButtonLink>
          <ButtonLink href="/signup">Sign up again</ButtonLink>
        </div>
      </>
    )
  }
  return (
    <>
      <AuthHead title="Confirm your address">
        You are opening an account for <strong className="font-semibold break-all text-ink">{address}</strong>
        .
      </AuthHead>
      <VerifyForm token={input.token} />
    </>
  )
}
