"use client"

import { signIn } from "next-auth/react"
import { useState } from "react"
import { Button } from "@/app/ui/button"
import { Notice } from "@/app/ui/notice"

/** A button, and not the opening of the page, uses the link up: mail programs open links to look at them. */
export function VerifyForm({ token }: { token: string }) {
  const [busy, setBusy] = useState(false)
  const [problem, setProblem] = useState<string>()

  async function confirm() {
    setBusy(true)
    const outcome = await signIn("verify", { token, redirect: false }).catch(() => undefined)
    if (outcome?.ok) {
      location.assign("/portal")
      return
    }
    setProblem(outcome?.error ?? "We could not be reached. Check your connection and try again.")
    setBusy(false)
  }

  return (
    <div className="space-y-5">
      {problem && (
        <Notice severity="danger" live>
          {problem}
        </Notice>
      )}
      <Button look="primary" busy={busy} autoFocus onClick={confirm}>
        Confirm and open the portal
      </Button>
    </div>
  )
}
