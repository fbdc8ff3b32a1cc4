import { surfaceTension } from "@/lib/chemistry/water"

/** How the gas gets into the water. */
export interface GasMethod {
  /** With its article, as it stands in a sentence. */
  readonly label: string
  /** Share of the gas that dissolves: usual, low, high. */
  readonly efficiency: { readonly usual: number; readonly low: number; readonly high: number }
  /** Pressure that the element itself asks for, bar: usual, low, high. */
  readonly element_bar: { readonly usual: number; readonly low: number; readonly high: number }
}

/** Pressure that opens a water-filled pore of 1 µm at 25 °C, bar: 2.88. @source youngLaplace, 4σ/d */
export const PORE_BAR_UM = 40 * surfaceTension(25)

/**
 * The methods, a row each.
 *
 * Efficiencies: that of the reactor from the dissolution of its bubbles (it only loses what is carried over or bled);
 * those of the diffusers are engineering judgement around `risingBubbleEfficiency`. Pressures: a reactor works against
 * the water of the loop, 0.1 to 0.2 bar; ceramic and membranes against the bubble point of pores of 5 to 1.5 µm,
 * usually 2 µm, the inline one against the loop as well.
 */
export const gasMethods = {
  inline_reactor: {
    label: "an inline reactor",
    efficiency: { usual: 1, low: 0.97, high: 1 },
    element_bar: { usual: 0.15, low: 0.1, high: 0.2 },
  },
  diffuser: {
    label: "a diffuser in the tank",
    efficiency: { usual: 0.65, low: 0.5, high: 0.8 },
    element_bar: { usual: PORE_BAR_UM / 2, low: PORE_BAR_UM / 5, high: PORE_BAR_UM / 1.5 },
  },
  inline_diffuser: {
    label: "an inline diffuser",
    efficiency: { usual: 0.8, low: 0.6, high: 0.95 },
    element_bar: { usual: PORE_BAR_UM / 2 + 0.15, low: PORE_BAR_UM / 5 + 0.1, high: PORE_BAR_UM / 1.5 + 0.2 },
  },
} as const satisfies Record<string, GasMethod>

export type GasMethodName = keyof typeof gasMethods
