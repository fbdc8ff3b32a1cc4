"use client"

import { zodResolver } from "@hookform/resolvers/zod"
import { useForm } from "react-hook-form"
import { z } from "zod"
import { ask, showProblem } from "@/app/ui/api"
import { Button } from "@/app/ui/button"
import { Dialog } from "@/app/ui/dialog"
import { Choices, Input } from "@/app/ui/field"
import { Notice } from "@/app/ui/notice"
import type { Endpoint, EventChoice } from "./webhooks"

const form = z.object({
  url: z.string().trim().min(1, "Write the address as https://shop.example/hooks."),
  events: z.array(z.string()).min(1, "Choose at least one event."),
})

/** A new endpoint, or another address and other events for one that is there. */
export function EndpointDialog({
  path,
  endpoint,
  events,
  onDone,
  onClose,
}: {
  path: string
  endpoint?: Endpoint
  events: readonly EventChoice[]
  onDone: () => unknown
  onClose: () => void
}) {
  const { register, handleSubmit, setError, formState } = useForm<z.infer<typeof form>>({
    resolver: zodResolver(form),
    defaultValues: { url: endpoint?.url ?? "", events: endpoint ? [...endpoint.events] : [] },
  })
  const { errors, isSubmitting } = formState
  const submit = handleSubmit(async (values) => {
    try {
      await (endpoint ? ask("PATCH", `${path}/${endpoint.id}`, values) : ask("POST", path, values))
      onDone()
      onClose()
    } catch (error) {
      showProblem(error, setError, ["url", "events"])
    }
  })
  return (
    <Dialog open onClose={onClose} title={endpoint ? "Change the endpoint" : "New endpoint"}>
      <form onSubmit={submit} noValidate className="space-y-6">
        {errors.root && (
          <Notice severity="danger" live>
            {errors.root.message}
          </Notice>
        )}
        <Input
          {...register("url")}
          label="Address"
          hint="https, port 443 or 8443, reachable from the public internet. It has 15 seconds to answer with 2xx."
          inputMode="url"
          autoComplete="off"
          spellCheck={false}
          error={errors.url?.message}
        />
        <Choices
          {...register("events")}
          type="checkbox"
          legend="Tell it of"
          options={events.map(({ type, summary }) => ({ value: type, label: type, explain: summary }))}
          error={errors.events?.message}
        />
        <div className="flex flex-wrap gap-3">
          <Button type="submit" look="primary" busy={isSubmitting}>
            {endpoint ? "Save" : "Make the endpoint"}
          </Button>
          <Button onClick={onClose}>Cancel</Button>
        </div>
      </form>
    </Dialog>
  )
}
