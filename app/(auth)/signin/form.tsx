"use client"

import { zodResolver } from "@hookform/resolvers/zod"
import Link from "next/link"
import { signIn } from "next-auth/react"
import { useState } from "react"
import { useForm } from "react-hook-form"
import { signInInput } from "@/app/api/auth/schemas"
import { Button } from "@/app/ui/button"
import { Input } from "@/app/ui/field"
import { Notice } from "@/app/ui/notice"
import { PasswordInput } from "@/app/ui/password-input"
import { CodeForm } from "../code-form"
import { type Outcome, wordsFor } from "../outcome"

export function SignInForm({ target, email }: { target: string; email: string }) {
  const [needsCode, setNeedsCode] = useState(false)
  const { register, handleSubmit, setError, setFocus, getValues, formState } = useForm({
    resolver: zodResolver(signInInput),
    defaultValues: { email, password: "" },
  })
  const { errors, isSubmitting } = formState

  /** Leaves the page when it worked, and otherwise says why it did not. */
  async function open(credentials: { email: string; password: string; code?: string }): Promise<Outcome> {
    const outcome = await signIn("password", { ...credentials, redirect: false }).catch(() => undefined)
    if (outcome?.ok) {
      // A full load: nothing that was rendered for nobody may stay.
      location.assign(target)
      await new Promise(() => {})
    }
    return outcome
  }

  const submit = handleSubmit(async (values) => {
    const outcome = await open(values)
    if (outcome?.error === "second_factor_required") {
      setNeedsCode(true)
      return
    }
    setError("root", { message: wordsFor(outcome) })
    setFocus("password", { shouldSelect: true })
  })

  if (needsCode) {
    return (
      <CodeForm
        onCode={async (code) => wordsFor(await open({ ...getValues(), code }))}
        onBack={() => setNeedsCode(false)}
      />
    )
  }
  return (
    <form onSubmit={submit} noValidate className="space-y-5">
      {errors.root && (
        <Notice severity="danger" live>
          {errors.root.message}
        </Notice>
      )}
      <Input
        {...register("email")}
        label="E-mail"
        type="email"
        autoComplete="username"
        autoFocus={!email}
        error={errors.email?.message}
      />
      <PasswordInput
        {...register("password")}
        label="Password"
        autoComplete="current-password"
        autoFocus={Boolean(email)}
        error={errors.password?.message}
      />
      <div className="flex flex-wrap items-center justify-between gap-4">
        <Button type="submit" look="primary" busy={isSubmitting}>
          Sign in
        </Button>
        <p className="flex flex-wrap gap-x-5 gap-y-2 text-sm">
          <Link className="link" href="/signin/link">
            Send me a link instead
          </Link>
          <Link className="link" href="/reset">
            Forgot your password?
          </Link>
        </p>
      </div>
    </form>
  )
}
