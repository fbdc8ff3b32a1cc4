"use client"

import { useMutation } from "@tanstack/react-query"
import { ask, detailOf } from "@/app/ui/api"
import { Button } from "@/app/ui/button"
import { CopyButton } from "@/app/ui/copy-button"
import { FieldError } from "@/app/ui/field"
import { Section } from "@/app/ui/sheet"

interface Shown {
  readonly secret: string
  readonly previous_until: string | null
}

/** The secret by which a receiver knows that an event comes from us. */
export function Secret({ path }: { path: string }) {
  const show = useMutation({ mutationFn: () => ask<Shown>("GET", `${path}/secret`) })
  const rotate = useMutation({
    mutationFn: () => ask("POST", `${path}/secret`, {}),
    onSuccess: () => show.mutate(),
  })
  const problem = show.error ?? rotate.error
  return (
    <Section
      title="Signature"
      note="Your server checks each event with this secret. Keep it like a password: whoever has it can pass for us."
    >
      {show.data && (
        <div className="mb-4">
          <p className="flex flex-wrap items-center gap-3">
            <code className="border border-line bg-sunk px-3 py-2 text-sm break-all">{show.data.secret}</code>
            <CopyButton text={show.data.secret} what="the secret" />
          </p>
          {rotate.isSuccess && (
            <p className="mt-3 text-sm" role="status">
              This is the new one. For 24 hours each event carries two signatures, one of each secret.
            </p>
          )}
        </div>
      )}
      <div className="flex flex-wrap gap-3">
        {!show.data && (
          <Button busy={show.isPending} onClick={() => show.mutate()}>
            Show the secret
          </Button>
        )}
        <Button busy={rotate.isPending} onClick={() => rotate.mutate()}>
          Replace the secret
        </Button>
      </div>
      <FieldError message={problem ? detailOf(problem) : undefined} />
    </Section>
  )
}
