"use client"

import { type ReactNode, useEffect, useRef } from "react"
import { Button } from "@/app/ui/button"

/** Stands where the form was: a letter is under way, if the address is right. */
export function LetterSent({
  to,
  onBack,
  children,
}: {
  to: string
  onBack: () => void
  children: ReactNode
}) {
  const heading = useRef<HTMLHeadingElement>(null)
  useEffect(() => heading.current?.focus(), [])
  return (
    <section className="border-y border-line py-6">
      <h2 ref={heading} tabIndex={-1} className="text-lg">
        Look into your mailbox
      </h2>
      <p className="mt-2">
        We wrote to <strong className="font-semibold break-all">{to}</strong>. {children}
      </p>
      <p className="mt-3 text-sm text-soft">
        Nothing there after a minute? Look among the junk, or{" "}
        <Button look="quiet" small className="-mx-1 min-h-0 px-1 underline" onClick={onBack}>
          check the address
        </Button>
        .
      </p>
    </section>
  )
}
