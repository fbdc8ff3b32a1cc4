"use client"

import { zodResolver } from "@hookform/resolvers/zod"
import { useState } from "react"
import { useForm } from "react-hook-form"
import { signInLinkInput } from "@/app/api/auth/schemas"
import { ask, showProblem } from "@/app/ui/api"
import { Button } from "@/app/ui/button"
import { Input } from "@/app/ui/field"
import { Notice } from "@/app/ui/notice"
import { LetterSent } from "../../letter-sent"

export function LinkRequestForm() {
  const [sentTo, setSentTo] = useState<string>()
  const { register, handleSubmit, setError, formState } = useForm({
    resolver: zodResolver(signInLinkInput),
    defaultValues: { email: "" },
  })
  const { errors, isSubmitting } = formState

  const submit = handleSubmit(async (values) => {
    try {
      await ask("POST", "/api/auth/sign-in-link", values)
      setSentTo(values.email)
    } catch (error) {
      showProblem(error, setError, ["email"])
    }
  })

  if (sentTo) {
    return (
      <LetterSent to={sentTo} onBack={() => setSentTo(undefined)}>
        If it belongs to a sign-in, the link is on its way.
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
        {...register("email")}
        label="E-mail"
        type="email"
        autoComplete="username"
        autoFocus
        error={errors.email?.message}
      />
      <Button type="submit" look="primary" busy={isSubmitting}>
        Send the link
      </Button>
    </form>
  )
}
