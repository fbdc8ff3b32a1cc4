"use client"

import { type RefObject, useEffect, useRef, useState } from "react"

/** The width of an element in CSS pixels, for a drawing that keeps its text at its size. */
export function useWidth(first: number): [RefObject<HTMLDivElement | null>, number] {
  const element = useRef<HTMLDivElement>(null)
  const [width, setWidth] = useState(first)
  useEffect(() => {
    if (!element.current) return
    const observer = new ResizeObserver(([entry]) => entry && setWidth(Math.round(entry.contentRect.width)))
    observer.observe(element.current)
    return () => observer.disconnect()
  }, [])
  return [element, width]
}
