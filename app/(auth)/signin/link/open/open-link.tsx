"use client"

import { signIn } from "next-auth/react"
import { useState } from "react"
import { Button } from "@/app/ui/button"
import { Notice } from "@/app/ui/notice"
import { CodeForm } from "../../../code-form"
import { type Outcome, wordsFor } from "../../../outcome"

/** A button, and not the opening of the page, uses the link up: mail programs open links to look at them. */
export function OpenLink({ token }: { token: string }) {
  const [busy, setBusy] = useState(false)
  const [problem, setProblem] = useState<string>()
  const [needsCode, setNeedsCode] = useState(false)

  async function open(code?: string): Promise<Outcome> {
    const outcome = await signIn("link", { token, ...(code && { code }), redirect: false }).catch(
      () => undefined,
    )
    if (outcome?.ok) {
      location.assign("/portal")
      await new Promise(() => {})
    }
    return outcome
  }

  async function press() {
    setBusy(true)
    const outcome = await open()
    setBusy(false)
    if (outcome?.error === "second_factor_required") setNeedsCode(true)
    else setProblem(wordsFor(outcome))
  }

  if (needsCode) return <CodeForm onCode={async (code) => wordsFor(await open(code))} />
  return (
    <div className="space-y-5">
      {problem && (
        <Notice severity="danger" live>
          {problem}
        </Notice>
      )}
      <Button look="primary" busy={busy} autoFocus onClick={press}>
        Sign in
      </Button>
    </div>
  )
}
