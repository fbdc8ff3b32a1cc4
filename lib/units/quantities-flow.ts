import type { Quantity } from "./quantities"

export const flowQuantities = {} as const satisfies Record<string, Quantity>
