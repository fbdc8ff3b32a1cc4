"use client"

import { type ComponentProps, useState } from "react"
import { Button } from "./button"
import { Input } from "./field"

/** A password that one may look at while typing it. */
export function PasswordInput(props: ComponentProps<typeof Input>) {
  const [shown, setShown] = useState(false)
  return (
    <Input
      {...props}
      type={shown ? "text" : "password"}
      spellCheck={false}
      autoCapitalize="none"
      trailing={
        <Button look="quiet" small aria-pressed={shown} onClick={() => setShown(!shown)}>
          {shown ? "Hide" : "Show"}
          <span className="sr-only"> password</span>
        </Button>
      }
    />
  )
}
