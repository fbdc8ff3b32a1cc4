"use client"

import { useState } from "react"
import { ask, detailOf } from "@/app/ui/api"
import { Button } from "@/app/ui/button"
import { Notice } from "@/app/ui/notice"

/** A button, and not the opening of the page, uses the link up: mail programs open links to look at them. */
export function AcceptForm({ token, account }: { token: string; account: string }) {
  const [busy, setBusy] = useState(false)
  const [problem, setProblem] = useState<string>()

  async function accept() {
    setBusy(true)
    try {
      const { slug } = await ask<{ slug: string }>("POST", "/api/auth/invitation", { token })
      location.assign(`/portal/${slug}`)
    } catch (error) {
      setProblem(detailOf(error))
      setBusy(false)
    }
  }

  return (
    <div className="space-y-5">
      {problem && (
        <Notice severity="danger" live>
          {problem}
        </Notice>
      )}
      <Button look="primary" busy={busy} autoFocus onClick={accept}>
        Join {account}
      </Button>
    </div>
  )
}
