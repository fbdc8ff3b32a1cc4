"use client"

import { zodResolver } from "@hookform/resolvers/zod"
import { useForm } from "react-hook-form"
import { codeInput } from "@/app/api/auth/schemas"
import { Button } from "@/app/ui/button"
import { Input } from "@/app/ui/field"

/** Asks for a code of the second factor. `onCode` leaves the page, or says what is wrong. */
export function CodeForm({
  onCode,
  onBack,
}: {
  onCode: (code: string) => Promise<string>
  onBack?: () => void
}) {
  const { register, handleSubmit, setError, setFocus, formState } = useForm({
    resolver: zodResolver(codeInput),
    defaultValues: { code: "" },
  })
  const { errors, isSubmitting } = formState

  const submit = handleSubmit(async ({ code }) => {
    setError("code", { message: await onCode(code) })
    setFocus("code", { shouldSelect: true })
  })

  return (
    <form onSubmit={submit} noValidate className="space-y-5">
      <Input
        {...register("code")}
        label="Code"
        hint="The six digits that your authenticator app shows now, or one of your recovery codes."
        autoComplete="one-time-code"
        autoCapitalize="none"
        spellCheck={false}
        autoFocus
        error={errors.code?.message}
      />
      <div className="flex flex-wrap gap-3">
        <Button type="submit" look="primary" busy={isSubmitting}>
          Sign in
        </Button>
        {onBack && <Button onClick={onBack}>Back</Button>}
      </div>
    </form>
  )
}
