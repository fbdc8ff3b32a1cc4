"use client"

import { zodResolver } from "@hookform/resolvers/zod"
import { useForm } from "react-hook-form"
import { codeInput } from "@/app/api/auth/schemas"
import { ask, showProblem } from "@/app/ui/api"
import { Button } from "@/app/ui/button"
import { CodeBlock } from "@/app/ui/code-block"
import { FieldError, Input } from "@/app/ui/field"
import { QrCode } from "@/app/ui/qr-code"
import { Section } from "@/app/ui/sheet"

export interface Seed {
  readonly secret: string
  readonly uri: string
}

/** Carries the seed to the app, and takes a first code that shows that it arrived. */
export function Enrol({
  seed,
  path,
  onDone,
}: {
  seed: Seed
  path: string
  onDone: (recoveryCodes: string[]) => void
}) {
  const { register, handleSubmit, setError, setFocus, formState } = useForm({
    resolver: zodResolver(codeInput),
    defaultValues: { code: "" },
  })
  const { errors, isSubmitting } = formState

  const submit = handleSubmit(async (values) => {
    try {
      const made = await ask<{ recovery_codes: string[] }>("POST", `${path}/confirm`, values)
      onDone(made.recovery_codes)
    } catch (error) {
      showProblem(error, setError, ["code"])
      setFocus("code", { shouldSelect: true })
    }
  })

  return (
    <>
      <Section title="1. Into the app" note="Drawn by this page; no other site sees it.">
        <div className="flex flex-wrap items-start gap-6">
          <QrCode text={seed.uri} label="QR code of the secret, for the authenticator app" />
          <div className="min-w-0 grow basis-64 space-y-3">
            <p className="max-w-measure">
              Scan the drawing with the app. If it cannot, choose “enter a key” there, time-based, and type:
            </p>
            <CodeBlock code={seed.secret.replace(/(.{4})(?=.)/g, "$1 ")} what="Secret for the app" wrap />
          </div>
        </div>
      </Section>
      <Section title="2. Back from the app">
        <form onSubmit={submit} noValidate className="max-w-md space-y-5">
          <Input
            {...register("code")}
            label="Code"
            hint="The six digits that the app shows now."
            autoComplete="one-time-code"
            inputMode="numeric"
            error={errors.code?.message}
          />
          <FieldError message={errors.root?.message} />
          <Button type="submit" look="primary" busy={isSubmitting}>
            Switch it on
          </Button>
        </form>
      </Section>
    </>
  )
}
