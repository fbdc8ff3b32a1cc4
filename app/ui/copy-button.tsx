"use client"

import { useState } from "react"
import { Button } from "./button"
import { CopyMark, TickMark } from "./marks"

/** Copies a text and says so; where the browser forbids it, says that instead. */
export function CopyButton({ text, what }: { text: string; what: string }) {
  const [state, setState] = useState<"idle" | "copied" | "refused">("idle")

  async function copy() {
    const outcome = await navigator.clipboard?.writeText(text).then(
      () => "copied" as const,
      () => "refused" as const,
    )
    setState(outcome ?? "refused")
    setTimeout(() => setState("idle"), 2_500)
  }

  return (
    <>
      <Button small onClick={copy}>
        {state === "copied" ? <TickMark /> : <CopyMark />}
        {state === "copied" ? "Copied" : "Copy"}
        <span className="sr-only"> {what}</span>
      </Button>
      <span role="status" className="sr-only">
        {state === "copied" && `${what} copied`}
        {state === "refused" && "Your browser does not let us copy: select the text and copy it yourself."}
      </span>
    </>
  )
}
