import type { wholeCatalog } from "@/app/portal/whole-catalog"
import type { ItemKind } from "@/lib/catalog"

export type Part = Awaited<ReturnType<typeof wholeCatalog>>[number]

export interface AttributeInfo {
  readonly name: string
  readonly required: boolean
  readonly unit: string
  readonly min: number
  readonly max: number
}

/** A kind of part with the numbers that it has, as the server's table of kinds says. */
export interface KindInfo {
  readonly name: ItemKind
  readonly label: string
  readonly attributes: readonly AttributeInfo[]
}

const words: Record<string, string> = {
  max_flow_l_h: "Flow at no head",
  max_head_m: "Head at no flow",
  hose_inner_diameter_mm: "Hose bore",
  body_diameter_mm: "Body diameter",
  body_length_mm: "Body length",
  nozzle_diameter_mm: "Nozzle bore",
  k: "Loss coefficient K",
  cylinder_mass_g: "CO2 when full",
  fill_ratio_kg_l: "Fill ratio",
  test_pressure_bar: "Test pressure",
  refill_price: "Refill price",
  max_volume_l: "Tank up to",
  inner_diameter_mm: "Bore",
}

export function attributeLabel(name: string): string {
  return words[name] ?? name
}

/** The unit to show beside a number; none for a plain ratio. */
export function attributeUnit({ unit }: AttributeInfo): string {
  return unit === "1" || unit === "currency" ? "" : unit
}
