import { ALKALINITY_MOL_L_PER_DKH, CACO3_MG_L_PER_DKH, HARDNESS_MOL_L_PER_DGH } from "./chemistry"

/**
 * A way to write a quantity that the engine does not compute in: shown value = engine value · factor + offset.
 * Factors without a source are exact by the definition of the unit (international yard and pound, US liquid gallon).
 */
interface Unit {
  /** The engine's unit for this dimension, as in the names of quantities. */
  readonly base: BaseUnit
  readonly symbol: string
  readonly factor: number
  readonly offset?: number
}

export type BaseUnit =
  | "°C"
  | "dKH"
  | "dGH"
  | "mg/L"
  | "ppm"
  | "µatm"
  | "L"
  | "L/h"
  | "m"
  | "cm"
  | "mm"
  | "m²"
  | "m³"
  | "bar"
  | "g"
  | "g/day"
  | "mL/min"

const FOOT_M = 0.3048
const INCH_MM = 25.4
const GALLON_L = 3.785411784
const POUND_G = 453.59237
const PSI_BAR = 0.0689475729316836

export const units = {
  c: { base: "°C", symbol: "°C", factor: 1 },
  f: { base: "°C", symbol: "°F", factor: 1.8, offset: 32 },
  dkh: { base: "dKH", symbol: "dKH", factor: 1 },
  kh_ppm_caco3: { base: "dKH", symbol: "ppm CaCO3", factor: CACO3_MG_L_PER_DKH },
  kh_meq_l: { base: "dKH", symbol: "meq/L", factor: 1000 * ALKALINITY_MOL_L_PER_DKH },
  kh_mmol_l_caco3: { base: "dKH", symbol: "mmol/L CaCO3", factor: 500 * ALKALINITY_MOL_L_PER_DKH },
  kh_fh: { base: "dKH", symbol: "°fH", factor: CACO3_MG_L_PER_DKH / 10 },
  // One grain of CaCO3 in an imperial gallon, 64.79891 mg in 4.54609 L.
  kh_clark: { base: "dKH", symbol: "°e", factor: CACO3_MG_L_PER_DKH / (64.79891 / 4.54609) },
  dgh: { base: "dGH", symbol: "dGH", factor: 1 },
  gh_ppm_caco3: { base: "dGH", symbol: "ppm CaCO3", factor: CACO3_MG_L_PER_DKH },
  gh_mmol_l: { base: "dGH", symbol: "mmol/L", factor: 1000 * HARDNESS_MOL_L_PER_DGH },
  gh_fh: { base: "dGH", symbol: "°fH", factor: CACO3_MG_L_PER_DKH / 10 },
  mg_l: { base: "mg/L", symbol: "mg/L", factor: 1 },
  // Fresh water weighs 1 kg/L within 0.5 %, so the trade writes ppm for mg/L.
  ppm_mass: { base: "mg/L", symbol: "ppm", factor: 1 },
  l: { base: "L", symbol: "L", factor: 1 },
  gal_us: { base: "L", symbol: "gal", factor: 1 / GALLON_L },
  l_h: { base: "L/h", symbol: "L/h", factor: 1 },
  gph: { base: "L/h", symbol: "gph", factor: 1 / GALLON_L },
  m: { base: "m", symbol: "m", factor: 1 },
  ft: { base: "m", symbol: "ft", factor: 1 / FOOT_M },
  cm: { base: "cm", symbol: "cm", factor: 1 },
  in_of_cm: { base: "cm", symbol: "in", factor: 10 / INCH_MM },
  mm: { base: "mm", symbol: "mm", factor: 1 },
  in: { base: "mm", symbol: "in", factor: 1 / INCH_MM },
  m2: { base: "m²", symbol: "m²", factor: 1 },
  ft2: { base: "m²", symbol: "ft²", factor: 1 / FOOT_M ** 2 },
  m3: { base: "m³", symbol: "m³", factor: 1 },
  ft3: { base: "m³", symbol: "ft³", factor: 1 / FOOT_M ** 3 },
  bar: { base: "bar", symbol: "bar", factor: 1 },
  psi: { base: "bar", symbol: "psi", factor: 1 / PSI_BAR },
  g: { base: "g", symbol: "g", factor: 1 },
  oz: { base: "g", symbol: "oz", factor: 16 / POUND_G },
  lb: { base: "g", symbol: "lb", factor: 1 / POUND_G },
  g_day: { base: "g/day", symbol: "g/day", factor: 1 },
  oz_day: { base: "g/day", symbol: "oz/day", factor: 16 / POUND_G },
  ml_min: { base: "mL/min", symbol: "mL/min", factor: 1 },
} as const satisfies Record<string, Unit>

export type UnitId = keyof typeof units

/** A value in the engine's unit, in another unit of the same dimension. */
export function fromBase(value: number, unit: UnitId): number {
  const { factor, offset = 0 }: Unit = units[unit]
  return value * factor + offset
}

/** The inverse of {@link fromBase}: what a person typed, in the engine's unit. */
export function toBase(value: number, unit: UnitId): number {
  const { factor, offset = 0 }: Unit = units[unit]
  return (value - offset) / factor
}

/** A difference (an error, a step) in the engine's unit: the offset of a temperature scale drops out. */
export function differenceToBase(value: number, unit: UnitId): number {
  return value / units[unit].factor
}

export function differenceFromBase(value: number, unit: UnitId): number {
  return value * units[unit].factor
}

export type UnitSystem = "metric" | "us"

/** How a system of units writes each engine unit. Units that it does not name stay as they are. */
export const systems: Readonly<Record<UnitSystem, Readonly<Partial<Record<BaseUnit, UnitId>>>>> = {
  metric: {},
  us: {
    "°C": "f",
    L: "gal_us",
    "L/h": "gph",
    m: "ft",
    cm: "in_of_cm",
    mm: "in",
    "m²": "ft2",
    "m³": "ft3",
    bar: "psi",
    g: "lb",
    "g/day": "oz_day",
  },
}
