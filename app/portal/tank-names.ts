import type { Co2Level } from "@/lib/chemistry/level"
import type { Verdict } from "@/lib/flow/reactor-criteria"
import type { GasMethodName } from "@/lib/gas/methods"

export const levelWords: Record<Co2Level, string> = {
  low: "low",
  in_range: "in range",
  high: "high",
  dangerous: "dangerous",
}

export const methodWords: Record<GasMethodName, string> = {
  inline_reactor: "inline reactor",
  diffuser: "diffuser",
  inline_diffuser: "inline diffuser",
}

export const verdictWords: Record<Verdict, string> = {
  suitable: "suitable",
  marginal: "marginal",
  unsuitable: "unsuitable",
}
