/** The languages in which a shopper is written to; the widgets speak the same. */
export const languages = ["en", "de", "es", "ja"] as const

export type Language = (typeof languages)[number]
