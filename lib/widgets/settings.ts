import { z } from "zod"
import { type FieldError, TarnwrightError } from "@/lib/errors"
import { originMatches } from "@/lib/keys"
import { type QuantityName, quantities } from "@/lib/units/quantities"

/** What a retailer decides about a widget. Text and a link, never HTML: PLATFORM 4.17. */
export const widgetSettings = z.strictObject({
  /** `page` follows the page's own language and colour scheme. */
  language: z.enum(["page", "en", "de", "es", "ja"]).default("page"),
  theme: z.enum(["page", "light", "dark"]).default("page"),
  kh_unit: z.enum(["dkh", "kh_ppm_caco3", "kh_meq_l"]).default("dkh"),
  temperature_unit: z.enum(["c", "f"]).default("c"),
  /** What the fields hold before the shopper touches them, by the name of the quantity. */
  start: z
    .record(z.string(), z.number())
    .superRefine((start, check) => {
      for (const [name, value] of Object.entries(start)) {
        const detail = unfit(name, value)
        if (detail) check.addIssue({ code: "custom", path: [name], message: detail })
      }
    })
    .default({}),
  /** Where a shopper finds the shop's own advice. On one of the widget's origins. */
  link: z
    .union([z.strictObject({ label: z.string().trim().min(1).max(80), url: z.url().max(500) }), z.null()])
    .default(null),
  /** The part by which a shopper asks the shop, with the page that says how it treats their data; null: without it. */
  enquiries: z.union([z.strictObject({ privacy_url: z.url().max(500) }), z.null()]).default(null),
  /** Whether the widget tells what tanks it was asked about, with no person in it. */
  statistics: z.boolean().default(true),
})

export type WidgetSettings = z.output<typeof widgetSettings>

/**
 * The settings with what they leave out filled in.
 *
 * @throws TarnwrightError `validation_failed`, with pointers into the settings, when one is malformed or a link
 * leads away from the widget's own origins.
 */
export function parseSettings(settings: unknown, origins: readonly string[]): WidgetSettings {
  const outcome = widgetSettings.safeParse(settings)
  if (!outcome.success) {
    throw refusal(
      outcome.error.issues.map(({ path, message }) => ({
        pointer: `/settings${path.map((part) => `/${String(part)}`).join("")}`,
        detail: message,
      })),
    )
  }
  const { link, enquiries } = outcome.data
  const links = { link: link?.url, enquiries: enquiries?.privacy_url }
  const strays = Object.entries(links).flatMap(([name, url]) => {
    if (!url || originMatches(new URL(url).origin, origins)) return []
    const pointer = name === "link" ? "/settings/link/url" : "/settings/enquiries/privacy_url"
    return [{ pointer, detail: "The link must lead to one of the widget's own origins." }]
  })
  if (strays.length > 0) throw refusal(strays)
  return outcome.data
}

function refusal(errors: FieldError[]): TarnwrightError {
  return new TarnwrightError("validation_failed", "The widget's settings are not valid.", { errors })
}

function unfit(name: string, value: number): string | undefined {
  if (!Object.hasOwn(quantities, name)) return "There is no such quantity."
  const { min, max, unit } = quantities[name as QuantityName]
  return value < min || value > max ? `Choose a value from ${min} to ${max} ${unit}.` : undefined
}
