import { z } from "zod"
import { figure, quantity } from "@/lib/api/quantity"
import { elementKinds } from "@/lib/flow/elements"
import { flowDefaults } from "@/lib/flow/loop-input"
import { verdicts } from "@/lib/flow/reactor-criteria"
import { reactorDefaults } from "@/lib/flow/reactor-input"

const speed_ratio = quantity("speed_ratio").default(flowDefaults.speed_ratio)
const point = z.strictObject({ flow_l_h: quantity("flow_l_h"), head_m: quantity("head_m") })
const mostPoints = 60
const mostElements = 60

/** A pump by its two advertised numbers, or by points of its curve. */
export const pump = z.union([
  z.strictObject({
    max_flow_l_h: quantity("max_flow_l_h"),
    max_head_m: quantity("max_head_m"),
    speed_ratio,
  }),
  z.strictObject({ points: z.array(point).min(2).max(mostPoints), speed_ratio }),
])

export const hose = z.strictObject({
  inner_diameter_mm: quantity("inner_diameter_mm"),
  length_m: quantity("length_m"),
  roughness_mm: quantity("roughness_mm").default(flowDefaults.roughness_mm),
  corrugation_factor: quantity("corrugation_factor").default(flowDefaults.corrugation_factor),
})

export const element = z.strictObject({
  kind: z.enum(elementKinds),
  k: quantity("k").optional(),
  inner_diameter_mm: quantity("inner_diameter_mm").optional(),
  in_return: z.boolean().optional().meta({ description: "Whether it sits in the return hose" }),
  count: z.int().min(1).max(100).optional().meta({ description: "How many of them", "x-unit": "1" }),
  hole_count: z.int().min(1).max(200).optional().meta({ description: "Holes of a spray bar", "x-unit": "1" }),
  hole_diameter_mm: quantity("hole_diameter_mm").optional(),
})

/** A filter's water loop. */
export const loopFields = {
  pump,
  hose,
  return_hose: hose.optional().meta({ description: "The return side, where its bore differs" }),
  elements: z.array(element).max(mostElements),
  volume_l: quantity("volume_l").optional(),
  temperature_c: quantity("temperature_c").default(flowDefaults.temperature_c),
  clogging: quantity("clogging").default(flowDefaults.clogging),
  lift_m: quantity("lift_m").default(flowDefaults.lift_m),
  clean_media_fraction: quantity("clean_media_fraction").default(flowDefaults.clean_media_fraction),
}

/** The loop with a reactor in it. */
export const reactorFields = {
  ...loopFields,
  reactor: z.strictObject({
    body_diameter_mm: quantity("body_diameter_mm"),
    body_length_mm: quantity("body_length_mm"),
    k: quantity("k").optional(),
    nozzle_diameter_mm: quantity("nozzle_diameter_mm").optional(),
    water_pressure_bar_abs: quantity("water_pressure_bar_abs").default(
      reactorDefaults.water_pressure_bar_abs,
    ),
    bypass_fraction: quantity("bypass_fraction").default(reactorDefaults.bypass_fraction),
    feed_bubble_diameter_mm: quantity("feed_bubble_diameter_mm").default(
      reactorDefaults.feed_bubble_diameter_mm,
    ),
  }),
  feed_mg_min: quantity("feed_mg_min"),
  inlet_co2_mg_l: quantity("inlet_co2_mg_l").default(reactorDefaults.inlet_co2_mg_l),
}

export const flowUncertainty = {
  flow_low_l_h: figure("flow_l_h"),
  flow_high_l_h: figure("flow_l_h"),
  curve_low_l_h: figure("flow_l_h").optional(),
  curve_high_l_h: figure("flow_l_h").optional(),
  fittings_low_l_h: figure("flow_l_h"),
  fittings_high_l_h: figure("flow_l_h"),
}

export const verdict = z.enum(verdicts).meta({ id: "Verdict", description: "The worst of the reasons" })

export const reasons = z.array(
  z
    .object({
      criterion: z.string(),
      verdict,
      value: z.number().meta({ description: "What was found, in the unit of the message", "x-unit": "1" }),
      message: z.string(),
    })
    .meta({ id: "Reason" }),
)

export const limit = z
  .enum(["reached", "already", "never", "beyond"])
  .meta({ description: "Why there is a clogging at which the reactor gas-locks, or none" })

/** A filter of 1,000 L/h on 180 L with 16 mm hose and a reactor: the example of every question about a loop. */
export const exampleLoop = {
  pump: { max_flow_l_h: 1000, max_head_m: 1.6 },
  hose: { inner_diameter_mm: 16, length_m: 3 },
  elements: [
    { kind: "intake_strainer" as const },
    { kind: "barb" as const, count: 4 },
    { kind: "quick_release" as const },
    { kind: "bend" as const, count: 4 },
    { kind: "reactor" as const },
    { kind: "lily_outflow" as const },
  ],
  volume_l: 180,
}
