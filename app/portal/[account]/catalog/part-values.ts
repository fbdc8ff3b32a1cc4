import { type AttributeInfo, attributeUnit, type Part } from "./kind-info"

/** What a typed text means, or what is wrong with it and how to mend it. */
export type Read<Value> = { readonly value: Value } | { readonly problem: string }

export type Price = Part["price"]

export function priceText(price: Price): string {
  return price ? `${(price.amount_minor / 100).toFixed(2)} ${price.currency}` : ""
}

/** Reads "189", "189.50" or "189.50 EUR"; nothing is no price. Without a currency it keeps the one that it had. */
export function readPrice(text: string, currency = "USD"): Read<Price> {
  const typed = text.trim()
  if (typed === "") return { value: null }
  const found = /^(\d{1,6}(?:\.\d{1,2})?)(?:\s*([A-Za-z]{3}))?$/.exec(typed)
  if (!found) {
    return {
      problem: `“${typed.slice(0, 30)}” is no price. Write it with a decimal point and, if you like, the currency: 189.00 USD.`,
    }
  }
  const [, amount, code] = found
  return {
    value: { amount_minor: Math.round(Number(amount) * 100), currency: (code ?? currency).toUpperCase() },
  }
}

/** Reads a number of a part; nothing is no number, which some parts may not have. */
export function readAttribute(text: string, info: AttributeInfo): Read<number | undefined> {
  const typed = text.trim()
  if (typed === "") {
    return info.required
      ? { problem: "This number is needed: nothing could be matched without it." }
      : { value: undefined }
  }
  const value = Number(typed)
  const unit = attributeUnit(info)
  if (!Number.isFinite(value)) {
    return { problem: `“${typed.slice(0, 30)}” is no number. Write it with a decimal point and no unit.` }
  }
  if (value < info.min || value > info.max) {
    return { problem: `Write ${info.min} to ${info.max}${unit && ` ${unit}`}.` }
  }
  return { value }
}

export function readUrl(text: string): Read<string | null> {
  const typed = text.trim()
  if (typed === "") return { value: null }
  return /^https:\/\/[^\s/]+\.[^\s]+$/.test(typed)
    ? { value: typed }
    : { problem: "Write the whole address, as https://shop.example/part." }
}

export function readName(text: string): Read<string> {
  const typed = text.trim()
  if (typed === "") return { problem: "A part needs a name." }
  return typed.length > 160 ? { problem: "Use at most 160 characters." } : { value: typed }
}

export function readSku(text: string): Read<string | null> {
  const typed = text.trim()
  return typed.length > 80 ? { problem: "Use at most 80 characters." } : { value: typed || null }
}
