"use client"

import { useMutation } from "@tanstack/react-query"
import { useState } from "react"
import { ask, detailOf } from "@/app/ui/api"
import { Button, ButtonLink } from "@/app/ui/button"
import { Dialog } from "@/app/ui/dialog"
import { FieldError, Input } from "@/app/ui/field"
import type { Worked } from "./work-out"

/** Keeps the plan as a report: a page of its own to print, to send, to open again. */
export function SaveReport({
  account,
  worked,
  units,
}: {
  account: string
  worked: Worked | undefined
  /** What it costs. */
  units: number
}) {
  const [open, setOpen] = useState(false)
  const [title, setTitle] = useState("")
  const [shopper, setShopper] = useState("")
  const save = useMutation({
    mutationFn: (plan: Worked) =>
      ask<{ report: { id: string } }>("POST", `/api/portal/${account}/reports`, {
        kind: "plan",
        input: plan.request,
        ...(title.trim() && { title: title.trim() }),
        ...(shopper.trim() && { shopper: shopper.trim() }),
      }),
  })

  function close() {
    setOpen(false)
    save.reset()
  }

  return (
    <>
      <Button look="primary" disabled={!worked} onClick={() => setOpen(true)}>
        Save as a report ({units} units)
      </Button>
      <Dialog
        open={open}
        onClose={close}
        title={save.data ? "The report is saved" : "Save as a report"}
        lead={
          save.data
            ? "Open it to send it by mail, to print it, or to give the customer its link."
            : `The plan is kept as it stands, with its inputs and sources. This costs ${units} units.`
        }
      >
        {save.data ? (
          <div className="flex flex-wrap gap-3">
            <ButtonLink look="primary" href={`/portal/${account}/reports/${save.data.report.id}`}>
              Open the report
            </ButtonLink>
            <Button onClick={close}>Back to the bench</Button>
          </div>
        ) : (
          <form
            onSubmit={(event) => {
              event.preventDefault()
              if (worked && !save.isPending) save.mutate(worked)
            }}
          >
            <Input
              label="Title"
              hint="So that you find it again, as “90 cm cube of Tuesday”. It may stay empty."
              value={title}
              maxLength={120}
              autoComplete="off"
              onChange={(event) => setTitle(event.target.value)}
            />
            <Input
              className="mt-4"
              label="For whom"
              hint="The customer's name as it should stand on the sheet. It may stay empty."
              value={shopper}
              maxLength={120}
              autoComplete="off"
              onChange={(event) => setShopper(event.target.value)}
            />
            <FieldError message={save.error ? detailOf(save.error) : undefined} />
            <div className="mt-6 flex flex-wrap gap-3">
              <Button look="primary" type="submit" busy={save.isPending}>
                {save.isPending ? "Saving" : `Save for ${units} units`}
              </Button>
              <Button onClick={close}>Not now</Button>
            </div>
          </form>
        )}
      </Dialog>
    </>
  )
}
