import type { WriteNumber } from "./field"

export const languages = ["en", "de", "es", "ja"] as const
export type Language = (typeof languages)[number]

/** How a page's language is spoken here: which catalogue, and the full tag for numbers. */
export interface Locale {
  readonly language: Language
  readonly tag: string
}

/** The first of the wanted tags that we speak, English otherwise. `wanted` is in order of preference. */
export function chooseLocale(wanted: readonly (string | null | undefined)[]): Locale {
  for (const tag of wanted) {
    if (!tag) continue
    const language = languages.find((each) => each === tag.toLowerCase().split("-")[0])
    if (language && isTag(tag)) return { language, tag }
  }
  return { language: "en", tag: "en" }
}

/** A number with so many significant digits, as the locale writes it. */
export function significant(value: number, digits: number, { tag }: Locale): string {
  return new Intl.NumberFormat(tag, { maximumSignificantDigits: digits, useGrouping: false }).format(value)
}

/** A number with exactly so many decimals, as the locale writes it. */
export function fixed(value: number, decimals: number, { tag }: Locale): string {
  const options = { minimumFractionDigits: decimals, maximumFractionDigits: decimals, useGrouping: false }
  return new Intl.NumberFormat(tag, options).format(value)
}

/** How a field's numbers are written in the locale. */
export function numberWriter({ tag }: Locale): WriteNumber {
  return (value, decimals) =>
    new Intl.NumberFormat(tag, { maximumFractionDigits: decimals, useGrouping: false }).format(value)
}

function isTag(tag: string): boolean {
  try {
    return Intl.getCanonicalLocales(tag).length > 0
  } catch {
    return false
  }
}
