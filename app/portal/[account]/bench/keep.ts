import { type BenchUnits, isBenchUnits, metricUnits } from "./bench-units"
import { type BenchForm, startForm } from "./fields"
import { type Exact, inUnits, type Sheet, startSheet } from "./sheet"

const unitsKey = "tarnwright.units"
const sheetKey = (account: string) => `tarnwright.bench.${account}`

/** The units chosen on this device. */
export function keptUnits(): BenchUnits {
  const kept = read(localStorage, unitsKey)
  return isBenchUnits(kept) ? kept : metricUnits
}

/** Remembers the units for every customer, on this device. */
export function keepUnits(units: BenchUnits): void {
  write(localStorage, unitsKey, units)
}

/** The customer of this tab, as left when the page was closed or loaded anew; else a new one. */
export function keptSheet(account: string): Sheet {
  const units = keptUnits()
  const kept = read(sessionStorage, sheetKey(account))
  return isSheet(kept) ? inUnits({ ...kept, form: { ...startForm, ...kept.form } }, units) : startSheet(units)
}

/** Remembers what is typed until the tab is closed: a customer's tank does not outlive the talk. */
export function keepSheet(account: string, sheet: Sheet): void {
  write(sessionStorage, sheetKey(account), sheet)
}

function isSheet(value: unknown): value is { form: BenchForm; exact: Exact; units: BenchUnits } {
  if (typeof value !== "object" || value === null) return false
  const { form, exact, units } = value as Record<string, unknown>
  const texts = typeof form === "object" && form !== null ? Object.values(form) : [undefined]
  return isBenchUnits(units) && typeof exact === "object" && texts.every((text) => typeof text === "string")
}

// A browser may refuse to keep anything; the Bench then works and forgets.
function read(storage: Storage, key: string): unknown {
  try {
    return JSON.parse(storage.getItem(key) ?? "null")
  } catch {
    return null
  }
}

function write(storage: Storage, key: string, value: unknown): void {
  try {
    storage.setItem(key, JSON.stringify(value))
  } catch {
    // Full or refused.
  }
}
