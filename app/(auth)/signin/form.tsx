"use client"

import { zodResolver } from "@hookform/resolvers/zod"
import Link from "next/link"
import { signIn } from "next-auth/react"
import { useForm } from "react-hook-form"
import { signInInput } from "@/app/api/auth/schemas"
import { Button } from "@/app/ui/button"
import { Input } from "@/app/ui/field"
import { Notice } from "@/app/ui/notice"
import { PasswordInput } from "../password-input"

export function SignInForm({ target, email }: { target: string; email: string }) {
  const { register, handleSubmit, setError, setFocus, formState } = useForm({
    resolver: zodResolver(signInInput),
    defaultValues: { email, password: "" },
  })
  const { errors, isSubmitting } = formState

  const submit = handleSubmit(async (values) => {
    const outcome = await signIn("password", { ...values, redirect: false }).catch(() => undefined)
    if (outcome?.ok) {
      // A full load: nothing that was rendered for nobody may stay.
      location.assign(target)
      await new Promise(() => {})
    }
    setError("root", { message: wordsFor(outcome?.error) })
    setFocus("password", { shouldSelect: true })
  })

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
        <Link className="link text-sm" href="/reset">
          Forgot your password?
        </Link>
      </div>
    </form>
  )
}

function wordsFor(error: string | null | undefined): string {
  if (!error) return "We could not be reached. Check your connection and try again."
  if (error === "CredentialsSignin") return "This address and this password do not belong together."
  return error
}
