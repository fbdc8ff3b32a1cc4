import { z } from "zod"
import { type QuantityName, quantities } from "@/lib/units/quantities"

/** Schema of an input: a finite number within the quantity's bounds, with its unit in the document. */
export function quantity(name: QuantityName) {
  const { unit, ucum, min, max, description } = quantities[name]
  return z
    .number()
    .min(min)
    .max(max)
    .meta({ description: describe(description, unit), "x-unit": ucum })
}

/** Schema of a result: the same unit and words, without bounds, since a result may lie anywhere. */
export function figure(name: QuantityName) {
  const { unit, ucum, description } = quantities[name]
  return z.number().meta({ description: describe(description, unit), "x-unit": ucum })
}

/** Schema of a result that may have no number; the answer says why. */
export function figureOrNull(name: QuantityName) {
  return z.union([figure(name), z.null()])
}

function describe(description: string, unit: string): string {
  return unit === "1" ? description : `${description}, in ${unit}`
}
