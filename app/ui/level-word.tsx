import type { Co2Level } from "@/lib/chemistry/level"

const words: Record<Co2Level, string> = {
  low: "low",
  in_range: "in range",
  high: "high",
  dangerous: "dangerous",
}

const fills: Record<Co2Level, string> = {
  low: "bg-level-low",
  in_range: "bg-level-in-range",
  high: "bg-level-high",
  dangerous: "bg-level-dangerous",
}

/** A CO2 level: bromothymol blue's colour, and always the word. */
export function LevelWord({ level }: { level: Co2Level }) {
  return (
    <span className="inline-flex items-center gap-2">
      <span aria-hidden="true" className={`size-3 border border-ink ${fills[level]}`} />
      {words[level]}
    </span>
  )
}
