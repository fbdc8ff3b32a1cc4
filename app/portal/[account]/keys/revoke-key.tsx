"use client"

import { useMutation } from "@tanstack/react-query"
import { ask, detailOf } from "@/app/ui/api"
import { Button } from "@/app/ui/button"
import { Dialog } from "@/app/ui/dialog"
import { Notice } from "@/app/ui/notice"
import { minuteOf } from "@/app/ui/time"
import { type Key, kindOf } from "./key-state"

export function RevokeDialog({
  path,
  item,
  onDone,
  onClose,
}: {
  path: string
  item: Key
  onDone: () => void
  onClose: () => void
}) {
  const revoke = useMutation({
    mutationFn: () => ask("POST", `${path}/${item.id}/revoke`, {}),
    onSuccess: () => {
      onDone()
      onClose()
    },
  })
  return (
    <Dialog
      open
      onClose={onClose}
      title={`Revoke “${item.name}”?`}
      lead="It ends within seconds, everywhere, for good."
    >
      <div className="space-y-6">
        {revoke.error && (
          <Notice severity="danger" live>
            {detailOf(revoke.error)}
          </Notice>
        )}
        <dl className="divide-y divide-line border-y border-line text-sm">
          {[
            ["Key", `${kindOf(item)}, ending in ${item.last4}`],
            ["Last used", item.last_used_at ? minuteOf(item.last_used_at) : "never"],
            ["What stops", stops(item)],
          ].map(([term, detail]) => (
            <div key={term} className="flex gap-4 py-2">
              <dt className="w-24 shrink-0 text-soft">{term}</dt>
              <dd>{detail}</dd>
            </div>
          ))}
        </dl>
        <p className="text-sm">
          Moving to a new key? <strong className="font-semibold">Rotate</strong> this one instead: both work
          until you are done.
        </p>
        <div className="flex flex-wrap gap-3">
          <Button look="danger" busy={revoke.isPending} onClick={() => revoke.mutate()}>
            Revoke the key
          </Button>
          <Button onClick={onClose}>Keep it</Button>
        </div>
      </div>
    </Dialog>
  )
}

function stops({ kind, mode, origins, scopes }: Key): string {
  const calls = mode === "live" ? "Live calls" : "Sandbox calls"
  if (kind === "browser") return `${calls} from ${origins.join(", ")} are refused with 401.`
  return `${calls} of every server and script that holds it (${scopes.join(", ")}) are refused with 401.`
}
