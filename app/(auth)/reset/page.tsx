import type { Metadata } from "next"
import { AuthHead } from "../auth-head"
import { ResetRequestForm } from "./form"

export const metadata: Metadata = { title: "Set a new password" }

export default function ResetRequest() {
  return (
    <>
      <AuthHead title="Set a new password">
        We send a link to your address. It works once, within 30 minutes.
      </AuthHead>
      <ResetRequestForm />
    </>
  )
}
