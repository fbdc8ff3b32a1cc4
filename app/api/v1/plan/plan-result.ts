import { z } from "zod"
import { figure, figureOrNull } from "@/lib/api/quantity"
import { quantities } from "@/lib/units/quantities"
import { carbonatePh } from "../carbonate/ph/operation"
import { level } from "../carbonate/water-fields"
import { flowOperatingPoint } from "../flow/operating-point/operation"
import { flowReactor } from "../flow/reactor/operation"
import { gasBubbleRate } from "../gas/bubble-rate/operation"
import { gasCylinder } from "../gas/cylinder/operation"
import { gasDemand } from "../gas/demand/operation"
import { gasLeadTime } from "../gas/lead-time/operation"
import { gasRoomSafety } from "../gas/room-safety/operation"
import { gasMethod, series } from "../gas/tank-fields"
import { gasWorkingPressure } from "../gas/working-pressure/operation"

/** A part of a calculation's answer, as the calculation itself declares it. */
function partOf({ response }: { response: z.ZodType }, part: "result" | "uncertainty"): z.ZodType {
  if (!(response instanceof z.ZodObject)) throw new Error("A calculation answers with an object")
  return response.shape[part]
}

const method = gasMethod.unwrap()
const sentences = z.array(z.string())
const steps = z.array(z.object({ code: z.string(), text: z.string() }).meta({ id: "PlanStep" }))

const minimumFilter = z
  .object({
    clean_flow_l_h: figure("flow_l_h"),
    due_flow_l_h: figure("flow_l_h"),
    max_flow_l_h: figureOrNull("max_flow_l_h"),
    max_head_m: figureOrNull("max_head_m"),
    present_is_enough: z.boolean(),
  })
  .meta({ id: "MinimumFilter", description: "The least filter, as its maker advertises it" })

const values = z.array(
  z
    .object({
      quantity: z.enum(Object.keys(quantities) as [string, ...string[]]),
      value: z.number().meta({ description: "In the unit of its quantity", "x-unit": "1" }),
      of: z.string().optional(),
    })
    .meta({ id: "SchematicValue" }),
)

const schematic = z
  .object({
    nodes: z.array(z.object({ id: z.string(), kind: z.string(), label: z.string(), values })),
    edges: z.array(z.object({ from: z.string(), to: z.string(), medium: z.enum(["gas", "water"]), values })),
  })
  .meta({ id: "Schematic", description: "Gas train and water loop, each number at the part it belongs to" })

export const catalogMatches = z.array(
  z
    .object({
      item_id: z.string(),
      name: z.string(),
      kind: z.enum(["filter", "reactor", "cylinder", "diffuser"]),
      rank: z.int().meta({ description: "From 1, within its kind", "x-unit": "1" }),
      fit: z.enum(["good", "possible"]),
      reason: z.string(),
      margin: z.number().meta({ description: "Share above what is needed", "x-unit": "1" }),
    })
    .meta({ id: "CatalogMatch", description: "One of your parts that fits, best first" }),
)

export const planResult = {
  volume_l: figure("volume_l"),
  surface_area_m2: figure("surface_area_m2"),
  method: z.object({
    name: method,
    label: z.string(),
    recommended: method,
    reasons: sentences,
    options: z.array(
      z.object({
        name: method,
        label: z.string(),
        fit: z.enum(["recommended", "possible", "unsuitable"]),
        for: sentences,
        against: sentences,
      }),
    ),
  }),
  co2: z.object({
    target_co2_mg_l: figure("target_co2_mg_l"),
    co2_low_mg_l: figure("co2_low_mg_l"),
    co2_high_mg_l: figure("co2_high_mg_l"),
    level,
  }),
  ph: partOf(carbonatePh, "result"),
  demand: partOf(gasDemand, "result"),
  lead_time: partOf(gasLeadTime, "result"),
  dosing: z.object({
    control: z.enum(["controller", "timer"]),
    control_reason: z.string(),
    feed_mg_min: figure("feed_mg_min"),
    feed_ml_min: figure("feed_ml_min"),
    open_before_lights_min: figure("open_before_lights_min"),
    close_before_lights_off_min: figure("close_before_lights_off_min"),
    daily_use_g_day: figure("daily_use_g_day"),
  }),
  day: z.object({
    gas_opens_h: figure("lights_on_h"),
    lights_on_h: figure("lights_on_h"),
    gas_closes_h: figure("lights_on_h"),
    lights_off_h: figure("lights_off_h"),
    lights_on_co2_mg_l: figure("lights_on_co2_mg_l"),
    highest_co2_mg_l: figure("co2_mg_l"),
    lowest_co2_mg_l: figure("co2_mg_l"),
    highest_ph: figure("ph"),
    lowest_ph: figure("ph"),
    series,
  }),
  cylinder: partOf(gasCylinder, "result"),
  working_pressure: partOf(gasWorkingPressure, "result"),
  bubble_rate: partOf(gasBubbleRate, "result"),
  flow: partOf(flowOperatingPoint, "result"),
  reactor: partOf(flowReactor, "result"),
  reactor_size: z
    .looseObject({ body_diameter_mm: figure("body_diameter_mm"), body_length_mm: figure("body_length_mm") })
    .meta({ description: "The reactor that is owned, or the smallest that would serve" }),
  minimum_filter: minimumFilter,
  minimum_reactor_filter: minimumFilter,
  room_safety: partOf(gasRoomSafety, "result"),
  parts: z.array(
    z.object({
      part: z.string(),
      count: z.int().meta({ description: "How many", "x-unit": "1" }),
      requirement: z.string(),
      reason: z.string(),
    }),
  ),
  catalog_matches: catalogMatches,
  assembly: steps,
  commissioning: steps,
  maintenance: z.array(z.object({ code: z.string(), when: z.string(), text: z.string() })),
  troubleshooting: z.array(
    z.object({
      code: z.string(),
      severity: z.enum(["info", "warning", "danger"]),
      symptom: z.string(),
      actions: sentences.meta({ description: "First actions first" }),
    }),
  ),
  schematic,
  caution_sections: z
    .record(z.string(), z.array(z.string()))
    .meta({ description: "Codes of the cautions to show beside each part of the result" }),
}

export const planUncertainty = {
  ph: partOf(carbonatePh, "uncertainty"),
  demand: partOf(gasDemand, "uncertainty"),
  lead_time: partOf(gasLeadTime, "uncertainty"),
  flow: partOf(flowOperatingPoint, "uncertainty"),
  reactor: partOf(flowReactor, "uncertainty"),
  bubble_rate: partOf(gasBubbleRate, "uncertainty"),
  cylinder: partOf(gasCylinder, "uncertainty"),
  room_safety: partOf(gasRoomSafety, "uncertainty"),
}
