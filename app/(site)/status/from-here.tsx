"use client"

import { useEffect, useState } from "react"

const tries = 5

/** Whether the API answers the visitor's own browser, and how fast at the median. */
export function FromHere() {
  const [took_ms, setTook] = useState<number | "none">()
  useEffect(() => {
    let gone = false
    probe().then((median) => !gone && setTook(median))
    return () => {
      gone = true
    }
  }, [])
  return (
    <p aria-live="polite">
      {took_ms === undefined && "Asking …"}
      {took_ms === "none" && <span className="text-danger">The API did not answer your browser.</span>}
      {typeof took_ms === "number" && (
        <>
          <span className="text-action">The API answers</span>, in the median after{" "}
          <span className="font-mono">{took_ms.toFixed(0)}</span> ms.
        </>
      )}
    </p>
  )
}

async function probe(): Promise<number | "none"> {
  const times: number[] = []
  for (let attempt = 0; attempt < tries; attempt++) {
    const begin = performance.now()
    const response = await fetch("/api/v1/health", { cache: "no-store" }).catch(() => undefined)
    if (!response?.ok) return "none"
    times.push(performance.now() - begin)
  }
  return times.sort((a, b) => a - b)[Math.floor(tries / 2)] ?? "none"
}
