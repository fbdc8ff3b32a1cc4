"use client"

import { Failed } from "@/app/ui/states"

export default function FailedPage({ reset }: { reset: () => void }) {
  return (
    <Failed
      detail="Something failed on our side; it was recorded. Your data and your keys are untouched."
      onRetry={reset}
    />
  )
}
