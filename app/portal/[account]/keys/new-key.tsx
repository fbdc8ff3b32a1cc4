"use client"

import { zodResolver } from "@hookform/resolvers/zod"
import { useState } from "react"
import { useForm } from "react-hook-form"
import { z } from "zod"
import { lifetimes_days, newKeyInput } from "@/app/api/portal/schemas"
import { ask, showProblem } from "@/app/ui/api"
import { Button } from "@/app/ui/button"
import { Dialog } from "@/app/ui/dialog"
import { Choices, Input, Select, TextArea } from "@/app/ui/field"
import { Notice } from "@/app/ui/notice"
import { scopes } from "@/lib/api/define-operation"
import { SecretOnce } from "./secret-once"

// As the fields hold it: origins one a line, the lifetime as the text of an option.
const form = newKeyInput
  .omit({ origins: true, lifetime_days: true })
  .extend({ origins: z.string(), lifetime_days: z.string() })

const explained: Record<(typeof scopes)[number], string> = {
  calculate: "Every calculation, and batches of them",
  reports: "Store, read and share reports",
  catalog: "Read and change your catalogue of parts",
  usage: "Read the usage of the account",
  enquiries: "Read what shoppers asked, with their consent",
  insights: "Read what your customers' tanks look like",
  webhooks: "Set up webhooks and read their deliveries",
}

interface Props {
  path: string
  onDone: () => void
  onClose: () => void
}

export function NewKeyDialog({ path, onDone, onClose }: Props) {
  const [secret, setSecret] = useState<string>()
  if (secret) {
    return (
      <Dialog open held onClose={onClose} title="Store this key now">
        <SecretOnce secret={secret} onClose={onClose} />
      </Dialog>
    )
  }
  return (
    <Dialog open onClose={onClose} title="New key">
      <NewKeyForm
        path={path}
        onClose={onClose}
        onMade={(made) => {
          setSecret(made)
          onDone()
        }}
      />
    </Dialog>
  )
}

function NewKeyForm({
  path,
  onMade,
  onClose,
}: {
  path: string
  onMade: (secret: string) => void
  onClose: () => void
}) {
  const { register, handleSubmit, setError, watch, formState } = useForm<z.infer<typeof form>>({
    resolver: zodResolver(form),
    defaultValues: {
      name: "",
      kind: "server",
      mode: "sandbox",
      scopes: ["calculate"],
      origins: "",
      lifetime_days: "",
    },
  })
  const { errors, isSubmitting } = formState
  const forBrowsers = watch("kind") === "browser"

  const submit = handleSubmit(async ({ origins, lifetime_days, ...values }) => {
    try {
      const made = await ask<{ secret: string }>("POST", path, {
        ...values,
        scopes: forBrowsers ? ["calculate"] : values.scopes,
        origins: forBrowsers ? origins.split(/\s+/).filter(Boolean) : [],
        lifetime_days: lifetime_days ? Number(lifetime_days) : null,
      })
      onMade(made.secret)
    } catch (error) {
      showProblem(error, setError, ["name", "kind", "mode", "scopes", "origins", "lifetime_days"])
    }
  })

  return (
    <form onSubmit={submit} noValidate className="space-y-6">
      {errors.root && (
        <Notice severity="danger" live>
          {errors.root.message}
        </Notice>
      )}
      <Input
        {...register("name")}
        label="Name"
        hint="What will use it: “Web shop, product pages”."
        autoComplete="off"
        error={errors.name?.message}
      />
      <Choices
        {...register("mode")}
        legend="Mode"
        options={[
          {
            value: "sandbox",
            label: "Sandbox",
            explain: "Free, 10,000 units a day, never billed; the same answers.",
          },
          { value: "live", label: "Live", explain: "Counts against the units of your plan." },
        ]}
        error={errors.mode?.message}
      />
      <Choices
        {...register("kind")}
        legend="Kind"
        options={[
          {
            value: "server",
            label: "Server key",
            explain: "A secret. For your back end, app server or till.",
          },
          {
            value: "browser",
            label: "Browser key",
            explain: "Public. Calculations only, on the origins you name.",
          },
        ]}
        error={errors.kind?.message}
      />
      {forBrowsers ? (
        <TextArea
          {...register("origins")}
          label="Origins"
          hint="One a line, as https://shop.example or https://*.shop.example."
          spellCheck={false}
          error={errors.origins?.message}
        />
      ) : (
        <Choices
          {...register("scopes")}
          type="checkbox"
          legend="It may"
          options={scopes.map((value) => ({ value, label: explained[value] }))}
          error={errors.scopes?.message}
        />
      )}
      <Select {...register("lifetime_days")} label="Expires" error={errors.lifetime_days?.message}>
        {lifetimes_days.map((days) => (
          <option key={days ?? "never"} value={days ?? ""}>
            {days ? `After ${days} days` : "Never"}
          </option>
        ))}
      </Select>
      <div className="flex flex-wrap gap-3">
        <Button type="submit" look="primary" busy={isSubmitting}>
          Make the key
        </Button>
        <Button onClick={onClose}>Cancel</Button>
      </div>
    </form>
  )
}
