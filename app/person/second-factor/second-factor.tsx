"use client"

import { useMutation } from "@tanstack/react-query"
import { useRouter } from "next/navigation"
import { useState } from "react"
import { ask, detailOf } from "@/app/ui/api"
import { Button } from "@/app/ui/button"
import { Dialog } from "@/app/ui/dialog"
import type { Json } from "@/app/ui/json"
import { Notice } from "@/app/ui/notice"
import { dayOf } from "@/app/ui/time"
import type { SecondFactorState } from "@/lib/accounts"
import { Enrol, type Seed } from "./enrol"
import { RecoveryCodes } from "./recovery-codes"

const path = "/api/person/second-factor"

export function SecondFactor({
  state,
  mayRemove,
  next,
}: {
  state: Json<SecondFactorState>
  mayRemove: boolean
  next: string
}) {
  const router = useRouter()
  const [codes, setCodes] = useState<string[]>()
  const [removing, setRemoving] = useState(false)
  const begin = useMutation({ mutationFn: () => ask<Seed>("POST", path, {}) })
  const renew = useMutation({
    mutationFn: () => ask<{ recovery_codes: string[] }>("POST", `${path}/recovery-codes`, {}),
    onSuccess: ({ recovery_codes }) => setCodes(recovery_codes),
  })
  const remove = useMutation({
    mutationFn: () => ask("DELETE", path),
    onSuccess: () => {
      setRemoving(false)
      router.refresh()
    },
  })
  const problem = begin.error ?? renew.error

  if (codes) return <RecoveryCodes codes={codes} onDone={() => location.assign(next)} />
  if (begin.data) return <Enrol seed={begin.data} path={path} onDone={setCodes} />
  return (
    <div className="space-y-6">
      {problem && (
        <Notice severity="danger" live>
          {detailOf(problem)}
        </Notice>
      )}
      {state.since ? (
        <>
          <dl className="divide-y divide-line border-y border-line">
            <div className="flex gap-4 py-2.5">
              <dt className="w-40 shrink-0 text-soft">Set up</dt>
              <dd>{dayOf(state.since)}</dd>
            </div>
            <div className="flex gap-4 py-2.5">
              <dt className="w-40 shrink-0 text-soft">Recovery codes left</dt>
              <dd>
                <span className="font-mono">{state.recovery_codes_left}</span> of 10
              </dd>
            </div>
          </dl>
          <div className="flex flex-wrap gap-3">
            <Button busy={renew.isPending} onClick={() => renew.mutate()}>
              Make new recovery codes
            </Button>
            {mayRemove && (
              <Button look="danger" onClick={() => setRemoving(true)}>
                Remove the second factor
              </Button>
            )}
          </div>
        </>
      ) : (
        <>
          <p className="max-w-measure">
            You need an app that shows one-time codes (TOTP); any will do, and most password managers are one.
          </p>
          <Button look="primary" busy={begin.isPending} onClick={() => begin.mutate()}>
            Set it up
          </Button>
        </>
      )}
      <Dialog
        open={removing}
        onClose={() => setRemoving(false)}
        title="Remove the second factor?"
        lead="Your password alone signs you in from then on. The recovery codes are void, and your other sessions end."
      >
        <div className="space-y-6">
          {remove.error && (
            <Notice severity="danger" live>
              {detailOf(remove.error)}
            </Notice>
          )}
          <div className="flex flex-wrap gap-3">
            <Button look="danger" busy={remove.isPending} onClick={() => remove.mutate()}>
              Remove it
            </Button>
            <Button onClick={() => setRemoving(false)}>Keep it</Button>
          </div>
        </div>
      </Dialog>
    </div>
  )
}
