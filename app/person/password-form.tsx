"use client"

import { zodResolver } from "@hookform/resolvers/zod"
import { useQueryClient } from "@tanstack/react-query"
import { useState } from "react"
import { useForm } from "react-hook-form"
import { passwordChangeInput } from "@/app/api/auth/schemas"
import { ask, showProblem } from "@/app/ui/api"
import { Button } from "@/app/ui/button"
import { FieldError } from "@/app/ui/field"
import { PasswordInput } from "@/app/ui/password-input"

export function PasswordForm({ email, passwordMin }: { email: string; passwordMin: number }) {
  const cache = useQueryClient()
  const { register, handleSubmit, setError, reset, formState } = useForm({
    resolver: zodResolver(passwordChangeInput),
    defaultValues: { present: "", password: "" },
  })
  const { errors, isSubmitting, isDirty } = formState
  const [changed, setChanged] = useState(false)

  const submit = handleSubmit(async (values) => {
    try {
      await ask("POST", "/api/person/password", values)
      reset()
      setChanged(true)
      await cache.invalidateQueries({ queryKey: ["sessions"] })
    } catch (error) {
      showProblem(error, setError, ["present", "password"])
    }
  })

  return (
    <form onSubmit={submit} noValidate className="max-w-md space-y-5">
      <input type="hidden" autoComplete="username" value={email} readOnly />
      <PasswordInput
        {...register("present")}
        label="Present password"
        autoComplete="current-password"
        error={errors.present?.message}
      />
      <PasswordInput
        {...register("password")}
        label="New password"
        hint={`At least ${passwordMin} characters. Four or five unrelated words do well.`}
        autoComplete="new-password"
        error={errors.password?.message}
      />
      <FieldError message={errors.root?.message} />
      <div className="flex items-center gap-4">
        <Button type="submit" look="primary" busy={isSubmitting} disabled={!isDirty}>
          Change the password
        </Button>
        <span role="status" className="text-sm text-soft">
          {changed && !isDirty && "Changed. Your other sessions have ended."}
        </span>
      </div>
    </form>
  )
}
