import type { Json } from "@/app/ui/json"
import type { ItemMatch } from "@/lib/catalog"
import type { CurvePoint } from "@/lib/flow/pump-curve"
import type { BenchUnits } from "./bench-units"
import { type BenchForm, type FieldName, fieldNames } from "./fields"
import { type FieldValue, withValues } from "./sheet"

export type Match = Json<ItemMatch>

/** What a part of the catalogue brings into the plan. */
export interface CatalogChoice {
  readonly values: Partial<Record<FieldName, FieldValue>>
  readonly chosen: Partial<BenchForm>
}

/** The fields that a part of the catalogue fills in; what it does not say is emptied. */
export function choiceOf({ kind, price_minor, attributes }: Match["item"]): CatalogChoice {
  const number = (name: string) => attributes[name] as number | undefined
  switch (kind) {
    case "filter": {
      const curve = attributes.pump_curve as readonly CurvePoint[] | undefined
      const hose = number("hose_inner_diameter_mm")
      return {
        values: {
          ...(curve
            ? { pump_points: curve }
            : { max_flow_l_h: number("max_flow_l_h"), max_head_m: number("max_head_m") }),
          ...(hose !== undefined && { hose_diameter_mm: hose }),
        },
        chosen: { pump_by: curve ? "curve" : "box", clogging: "0" },
      }
    }
    case "reactor":
      return {
        values: {
          body_diameter_mm: number("body_diameter_mm"),
          body_length_mm: number("body_length_mm"),
          nozzle_diameter_mm: number("nozzle_diameter_mm"),
          reactor_k: number("k"),
        },
        chosen: { method: "inline_reactor" },
      }
    case "cylinder":
      return {
        values: {
          cylinder_mass_g: number("cylinder_mass_g"),
          remaining_g: undefined,
          fill_ratio_kg_l: number("fill_ratio_kg_l"),
          test_pressure_bar: number("test_pressure_bar"),
          refill_price: number("refill_price"),
          price: price_minor === null ? undefined : price_minor / 100,
        },
        chosen: {},
      }
    case "diffuser":
      return { values: {}, chosen: { method: attributes.method as string } }
    default:
      return { values: {}, chosen: {} }
  }
}

/** Whether the form stands as the choice would leave it. */
export function isChosen({ values, chosen }: CatalogChoice, units: BenchUnits, form: BenchForm): boolean {
  const { form: written } = withValues({ form, exact: {}, units }, values)
  const names = fieldNames.filter((name) => name in values)
  return (
    names.every((name) => written[name] === form[name]) &&
    Object.entries(chosen).every(([name, option]) => form[name as keyof BenchForm] === option)
  )
}
