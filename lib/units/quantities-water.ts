import type { Quantity } from "./quantities"

/** Quantities of the water itself; bounds from the validity range of the carbonate model. */
export const waterQuantities = {
  ph: { unit: "pH", ucum: "[pH]", min: 4, max: 9.5, description: "pH at the water's own temperature" },
  kh_dkh: { unit: "dKH", ucum: "1", min: 0.1, max: 30, description: "Carbonate hardness in German degrees" },
  temperature_c: { unit: "°C", ucum: "Cel", min: 0, max: 50, description: "Water temperature" },
} as const satisfies Record<string, Quantity>
