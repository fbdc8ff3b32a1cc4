"use client"

import { zodResolver } from "@hookform/resolvers/zod"
import { useState } from "react"
import { useForm } from "react-hook-form"
import { signUpInput } from "@/app/api/auth/schemas"
import { ask, showProblem } from "@/app/ui/api"
import { Button } from "@/app/ui/button"
import { Input } from "@/app/ui/field"
import { Notice } from "@/app/ui/notice"
import { PasswordInput } from "@/app/ui/password-input"
import { LetterSent } from "../letter-sent"

export function SignUpForm({ passwordMin }: { passwordMin: number }) {
  const [sentTo, setSentTo] = useState<string>()
  const { register, handleSubmit, setError, formState } = useForm({
    resolver: zodResolver(signUpInput),
    defaultValues: { name: "", organisation: "", email: "", password: "" },
  })
  const { errors, isSubmitting } = formState

  const submit = handleSubmit(async (values) => {
    try {
      await ask("POST", "/api/auth/sign-up", values)
      setSentTo(values.email)
    } catch (error) {
      showProblem(error, setError, ["name", "organisation", "email", "password"])
    }
  })

  if (sentTo) {
    return (
      <LetterSent to={sentTo} onBack={() => setSentTo(undefined)}>
        Open the link in it to confirm that the address is yours. It works once, within 24 hours.
      </LetterSent>
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
        {...register("name")}
        label="Your name"
        autoComplete="name"
        autoFocus
        error={errors.name?.message}
      />
      <Input
        {...register("organisation")}
        label="Shop, brand or project"
        hint="Names your account; you can rename it later."
        autoComplete="organization"
        error={errors.organisation?.message}
      />
      <Input
        {...register("email")}
        label="E-mail"
        type="email"
        autoComplete="username"
        error={errors.email?.message}
      />
      <PasswordInput
        {...register("password")}
        label="Password"
        hint={`At least ${passwordMin} characters. Four or five unrelated words do well.`}
        autoComplete="new-password"
        error={errors.password?.message}
      />
      <Button type="submit" look="primary" busy={isSubmitting}>
        Open the account
      </Button>
    </form>
  )
}
