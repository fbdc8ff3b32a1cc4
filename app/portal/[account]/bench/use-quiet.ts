"use client"

import { useEffect, useState } from "react"

/** A value once it has stood still for a while; 0 takes it over at once. */
export function useQuiet<Value>(value: Value, quiet_ms: number): Value {
  const [settled, setSettled] = useState(value)
  useEffect(() => {
    if (Object.is(value, settled)) return
    if (quiet_ms === 0) {
      setSettled(value)
      return
    }
    const timer = setTimeout(() => setSettled(value), quiet_ms)
    return () => clearTimeout(timer)
  }, [value, settled, quiet_ms])
  return settled
}
