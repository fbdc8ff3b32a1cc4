import { levelWords, methodWords, verdictWords } from "@/app/portal/tank-names"
import type { Tank } from "@/lib/insights"
import type { Language } from "@/lib/mail"

export const languageNames: Record<Language, string> = {
  en: "English",
  de: "German",
  es: "Spanish",
  ja: "Japanese",
}

/** The figures of a tank, each with its name and its unit. */
export function tankFacts(tank: Tank | null): [name: string, value: string][] {
  if (!tank) return []
  const { volume_l, ph, kh_dkh, temperature_c, method, level, verdict } = tank
  const facts: [string, string | undefined][] = [
    ["Volume", figure(volume_l, "L")],
    ["pH", figure(ph, "")],
    ["KH", figure(kh_dkh, "dKH")],
    ["Temperature", figure(temperature_c, "°C")],
    ["CO2 level", level && levelWords[level]],
    ["Method", method && methodWords[method]],
    ["Reactor", verdict && verdictWords[verdict]],
  ]
  return facts.filter((fact): fact is [string, string] => fact[1] !== undefined)
}

/** The same on one line, as much as a table holds. */
export function tankLine(tank: Tank | null): string {
  if (!tank) return ""
  const { volume_l, ph, kh_dkh, level } = tank
  return [
    figure(volume_l, "L"),
    ph === undefined ? undefined : `pH ${ph}`,
    figure(kh_dkh, "dKH"),
    level && levelWords[level],
  ]
    .filter(Boolean)
    .join(", ")
}

function figure(value: number | undefined, unit: string): string | undefined {
  if (value === undefined) return undefined
  return `${value.toLocaleString("en", { maximumSignificantDigits: 4 })} ${unit}`.trim()
}
