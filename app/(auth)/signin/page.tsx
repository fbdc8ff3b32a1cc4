import type { Metadata } from "next"
import Link from "next/link"
import { redirect } from "next/navigation"
import { nextPath } from "@/app/next-path"
import type { WithQuery } from "@/app/page-props"
import { currentSession } from "@/app/session"
import { AuthHead } from "../auth-head"
import { SignInForm } from "./form"

export const metadata: Metadata = { title: "Sign in" }

export default async function SignIn({ searchParams }: WithQuery) {
  const { next, email, done } = await searchParams
  const target = nextPath(next)
  if (await currentSession()) redirect(target)
  return (
    <>
      <AuthHead title="Sign in">
        {done === "reset" ? "Your new password is set. Sign in with it." : "To your account and its keys."}
      </AuthHead>
      <SignInForm target={target} email={typeof email === "string" ? email : ""} />
      <p className="mt-8 border-t border-line pt-5">
        New here?{" "}
        <Link className="link" href="/signup">
          Open an account
        </Link>
        , free for 1,000 units a month.
      </p>
    </>
  )
}
