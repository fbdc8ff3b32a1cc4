"use client"

import { zodResolver } from "@hookform/resolvers/zod"
import { useRouter } from "next/navigation"
import { useForm } from "react-hook-form"
import { personNameInput } from "@/app/api/auth/schemas"
import { ask, showProblem } from "@/app/ui/api"
import { Button } from "@/app/ui/button"
import { FieldError, Input } from "@/app/ui/field"

export function NameForm({ name }: { name: string }) {
  const router = useRouter()
  const { register, handleSubmit, setError, reset, formState } = useForm({
    resolver: zodResolver(personNameInput),
    defaultValues: { name },
  })
  const { errors, isSubmitting, isSubmitSuccessful, isDirty } = formState

  const submit = handleSubmit(async (values) => {
    try {
      await ask("PATCH", "/api/person", values)
      reset(values, { keepIsSubmitSuccessful: true })
      router.refresh()
    } catch (error) {
      showProblem(error, setError, ["name"])
    }
  })

  return (
    <form onSubmit={submit} noValidate className="max-w-md space-y-5">
      <Input {...register("name")} label="Your name" autoComplete="name" error={errors.name?.message} />
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
