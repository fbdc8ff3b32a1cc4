import { flowQuantities } from "./quantities-flow"
import { gasQuantities } from "./quantities-gas"
import { planQuantities } from "./quantities-plan"
import { waterQuantities } from "./quantities-water"

/** One physical quantity of the wire: the name ends in its unit. Bounds are those of a valid input. */
export interface Quantity {
  /** As people write it beside the number; "1" for a pure number. */
  readonly unit: string
  /** UCUM code, published as `x-unit`. */
  readonly ucum: string
  readonly min: number
  readonly max: number
  readonly description: string
}

/** Every quantity that the engine, the API, the widgets and the CSV files speak of, once. */
export const quantities = {
  ...waterQuantities,
  ...gasQuantities,
  ...flowQuantities,
  ...planQuantities,
} as const

export type QuantityName = keyof typeof quantities
