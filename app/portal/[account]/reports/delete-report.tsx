"use client"

import { useMutation } from "@tanstack/react-query"
import { ask, detailOf } from "@/app/ui/api"
import { Button } from "@/app/ui/button"
import { Dialog } from "@/app/ui/dialog"
import { FieldError } from "@/app/ui/field"

export function DeleteReport({
  account,
  report: { id, title, shared_url },
  onClose,
  onDone,
}: {
  account: string
  report: { readonly id: string; readonly title: string; readonly shared_url: string | null }
  onClose: () => void
  onDone: () => unknown
}) {
  const remove = useMutation({
    mutationFn: () => ask("DELETE", `/api/portal/${account}/reports/${id}`),
    onSuccess: () => {
      onDone()
      onClose()
    },
  })
  return (
    <Dialog
      open
      onClose={onClose}
      title={`Delete “${title}”?`}
      lead={
        shared_url
          ? "The report is gone for good, and the link that you gave away stops working. Its units stay charged."
          : "The report is gone for good. Its units stay charged."
      }
    >
      <FieldError message={remove.error ? detailOf(remove.error) : undefined} />
      <div className="mt-2 flex flex-wrap gap-3">
        <Button look="danger" busy={remove.isPending} onClick={() => remove.mutate()}>
          Delete the report
        </Button>
        <Button onClick={onClose}>Keep it</Button>
      </div>
    </Dialog>
  )
}
