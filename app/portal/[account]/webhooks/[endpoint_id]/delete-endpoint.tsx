"use client"

import { useMutation } from "@tanstack/react-query"
import { ask, detailOf } from "@/app/ui/api"
import { Button } from "@/app/ui/button"
import { Dialog } from "@/app/ui/dialog"
import { FieldError } from "@/app/ui/field"

export function DeleteEndpoint({
  path,
  url,
  onDone,
  onClose,
}: {
  path: string
  url: string
  onDone: () => void
  onClose: () => void
}) {
  const remove = useMutation({ mutationFn: () => ask("DELETE", path), onSuccess: onDone })
  return (
    <Dialog
      open
      onClose={onClose}
      title="Delete this endpoint?"
      lead={`${url} is told of nothing more, what waits to be sent is dropped, and the record of its deliveries goes with it.`}
    >
      <FieldError message={remove.error ? detailOf(remove.error) : undefined} />
      <div className="mt-2 flex flex-wrap gap-3">
        <Button look="danger" busy={remove.isPending} onClick={() => remove.mutate()}>
          Delete the endpoint
        </Button>
        <Button onClick={onClose}>Keep it</Button>
      </div>
    </Dialog>
  )
}
