import type { Metadata } from "next"
import Link from "next/link"
import { PASSWORD_MIN } from "@/lib/accounts"
import { plans } from "@/lib/billing/plans"
import { AuthHead } from "../auth-head"
import { SignUpForm } from "./form"

export const metadata: Metadata = { title: "Open an account" }

export default function SignUp() {
  const units = plans.nano.included_units.toLocaleString("en")
  return (
    <>
      <AuthHead title="Open an account">
        {units} units a month are free, and the sandbox always is. No card is asked for.
      </AuthHead>
      <SignUpForm passwordMin={PASSWORD_MIN} />
      <p className="mt-8 border-t border-line pt-5">
        You have one?{" "}
        <Link className="link" href="/signin">
          Sign in
        </Link>
      </p>
    </>
  )
}
