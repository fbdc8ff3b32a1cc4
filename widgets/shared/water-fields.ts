import { waterQuantities } from "@/lib/units/quantities-water"
import type { FieldKind } from "./field"

/** Fields of the water itself. Sliders span what planted tanks are; the number beside takes all that is valid. */
export const waterFields = {
  ph: {
    ...boundsOf("ph"),
    units: [{ id: null, from: 5.5, to: 8.5, step: 0.05, decimals: 2 }],
  },
  kh_dkh: {
    ...boundsOf("kh_dkh"),
    units: [
      { id: "dkh", from: 0.5, to: 20, step: 0.5, decimals: 2 },
      { id: "kh_ppm_caco3", from: 10, to: 360, step: 5, decimals: 0 },
      { id: "kh_meq_l", from: 0.2, to: 7, step: 0.1, decimals: 2 },
    ],
  },
  temperature_c: {
    ...boundsOf("temperature_c"),
    units: [
      { id: "c", from: 15, to: 35, step: 0.5, decimals: 1 },
      { id: "f", from: 59, to: 95, step: 1, decimals: 1 },
    ],
  },
} as const satisfies Record<string, FieldKind>

function boundsOf(name: "ph" | "kh_dkh" | "temperature_c") {
  const { min, max } = waterQuantities[name]
  return { min, max }
}
