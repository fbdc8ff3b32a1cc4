"use client"

import { useMutation } from "@tanstack/react-query"
import { ask, detailOf } from "@/app/ui/api"
import { Button } from "@/app/ui/button"
import { Dialog } from "@/app/ui/dialog"
import { Notice } from "@/app/ui/notice"
import type { Row } from "./team"

export function RemoveDialog({
  path,
  member,
  onDone,
  onClose,
}: {
  path: string
  member: Row
  onDone: () => void
  onClose: () => void
}) {
  const remove = useMutation({
    mutationFn: () => ask("DELETE", `${path}/members/${member.user_id}`),
    onSuccess: onDone,
  })
  return (
    <Dialog
      open
      onClose={onClose}
      title={`Remove ${member.name}?`}
      lead={`${member.email} loses this account at once. Keys, widgets and reports that they made stay and go on working: rotate the server keys that they may have copied.`}
    >
      <div className="space-y-6">
        {remove.error && (
          <Notice severity="danger" live>
            {detailOf(remove.error)}
          </Notice>
        )}
        <div className="flex flex-wrap gap-3">
          <Button look="danger" busy={remove.isPending} onClick={() => remove.mutate()}>
            Remove from the account
          </Button>
          <Button onClick={onClose}>Keep them</Button>
        </div>
      </div>
    </Dialog>
  )
}
