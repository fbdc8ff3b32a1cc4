import type { Metadata } from "next"
import Link from "next/link"
import { AuthHead } from "../../auth-head"
import { LinkRequestForm } from "./form"

export const metadata: Metadata = { title: "Sign in by a link" }

export default function SignInLink() {
  return (
    <>
      <AuthHead title="Sign in by a link">
        We send a link to your address. It works once, within 30 minutes, in place of your password.
      </AuthHead>
      <LinkRequestForm />
      <p className="mt-8 border-t border-line pt-5">
        <Link className="link" href="/signin">
          Sign in with your password
        </Link>
      </p>
    </>
  )
}
