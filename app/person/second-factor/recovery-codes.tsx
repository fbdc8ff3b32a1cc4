"use client"

import { useEffect, useRef } from "react"
import { Button } from "@/app/ui/button"
import { CodeBlock } from "@/app/ui/code-block"
import { Notice } from "@/app/ui/notice"

/** The recovery codes, this once. They are in the page's memory only and gone when it is left. */
export function RecoveryCodes({ codes, onDone }: { codes: string[]; onDone: () => void }) {
  const heading = useRef<HTMLHeadingElement>(null)
  useEffect(() => heading.current?.focus(), [])

  function download() {
    const text = `Tarnwright recovery codes. Each works once, in place of a code of the app.\n\n${codes.join("\n")}\n`
    const link = document.createElement("a")
    link.href = URL.createObjectURL(new Blob([text], { type: "text/plain;charset=utf-8" }))
    link.download = "tarnwright-recovery-codes.txt"
    link.click()
    URL.revokeObjectURL(link.href)
  }

  return (
    <div className="max-w-xl space-y-6">
      <h2 ref={heading} tabIndex={-1} className="text-xl">
        Your recovery codes
      </h2>
      <p className="max-w-measure">
        Each signs you in once when the phone is lost. Keep them where the phone is not: printed, or in a
        safe.
      </p>
      <CodeBlock code={codes.join("\n")} what="Ten recovery codes" />
      <Notice severity="warning" title="This is the only time they are shown">
        We keep digests of them, not the codes. You can make new ones at any time.
      </Notice>
      <div className="flex flex-wrap gap-3">
        <Button look="primary" onClick={onDone}>
          I have stored them
        </Button>
        <Button onClick={download}>Download</Button>
      </div>
    </div>
  )
}
