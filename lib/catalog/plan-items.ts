import type { Ctx } from "@/lib/context"
import type { CatalogItem } from "@/lib/plan/match"
import { listItems } from "./find"
import type { Item } from "./item"

/** More parts than any shop matches at once. */
export const mostItems = 5_000

/** The account's filters, reactors, cylinders and diffusers, as the plan matches them. */
export async function planItems({ ctx }: { ctx: Ctx }): Promise<CatalogItem[]> {
  const items = await listItems({ ctx, input: { limit: mostItems } })
  return items.flatMap((item) => planItem(item) ?? [])
}

/** The item as the plan knows it; undefined for a kind that is not matched. */
export function planItem({ id, name, kind, price_minor, attributes }: Item): CatalogItem | undefined {
  const number = (attribute: string) => attributes[attribute] as number | undefined
  switch (kind) {
    case "filter": {
      const curve = attributes.pump_curve as { flow_l_h: number; head_m: number }[] | undefined
      const pump = curve
        ? { points: curve }
        : { max_flow_l_h: number("max_flow_l_h") ?? 0, max_head_m: number("max_head_m") ?? 0 }
      return { kind, id, name, pump, hose_inner_diameter_mm: number("hose_inner_diameter_mm") }
    }
    case "reactor":
      return {
        kind,
        id,
        name,
        body_diameter_mm: number("body_diameter_mm") ?? 0,
        body_length_mm: number("body_length_mm") ?? 0,
        nozzle_diameter_mm: number("nozzle_diameter_mm"),
        k: number("k"),
      }
    case "cylinder":
      return {
        kind,
        id,
        name,
        cylinder_mass_g: number("cylinder_mass_g") ?? 0,
        fill_ratio_kg_l: number("fill_ratio_kg_l"),
        test_pressure_bar: number("test_pressure_bar"),
        refill_price: number("refill_price"),
        price: price_minor === null ? undefined : price_minor / 100,
      }
    case "diffuser":
      return {
        kind,
        id,
        name,
        method: attributes.method as "diffuser" | "inline_diffuser",
        max_volume_l: number("max_volume_l") ?? 0,
      }
    default:
      return undefined
  }
}
