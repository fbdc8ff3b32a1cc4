import type { QuantityName } from "@/lib/units/quantities"

/** A number that says what an item can do: its wire name, the quantity that it is, and whether an item needs it. */
export interface Attribute {
  readonly name: string
  readonly quantity: QuantityName
  readonly required: boolean
}

interface Kind {
  readonly label: string
  readonly attributes: readonly Attribute[]
}

const needed = (name: string, quantity: QuantityName): Attribute => ({ name, quantity, required: true })
const optional = (name: string, quantity: QuantityName): Attribute => ({ name, quantity, required: false })

/** Every kind of item with the numbers that matching reads: the schema, the CSV columns and the form come from here. */
export const itemKinds = {
  filter: {
    label: "Canister filter",
    // A filter has these two or `pump_curve`, points of its measured curve.
    attributes: [
      optional("max_flow_l_h", "max_flow_l_h"),
      optional("max_head_m", "max_head_m"),
      optional("hose_inner_diameter_mm", "inner_diameter_mm"),
    ],
  },
  reactor: {
    label: "Inline reactor",
    attributes: [
      needed("body_diameter_mm", "body_diameter_mm"),
      needed("body_length_mm", "body_length_mm"),
      optional("nozzle_diameter_mm", "nozzle_diameter_mm"),
      optional("k", "k"),
    ],
  },
  cylinder: {
    label: "Cylinder",
    attributes: [
      needed("cylinder_mass_g", "cylinder_mass_g"),
      optional("fill_ratio_kg_l", "fill_ratio_kg_l"),
      optional("test_pressure_bar", "test_pressure_bar"),
      optional("refill_price", "refill_price"),
    ],
  },
  // Also has `method`: `diffuser` stands in the tank, `inline_diffuser` in the hose.
  diffuser: { label: "Diffuser", attributes: [needed("max_volume_l", "volume_l")] },
  reducer: { label: "Pressure reducer", attributes: [] },
  solenoid: { label: "Solenoid valve", attributes: [] },
  check_valve: { label: "Check valve", attributes: [] },
  bubble_counter: { label: "Bubble counter", attributes: [] },
  controller: { label: "pH controller", attributes: [] },
  drop_checker: { label: "Drop checker", attributes: [] },
  hose: { label: "Hose", attributes: [optional("inner_diameter_mm", "inner_diameter_mm")] },
  other: { label: "Other part", attributes: [] },
} as const satisfies Record<string, Kind>

export type ItemKind = keyof typeof itemKinds
export const itemKindNames = Object.keys(itemKinds) as [ItemKind, ...ItemKind[]]

/** The attributes of a kind, as its row of the table names them. */
export function attributesOf(kind: ItemKind): readonly Attribute[] {
  return itemKinds[kind].attributes
}
