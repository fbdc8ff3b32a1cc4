import { figures } from "./figures"
import { OutOfDomain } from "./out-of-domain"
import type { Quantity } from "./quantities"

/**
 * Checks every number of an input whose name is in the table of quantities against that quantity's bounds.
 *
 * Throws {@link OutOfDomain} on the first that is not finite or lies outside; `path` leads to the input where it is
 * a part of another one (`hose.`, `elements.2.`).
 */
export function checkBounds(input: object, table: Readonly<Record<string, Quantity>>, path = ""): void {
  for (const [name, value] of Object.entries(input)) {
    const quantity = table[name]
    if (quantity === undefined || typeof value !== "number") continue
    if (value >= quantity.min && value <= quantity.max) continue
    const unit = quantity.unit === "1" || quantity.unit === "pH" ? "" : ` ${quantity.unit}`
    throw new OutOfDomain(
      path + name,
      `Enter ${quantity.min} to ${quantity.max}${unit}; you gave ${said(value)}.`,
    )
  }
}

function said(value: number): string {
  return Number.isFinite(value) ? figures(value, 6) : "no number"
}
