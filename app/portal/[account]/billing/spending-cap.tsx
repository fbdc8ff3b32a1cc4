"use client"

import { zodResolver } from "@hookform/resolvers/zod"
import { useForm } from "react-hook-form"
import { z } from "zod"
import { ask, showProblem } from "@/app/ui/api"
import { Button } from "@/app/ui/button"
import { FieldError, Input } from "@/app/ui/field"
import { usd } from "@/app/ui/money"
import { type Plan, unitCapOf } from "@/lib/billing/plans"

const form = z.object({
  dollars: z.coerce.number<string>().int("Use whole dollars.").min(0, "Use 0 or more."),
})

/** The most that an owner lets the account spend beyond its plan in a period. */
export function SpendingCap({
  path,
  plan,
  cap_minor,
  onSaved,
}: {
  path: string
  plan: Plan
  cap_minor: number
  onSaved: () => void
}) {
  const { register, handleSubmit, setError, watch, reset, formState } = useForm({
    resolver: zodResolver(form),
    defaultValues: { dollars: String(cap_minor / 100) },
  })
  const { errors, isSubmitting, isDirty, isSubmitSuccessful } = formState
  const wanted = Number(watch("dollars"))
  const holds = Number.isFinite(wanted) && wanted >= 0 ? unitCapOf(plan, Math.floor(wanted * 100)) : undefined

  const submit = handleSubmit(async ({ dollars }) => {
    try {
      await ask("POST", `${path}/cap`, { overage_cap_minor: dollars * 100 })
      reset({ dollars: String(dollars) }, { keepIsSubmitSuccessful: true })
      onSaved()
    } catch (error) {
      showProblem(error, setError, [])
    }
  })

  return (
    <form onSubmit={submit} noValidate className="max-w-md space-y-4">
      <Input
        {...register("dollars")}
        label="Most that a period may cost beyond the plan"
        unit="USD"
        inputMode="numeric"
        hint={
          holds === undefined
            ? undefined
            : `At ${usd(plan.overage_minor_per_1000 ?? 0)} for each 1,000 units, the period then holds ${holds.toLocaleString("en")} units.`
        }
        error={errors.dollars?.message}
      />
      <FieldError message={errors.root?.message} />
      <div className="flex items-center gap-4">
        <Button type="submit" look="primary" busy={isSubmitting} disabled={!isDirty}>
          Allow this
        </Button>
        <span role="status" className="text-sm text-soft">
          {isSubmitSuccessful && !isDirty && "Saved."}
        </span>
      </div>
    </form>
  )
}
