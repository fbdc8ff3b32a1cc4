"use client"

import { zodResolver } from "@hookform/resolvers/zod"
import { useRouter } from "next/navigation"
import { useForm } from "react-hook-form"
import { accountNameInput } from "@/app/api/portal/schemas"
import { ask, showProblem } from "@/app/ui/api"
import { Button } from "@/app/ui/button"
import { FieldError, Input } from "@/app/ui/field"

export function NameForm({ account, name }: { account: string; name: string }) {
  const router = useRouter()
  const { register, handleSubmit, setError, reset, formState } = useForm({
    resolver: zodResolver(accountNameInput),
    defaultValues: { name },
  })
  const { errors, isSubmitting, isSubmitSuccessful, isDirty } = formState

  const submit = handleSubmit(async (values) => {
    try {
      await ask("PATCH", `/api/portal/${account}/settings`, values)
      reset(values, { keepIsSubmitSuccessful: true })
      router.refresh()
    } catch (error) {
      showProblem(error, setError, ["name"])
    }
  })

  return (
    <form onSubmit={submit} noValidate className="max-w-md space-y-5">
      <Input
        {...register("name")}
        label="Account name"
        autoComplete="organization"
        error={errors.name?.message}
      />
      <FieldError message={errors.root?.message} />
      <div className="flex items-center gap-4">
        <Button type="submit" look="primary" busy={isSubmitting} disabled={!isDirty}>
          Save
        </Button>
        <span role="status" className="text-sm text-soft">
          {isSubmitSuccessful && !isDirty && "Saved."}
        </span>
      </div>
    </form>
  )
}
