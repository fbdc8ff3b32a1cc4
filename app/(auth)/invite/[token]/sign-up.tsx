"use client"

import { zodResolver } from "@hookform/resolvers/zod"
import { signIn } from "next-auth/react"
import { useForm } from "react-hook-form"
import { invitedInput } from "@/app/api/auth/schemas"
import { Button } from "@/app/ui/button"
import { Input } from "@/app/ui/field"
import { Notice } from "@/app/ui/notice"
import { PasswordInput } from "@/app/ui/password-input"

export function SignUpForm({
  token,
  email,
  account,
  passwordMin,
}: {
  token: string
  email: string
  account: string
  passwordMin: number
}) {
  const { register, handleSubmit, setError, formState } = useForm({
    resolver: zodResolver(invitedInput),
    defaultValues: { name: "", password: "" },
  })
  const { errors, isSubmitting } = formState

  const submit = handleSubmit(async (values) => {
    const outcome = await signIn("invitation", { ...values, token, redirect: false }).catch(() => undefined)
    if (outcome?.ok) {
      location.assign("/portal")
      await new Promise(() => {})
    }
    setError("root", {
      message: outcome?.error ?? "We could not be reached. Check your connection and try again.",
    })
  })

  return (
    <form onSubmit={submit} noValidate className="space-y-5">
      {errors.root && (
        <Notice severity="danger" live>
          {errors.root.message}
        </Notice>
      )}
      <input type="hidden" autoComplete="username" value={email} readOnly />
      <Input
        {...register("name")}
        label="Your name"
        autoComplete="name"
        autoFocus
        error={errors.name?.message}
      />
      <PasswordInput
        {...register("password")}
        label="Password"
        hint={`At least ${passwordMin} characters. Four or five unrelated words do well.`}
        autoComplete="new-password"
        error={errors.password?.message}
      />
      <Button type="submit" look="primary" busy={isSubmitting}>
        Join {account}
      </Button>
    </form>
  )
}
