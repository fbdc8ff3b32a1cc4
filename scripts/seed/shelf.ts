import { createItem, listItems, type NewItem } from "@/lib/catalog"
import type { Ctx } from "@/lib/context"

type Part = Omit<NewItem, "currency" | "url"> & { readonly price: number }

/** A pump's curve as its maker would print it: head in m at shares of its greatest flow, a little below a parabola. */
function curve(max_flow_l_h: number, max_head_m: number) {
  const shape = [1, 0.94, 0.82, 0.63, 0.36, 0]
  return shape.map((share, step) => ({
    flow_l_h: Math.round((max_flow_l_h * step) / (shape.length - 1)),
    head_m: Number((max_head_m * share).toFixed(2)),
  }))
}

/** The shelf of the demo shop: every name is invented. */
const shelf: readonly Part[] = [
  {
    kind: "filter",
    name: "Fernhollow Rill 350",
    sku: "FH-F-0350",
    price: 79,
    attributes: { pump_curve: curve(350, 0.75), hose_inner_diameter_mm: 12 },
  },
  {
    kind: "filter",
    name: "Fernhollow Rill 700",
    sku: "FH-F-0700",
    price: 119,
    attributes: { pump_curve: curve(700, 1.2), hose_inner_diameter_mm: 12 },
  },
  {
    kind: "filter",
    name: "Fernhollow Beck 1100",
    sku: "FH-F-1100",
    price: 189,
    attributes: { pump_curve: curve(1100, 1.7), hose_inner_diameter_mm: 16 },
  },
  {
    kind: "filter",
    name: "Fernhollow Beck 1500",
    sku: "FH-F-1500",
    price: 249,
    attributes: { pump_curve: curve(1500, 2.2), hose_inner_diameter_mm: 16 },
  },
  {
    kind: "filter",
    name: "Fernhollow Weir 2400",
    sku: "FH-F-2400",
    price: 379,
    attributes: { max_flow_l_h: 2400, max_head_m: 3, hose_inner_diameter_mm: 19 },
  },
  {
    kind: "reactor",
    name: "Quillback Column 50",
    sku: "QB-R-50",
    price: 89,
    attributes: { body_diameter_mm: 50, body_length_mm: 350 },
  },
  {
    kind: "reactor",
    name: "Quillback Column 75",
    sku: "QB-R-75",
    price: 129,
    attributes: { body_diameter_mm: 75, body_length_mm: 420 },
  },
  {
    kind: "reactor",
    name: "Quillback Column 100",
    sku: "QB-R-100",
    price: 179,
    attributes: { body_diameter_mm: 100, body_length_mm: 600 },
  },
  {
    kind: "diffuser",
    name: "Fernhollow Mist 60",
    sku: "FH-D-060",
    price: 19,
    attributes: { method: "diffuser", max_volume_l: 60 },
  },
  {
    kind: "diffuser",
    name: "Fernhollow Mist 200",
    sku: "FH-D-200",
    price: 32,
    attributes: { method: "diffuser", max_volume_l: 200 },
  },
  {
    kind: "diffuser",
    name: "Quillback Inline Haze 400",
    sku: "QB-D-400",
    price: 49,
    attributes: { method: "inline_diffuser", max_volume_l: 400 },
  },
  {
    kind: "cylinder",
    name: "Quillback 0.5 kg",
    sku: "QB-C-0500",
    price: 69,
    attributes: { cylinder_mass_g: 500, refill_price: 14 },
  },
  {
    kind: "cylinder",
    name: "Quillback 2 kg",
    sku: "QB-C-2000",
    price: 119,
    attributes: { cylinder_mass_g: 2000, refill_price: 24 },
  },
  {
    kind: "cylinder",
    name: "Quillback 5 kg",
    sku: "QB-C-5000",
    price: 189,
    attributes: { cylinder_mass_g: 5000, refill_price: 39 },
  },
  { kind: "reducer", name: "Quillback Two-stage reducer", sku: "QB-P-2", price: 139, attributes: {} },
  { kind: "solenoid", name: "Quillback Solenoid 24 V", sku: "QB-S-24", price: 45, attributes: {} },
  { kind: "check_valve", name: "Quillback Brass check valve", sku: "QB-V-1", price: 12, attributes: {} },
  { kind: "drop_checker", name: "Fernhollow Glass drop checker", sku: "FH-X-1", price: 15, attributes: {} },
  {
    kind: "hose",
    name: "Fernhollow Hose 16/22, 3 m",
    sku: "FH-H-16",
    price: 16,
    attributes: { inner_diameter_mm: 16 },
  },
]

/** Fills the shelf of a shop. Does nothing for an account that has parts. */
export async function fillShelf(ctx: Ctx): Promise<void> {
  const known = await listItems({ ctx, input: { limit: 1 } })
  if (known.length > 0) return
  for (const { price, ...part } of shelf) {
    await createItem({ ctx, input: { ...part, url: null, price_minor: price * 100, currency: "USD" } })
  }
}
