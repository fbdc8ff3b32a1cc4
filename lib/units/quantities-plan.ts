import type { Quantity } from "./quantities"

/** Quantities that only the plan of a whole system speaks of. */
export const planQuantities = {
  substrate_depth_cm: { unit: "cm", ucum: "cm", min: 0, max: 40, description: "Depth of soil or gravel" },
  substrate_l: { unit: "L", ucum: "L", min: 0, max: 2000, description: "Soil or gravel as poured" },
  hardscape_l: { unit: "L", ucum: "L", min: 0, max: 2000, description: "Stones and wood under water" },
} as const satisfies Record<string, Quantity>
