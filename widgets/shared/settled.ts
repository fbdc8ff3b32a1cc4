import { useEffect, useRef, useState } from "react"

/** A change is announced when nothing has changed for this long. @source PLATFORM 4.10 */
const quiet_ms = 500
/** And never more often than this. */
const apart_ms = 1_000

/** The value as it was when it last came to rest: for a live region, so that a moving slider is not read out. */
export function useSettled<T>(value: T): T {
  const [settled, setSettled] = useState(value)
  const announced_at = useRef(Number.NEGATIVE_INFINITY)

  useEffect(() => {
    if (Object.is(value, settled)) return
    const wait_ms = Math.max(quiet_ms, announced_at.current + apart_ms - performance.now())
    const timer = setTimeout(() => {
      announced_at.current = performance.now()
      setSettled(value)
    }, wait_ms)
    return () => clearTimeout(timer)
  }, [value, settled])

  return settled
}
