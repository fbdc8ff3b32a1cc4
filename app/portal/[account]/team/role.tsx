"use client"

import { useMutation } from "@tanstack/react-query"
import { useState } from "react"
import { ask, detailOf } from "@/app/ui/api"
import { Button } from "@/app/ui/button"
import { Dialog } from "@/app/ui/dialog"
import { Notice } from "@/app/ui/notice"
import { RoleChoices } from "./role-choices"
import type { Row } from "./team"

export function RoleDialog({
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
  const [role, setRole] = useState<string>(member.role)
  const change = useMutation({
    mutationFn: () => ask("PATCH", `${path}/members/${member.user_id}`, { role }),
    onSuccess: onDone,
  })
  return (
    <Dialog open onClose={onClose} title={`Role of ${member.name}`} lead="It takes effect at once.">
      <div className="space-y-6">
        {change.error && (
          <Notice severity="danger" live>
            {detailOf(change.error)}
          </Notice>
        )}
        <RoleChoices name="role" chosen={role} onChange={(event) => setRole(event.target.value)} />
        <div className="flex flex-wrap gap-3">
          <Button
            look="primary"
            busy={change.isPending}
            disabled={role === member.role}
            onClick={() => change.mutate()}
          >
            Change the role
          </Button>
          <Button onClick={onClose}>Cancel</Button>
        </div>
      </div>
    </Dialog>
  )
}
