"use client"

import { useMutation, useQueryClient } from "@tanstack/react-query"
import { useRouter } from "next/navigation"
import { useState } from "react"
import { ask, detailOf } from "@/app/ui/api"
import { Button, ButtonLink } from "@/app/ui/button"
import { CopyButton } from "@/app/ui/copy-button"
import { FieldError, Input } from "@/app/ui/field"
import { Section } from "@/app/ui/sheet"
import { DeleteReport } from "../delete-report"

interface Handed {
  readonly id: string
  readonly title: string
  readonly shared_url: string | null
}

/** The ways in which a report leaves the counter: on paper, as a file, by a link, by mail. */
export function HandOver({
  account,
  report,
  manages,
}: {
  account: string
  report: Handed
  manages: boolean
}) {
  const path = `/api/portal/${account}/reports/${report.id}`
  const router = useRouter()
  const cache = useQueryClient()
  const [sharedUrl, setSharedUrl] = useState(report.shared_url)
  const [isDeleting, setDeleting] = useState(false)
  const share = useMutation({
    mutationFn: () => ask<{ url: string }>("POST", `${path}/share`, {}),
    onSuccess: ({ url }) => setSharedUrl(url),
  })
  const unshare = useMutation({
    mutationFn: () => ask("DELETE", `${path}/share`),
    onSuccess: () => setSharedUrl(null),
  })
  const problem = share.error ?? unshare.error
  return (
    <div className="print:hidden">
      <Section title="Hand it over">
        <div className="flex flex-wrap gap-3">
          <ButtonLink look="primary" href={`${path}/pdf`} prefetch={false}>
            Open as PDF
          </ButtonLink>
          <Button onClick={() => window.print()}>Print</Button>
          {manages && !sharedUrl && (
            <Button busy={share.isPending} onClick={() => share.mutate()}>
              Share by a link
            </Button>
          )}
          {manages && <Button onClick={() => setDeleting(true)}>Delete</Button>}
        </div>
        <FieldError message={problem ? detailOf(problem) : undefined} />
        {sharedUrl && (
          <div className="mt-6 max-w-measure">
            <p>Whoever has this link can read the report, without whom it is for:</p>
            <p className="mt-2 flex flex-wrap items-center gap-3">
              <a className="link font-mono text-sm break-all" href={sharedUrl}>
                {sharedUrl}
              </a>
              <CopyButton text={sharedUrl} what="the link" />
            </p>
            {manages && (
              <Button small className="mt-3" busy={unshare.isPending} onClick={() => unshare.mutate()}>
                End sharing
              </Button>
            )}
          </div>
        )}
        {manages && <SendByMail path={path} onSent={setSharedUrl} />}
      </Section>
      {isDeleting && (
        <DeleteReport
          account={account}
          report={{ ...report, shared_url: sharedUrl }}
          onClose={() => setDeleting(false)}
          onDone={() => {
            // The list was read before, and would show it still.
            cache.removeQueries({ queryKey: [account, "reports"] })
            router.push(`/portal/${account}/reports`)
          }}
        />
      )}
    </div>
  )
}

function SendByMail({ path, onSent }: { path: string; onSent: (url: string) => void }) {
  const [email, setEmail] = useState("")
  const send = useMutation({
    mutationFn: () => ask<{ url: string; email: string }>("POST", `${path}/send`, { email }),
    onSuccess: ({ url }) => onSent(url),
  })
  return (
    <form
      className="mt-6 max-w-measure"
      onSubmit={(event) => {
        event.preventDefault()
        if (!send.isPending) send.mutate()
      }}
    >
      <Input
        label="Send it by mail to"
        hint="The customer gets the answer, its dangers and the link. We keep the address for nothing else."
        type="email"
        value={email}
        autoComplete="off"
        onChange={(event) => setEmail(event.target.value)}
      />
      <FieldError message={send.error ? detailOf(send.error) : undefined} />
      <Button className="mt-4" type="submit" busy={send.isPending} disabled={email.trim() === ""}>
        Send the report
      </Button>
      <p role="status" className="mt-2 text-sm">
        {send.isSuccess && `On its way to ${send.data.email}.`}
      </p>
    </form>
  )
}
