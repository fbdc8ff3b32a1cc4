"use client"

import { zodResolver } from "@hookform/resolvers/zod"
import { useForm } from "react-hook-form"
import { resetInput } from "@/app/api/auth/schemas"
import { ask, showProblem } from "@/app/ui/api"
import { Button } from "@/app/ui/button"
import { Notice } from "@/app/ui/notice"
import { PasswordInput } from "@/app/ui/password-input"

export function ResetForm({
  token,
  email,
  passwordMin,
}: {
  token: string
  email: string
  passwordMin: number
}) {
  const { register, handleSubmit, setError, formState } = useForm({
    resolver: zodResolver(resetInput),
    defaultValues: { token, password: "" },
  })
  const { errors, isSubmitting } = formState

  const submit = handleSubmit(async (values) => {
    try {
      await ask("POST", "/api/auth/reset", values)
      location.assign(`/signin?done=reset&email=${encodeURIComponent(email)}`)
      await new Promise(() => {})
    } catch (error) {
      showProblem(error, setError, ["password"])
    }
  })

  return (
    <form onSubmit={submit} noValidate className="space-y-5">
      {errors.root && (
        <Notice severity="danger" live>
          {errors.root.message}
        </Notice>
      )}
      <input type="hidden" autoComplete="username" value={email} readOnly />
      <PasswordInput
        {...register("password")}
        label="New password"
        hint={`At least ${passwordMin} characters. Four or five unrelated words do well.`}
        autoComplete="new-password"
        autoFocus
        error={errors.password?.message}
      />
      <Button type="submit" look="primary" busy={isSubmitting}>
        Set the password
      </Button>
    </form>
  )
}
