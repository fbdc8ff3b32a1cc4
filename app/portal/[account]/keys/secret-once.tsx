"use client"

import { Button } from "@/app/ui/button"
import { CodeBlock } from "@/app/ui/code-block"
import { Notice } from "@/app/ui/notice"

/** A new key, this once. It is in the page's memory only and gone when the dialog closes. */
export function SecretOnce({ secret, onClose }: { secret: string; onClose: () => void }) {
  return (
    <div className="space-y-6">
      <CodeBlock code={secret} what="Your new key" wrap />
      <Notice severity="warning" title="This is the only time it is shown">
        We keep a digest of it, not the key. Put it where your secrets live; if it is lost, rotate it.
      </Notice>
      <Button look="primary" onClick={onClose}>
        I have stored it
      </Button>
    </div>
  )
}
