"use client"

import { useMutation } from "@tanstack/react-query"
import { ask, detailOf } from "@/app/ui/api"
import { Button } from "@/app/ui/button"
import { Dialog } from "@/app/ui/dialog"
import { FieldError } from "@/app/ui/field"
import { minuteOf } from "@/app/ui/time"
import type { Delivery } from "./endpoint-view"

/** One delivery: what was sent, what came back, when it is tried again. */
export function DeliveryDialog({
  path,
  delivery,
  failure,
  mayReplay,
  onReplayed,
  onClose,
}: {
  path: string
  delivery: Delivery
  failure: string | undefined
  mayReplay: boolean
  onReplayed: () => unknown
  onClose: () => void
}) {
  const { type, event_id, status, attempts, created_at, next_attempt_at, payload } = delivery
  const { last_status, last_duration_ms } = delivery
  const replay = useMutation({
    mutationFn: () => ask("POST", `${path}/replay`, {}),
    onSuccess: () => {
      onReplayed()
      onClose()
    },
  })
  const facts = [
    ["webhook-id", event_id],
    ["Happened", minuteOf(created_at)],
    ["Attempts", String(attempts)],
    ["Last answer", [last_status ?? "none", failure].filter(Boolean).join(", ")],
    ["It took", last_duration_ms === null ? "" : `${last_duration_ms} ms`],
    ["Next attempt", status === "pending" && next_attempt_at ? minuteOf(next_attempt_at) : ""],
  ].filter(([, value]) => value !== "")
  return (
    <Dialog open onClose={onClose} title={type}>
      <dl className="text-sm">
        {facts.map(([name, value]) => (
          <div key={name} className="grid grid-cols-[8rem_minmax(0,1fr)] gap-4 border-t border-line py-1.5">
            <dt className="text-soft">{name}</dt>
            <dd className="font-mono break-all">{value}</dd>
          </div>
        ))}
      </dl>
      <h3 className="mt-5 font-semibold">Body</h3>
      {/* biome-ignore lint/a11y/noNoninteractiveTabindex: what scrolls has to be reached by the keyboard */}
      <pre tabIndex={0} className="mt-2 max-h-72 overflow-auto border border-line bg-sunk p-3 text-xs">
        {JSON.stringify(JSON.parse(payload), null, 2)}
      </pre>
      <FieldError message={replay.error ? detailOf(replay.error) : undefined} />
      <div className="mt-6 flex flex-wrap gap-3">
        {mayReplay && (
          <Button look="primary" busy={replay.isPending} onClick={() => replay.mutate()}>
            Send it again
          </Button>
        )}
        <Button onClick={onClose}>Close</Button>
      </div>
    </Dialog>
  )
}
