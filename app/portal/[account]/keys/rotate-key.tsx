"use client"

import { useMutation } from "@tanstack/react-query"
import { useState } from "react"
import { overlaps_h } from "@/app/api/portal/schemas"
import { ask, detailOf } from "@/app/ui/api"
import { Button } from "@/app/ui/button"
import { Dialog } from "@/app/ui/dialog"
import { Select } from "@/app/ui/field"
import { Notice } from "@/app/ui/notice"
import { minuteOf } from "@/app/ui/time"
import type { Key } from "./key-state"
import { SecretOnce } from "./secret-once"

const words: Record<(typeof overlaps_h)[number], string> = {
  0: "Ends at once",
  24: "One day",
  72: "Three days",
  168: "A week",
  720: "30 days",
}

export function RotateDialog({
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
  const [overlap_h, setOverlap] = useState(72)
  const rotate = useMutation({
    mutationFn: () => ask<{ secret: string }>("POST", `${path}/${item.id}/rotate`, { overlap_h }),
    onSuccess: onDone,
  })

  if (rotate.data) {
    return (
      <Dialog open held onClose={onClose} title="Store the successor now">
        <SecretOnce secret={rotate.data.secret} onClose={onClose} />
      </Dialog>
    )
  }
  return (
    <Dialog
      open
      onClose={onClose}
      title={`Rotate “${item.name}”?`}
      lead="You get a successor with the same settings. The old key goes on working for a while, so that you can put the new one in its place."
    >
      <div className="space-y-6">
        {rotate.error && (
          <Notice severity="danger" live>
            {detailOf(rotate.error)}
          </Notice>
        )}
        <p className="text-sm">
          Old key, ending in <span className="font-mono">{item.last4}</span>:{" "}
          {item.last_used_at ? `last used ${minuteOf(item.last_used_at)}.` : "never used."}
        </p>
        <Select
          label="The old key works for another"
          value={overlap_h}
          onChange={(event) => setOverlap(Number(event.target.value))}
        >
          {overlaps_h.map((hours) => (
            <option key={hours} value={hours}>
              {words[hours]}
            </option>
          ))}
        </Select>
        <div className="flex flex-wrap gap-3">
          <Button look="primary" busy={rotate.isPending} onClick={() => rotate.mutate()}>
            Make the successor
          </Button>
          <Button onClick={onClose}>Cancel</Button>
        </div>
      </div>
    </Dialog>
  )
}
