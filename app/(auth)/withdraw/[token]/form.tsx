"use client"

import { useState } from "react"
import { ask } from "@/app/ui/api"
import { Button } from "@/app/ui/button"
import { Notice } from "@/app/ui/notice"
import type { Language } from "@/lib/mail"
import { words } from "../words"

/** Asks by a button, since a mail program may open every link in a mail by itself. */
export function WithdrawForm({ token, shop, language }: { token: string; shop: string; language: Language }) {
  const [state, setState] = useState<"asked" | "busy" | "gone" | "failed">("asked")
  const { withdraw, gone, failed } = words[language]

  async function submit() {
    setState("busy")
    await ask("POST", "/api/withdraw", { token }).then(
      () => setState("gone"),
      () => setState("failed"),
    )
  }

  if (state === "gone") {
    return (
      <p role="status" className="mt-6 border-l-2 border-action py-1 pl-4">
        {gone(shop)}
      </p>
    )
  }
  return (
    <div className="mt-8 space-y-6">
      {state === "failed" && (
        <Notice severity="danger" live>
          {failed}
        </Notice>
      )}
      <Button look="danger" busy={state === "busy"} onClick={submit}>
        {withdraw}
      </Button>
    </div>
  )
}
