"use client"

import { signOut } from "next-auth/react"
import { useState } from "react"
import { Button, ButtonLink } from "@/app/ui/button"
import { Notice } from "@/app/ui/notice"

/** Someone else is signed in in this browser: they cannot accept in another's place. */
export function OtherPerson({ signedInAs, invited }: { signedInAs: string; invited: string }) {
  const [busy, setBusy] = useState(false)

  async function leave() {
    setBusy(true)
    await signOut({ redirect: false })
    location.reload()
  }

  return (
    <div className="space-y-5">
      <Notice severity="warning" title="You are signed in as someone else">
        <span className="break-all">{signedInAs}</span> cannot accept this: it was written to{" "}
        <span className="break-all">{invited}</span>.
      </Notice>
      <div className="flex flex-wrap gap-3">
        <Button look="primary" busy={busy} onClick={leave}>
          Sign out and go on
        </Button>
        <ButtonLink href="/portal">To your accounts</ButtonLink>
      </div>
    </div>
  )
}
