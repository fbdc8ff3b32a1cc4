"use client"

import { useMutation } from "@tanstack/react-query"
import { ask, detailOf } from "@/app/ui/api"
import { Button } from "@/app/ui/button"
import { Dialog } from "@/app/ui/dialog"
import { Notice } from "@/app/ui/notice"

export function LeaveDialog({ path, onClose }: { path: string; onClose: () => void }) {
  const leave = useMutation({
    mutationFn: () => ask("POST", `${path}/leave`, {}),
    onSuccess: () => location.assign("/portal"),
  })
  return (
    <Dialog
      open
      onClose={onClose}
      title="Leave this account?"
      lead="You lose its pages at once. An owner can invite you again; your sign-in and your other accounts stay."
    >
      <div className="space-y-6">
        {leave.error && (
          <Notice severity="danger" live>
            {detailOf(leave.error)}
          </Notice>
        )}
        <div className="flex flex-wrap gap-3">
          <Button look="danger" busy={leave.isPending || leave.isSuccess} onClick={() => leave.mutate()}>
            Leave the account
          </Button>
          <Button onClick={onClose}>Stay</Button>
        </div>
      </div>
    </Dialog>
  )
}
