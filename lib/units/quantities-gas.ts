import type { Quantity } from "./quantities"

export const gasQuantities = {} as const satisfies Record<string, Quantity>
