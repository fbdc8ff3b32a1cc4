"use client"

import { useEffect, useState } from "react"
import { useForm } from "react-hook-form"
import { ask, onStepUp, showProblem } from "./api"
import { Button } from "./button"
import { Dialog } from "./dialog"
import { Input } from "./field"
import { Notice } from "./notice"
import { PasswordInput } from "./password-input"

/**
 * Stands once in a signed-in area. When a route refuses for want of a recent password or code, it asks for one, and
 * the request is made again as if nothing had been.
 */
export function StepUp({ secondFactor }: { secondFactor: boolean }) {
  const [decide, setDecide] = useState<(confirmed: boolean) => void>()
  useEffect(() => onStepUp(() => new Promise((resolve) => setDecide(() => resolve))), [])
  if (!decide) return null
  const end = (confirmed: boolean) => {
    setDecide(undefined)
    decide(confirmed)
  }
  return (
    <Dialog
      open
      onClose={() => end(false)}
      title="Is it you?"
      lead="What you are about to do can do lasting harm, so we ask once every ten minutes."
    >
      <ConfirmForm secondFactor={secondFactor} onEnd={end} />
    </Dialog>
  )
}

function ConfirmForm({
  secondFactor,
  onEnd,
}: {
  secondFactor: boolean
  onEnd: (confirmed: boolean) => void
}) {
  const [way, setWay] = useState<"password" | "code">(secondFactor ? "code" : "password")
  const { register, handleSubmit, setError, formState } = useForm({
    defaultValues: { password: "", code: "" },
  })
  const { errors, isSubmitting } = formState

  const submit = handleSubmit(async (values) => {
    try {
      await ask("POST", "/api/person/step-up", { [way]: values[way] })
      onEnd(true)
    } catch (error) {
      showProblem(error, setError, [way])
    }
  })

  return (
    <form
      // The dialog may stand above a form of the page, to which this press does not belong.
      onSubmit={(event) => {
        event.stopPropagation()
        return submit(event)
      }}
      noValidate
      className="space-y-5"
    >
      {errors.root && (
        <Notice severity="danger" live>
          {errors.root.message}
        </Notice>
      )}
      {way === "password" ? (
        <PasswordInput
          {...register("password", { required: "Write your password." })}
          key="password"
          label="Your password"
          autoComplete="current-password"
          autoFocus
          error={errors.password?.message}
        />
      ) : (
        <Input
          {...register("code", { required: "Write the six digits." })}
          key="code"
          label="Code"
          hint="The six digits that your authenticator app shows now, or one of your recovery codes."
          autoComplete="one-time-code"
          autoFocus
          error={errors.code?.message}
        />
      )}
      <div className="flex flex-wrap items-center gap-3">
        <Button type="submit" look="primary" busy={isSubmitting}>
          Confirm
        </Button>
        <Button onClick={() => onEnd(false)}>Cancel</Button>
        {secondFactor && (
          <Button look="quiet" small onClick={() => setWay(way === "code" ? "password" : "code")}>
            {way === "code" ? "Use your password instead" : "Use a code instead"}
          </Button>
        )}
      </div>
    </form>
  )
}
