import type { Metadata } from "next"
import type { WithQuery } from "@/app/page-props"
import { ButtonLink } from "@/app/ui/button"
import { addressToReset, PASSWORD_MIN } from "@/lib/accounts"
import { AuthHead } from "../../auth-head"
import { ResetForm } from "./form"

export const metadata: Metadata = { title: "Set a new password" }

export default async function Reset({ searchParams }: WithQuery) {
  const { token } = await searchParams
  const input = { token: typeof token === "string" ? token : "" }
  const address = await addressToReset({ visitor: { now: new Date() }, input })
  if (!address) {
    return (
      <>
        <AuthHead title="This link is no longer good">
          It was used before, or it is older than 30 minutes.
        </AuthHead>
        <ButtonLink look="primary" href="/reset">
          Send a new one
        </ButtonLink>
      </>
    )
  }
  return (
    <>
      <AuthHead title="Set a new password">
        For <strong className="font-semibold break-all text-ink">{address}</strong>. It ends every open
        session of yours.
      </AuthHead>
      <ResetForm token={input.token} email={address} passwordMin={PASSWORD_MIN} />
    </>
  )
}
