import type { Answer, Assumption, Caution } from "@/lib/chemistry/answer"
import { checkValve, hoseClamps, mainsNearWater } from "@/lib/chemistry/cautions"
import { type PhResult, type PhUncertainty, phForCo2 } from "@/lib/chemistry/ph-for-co2"
import type { FlowUncertainty } from "@/lib/flow/operating-point"
import type { ReactorUncertainty } from "@/lib/flow/reactor-verdict"
import type { BubbleRateUncertainty } from "@/lib/gas/bubble-rate"
import type { CylinderUncertainty } from "@/lib/gas/cylinder-life"
import type { DemandUncertainty } from "@/lib/gas/demand"
import type { LeadTimeUncertainty } from "@/lib/gas/lead-time"
import type { RoomUncertainty } from "@/lib/gas/room-safety"
import { withFields } from "@/lib/units/out-of-domain"
import { assemblySteps, type Step } from "./assembly"
import { commissioningSteps } from "./commissioning"
import type { PlanFacts } from "./facts"
import { demandOf, feasible, type GasSide, gasSide } from "./gas-side"
import { type Chore, maintenancePlan } from "./maintenance"
import { type CatalogMatch, matchCatalog } from "./match"
import { mergedAssumptions, mergedCautions, mergedMethod, type Said } from "./merge"
import { methodChoice } from "./method-choice"
import { type Part, partsList } from "./parts"
import { ASSUMED_CYLINDER_G, ASSUMED_ROOM_M3, type PlanInput } from "./plan-input"
import { type Schematic, schematic } from "./schematic"
import { type TankWater, tankWater } from "./tank-water"
import { type Trouble, troubleshooting } from "./troubleshooting"
import { type WaterSide, waterSide } from "./water-side"

/** A whole CO2 system for one tank. */
export interface SystemPlan extends Omit<PlanFacts, "input" | "elements"> {
  readonly parts: readonly Part[]
  readonly catalog_matches: readonly CatalogMatch[]
  readonly assembly: readonly Step[]
  readonly commissioning: readonly Step[]
  readonly maintenance: readonly Chore[]
  readonly troubleshooting: readonly Trouble[]
  readonly schematic: Schematic
  /** Codes of the cautions that concern a part of the result, to be shown beside it. */
  readonly caution_sections: Readonly<Record<PlanSection, readonly string[]>>
}

export type PlanSection =
  | "ph"
  | "demand"
  | "lead_time"
  | "flow"
  | "reactor"
  | "working_pressure"
  | "bubble_rate"
  | "cylinder"
  | "room_safety"

export interface PlanUncertainty {
  readonly ph: PhUncertainty
  readonly demand: DemandUncertainty
  readonly lead_time: LeadTimeUncertainty
  readonly flow: FlowUncertainty
  readonly reactor: ReactorUncertainty
  readonly bubble_rate: BubbleRateUncertainty
  readonly cylinder: CylinderUncertainty
  readonly room_safety: RoomUncertainty
}

/**
 * The whole job from a tank to a list of parts: level, set-point, method, gas, flow, safety, and how to build, run and
 * mend it.
 *
 * Every number comes from the functions that answer the same question alone; the lists in words are made from them.
 * 5-40 °C. Throws OutOfDomain on the field to change.
 */
export function systemPlan(input: PlanInput): Answer<SystemPlan, PlanUncertainty> {
  const water = tankWater(input)
  const setPoint = withFields({ co2_mg_l: "target_co2_mg_l" }, () =>
    phForCo2({ ...input, co2_mg_l: input.target_co2_mg_l }),
  )
  const withReactor = demandOf(input, water, "inline_reactor")
  const loop = waterSide(input, water.volume_l, feasible(withReactor.result.ramp_feed_mg_min))
  const demand = loop.name === "inline_reactor" ? withReactor : demandOf(input, water, loop.name)
  const gas = gasSide(input, water, loop.name, demand)
  const facts = factsOf(input, water, setPoint.result, loop, gas)
  const sections = {
    ph: setPoint,
    demand: gas.demand,
    lead_time: gas.lead_time,
    flow: loop.flow,
    reactor: loop.reactor,
    working_pressure: gas.working_pressure,
    bubble_rate: gas.bubble_rate,
    cylinder: gas.cylinder,
    room_safety: gas.room_safety,
  } satisfies Record<PlanSection, Said>
  const { reactor: ofReactor, ...others } = sections
  const planned: readonly Said[] =
    loop.name === "inline_reactor" ? [...Object.values(others), ofReactor] : Object.values(others)
  const { input: _, elements: __, ...shown } = facts
  return {
    result: {
      ...shown,
      parts: partsList(facts),
      catalog_matches: matchCatalog(input.catalog ?? [], {
        method: loop.name,
        loop: loop.loop,
        bare: loop.bare,
        volume_l: water.volume_l,
        need: facts.minimum_filter,
        feed_mg_min: gas.dosing.feed_mg_min,
        inlet_co2_mg_l: input.target_co2_mg_l,
        daily_use_g_day: gas.dosing.daily_use_g_day,
        room_volume_m3: facts.room_safety.room_volume_m3,
        air_changes_per_h: input.air_changes_per_h,
      }),
      assembly: assemblySteps(facts),
      commissioning: commissioningSteps(facts),
      maintenance: maintenancePlan(facts),
      troubleshooting: troubleshooting(facts),
      schematic: schematic(facts),
      caution_sections: codesOf(sections),
    },
    uncertainty: {
      ph: setPoint.uncertainty,
      demand: gas.demand.uncertainty,
      lead_time: gas.lead_time.uncertainty,
      flow: loop.flow.uncertainty,
      reactor: loop.reactor.uncertainty,
      bubble_rate: gas.bubble_rate.uncertainty,
      cylinder: gas.cylinder.uncertainty,
      room_safety: gas.room_safety.uncertainty,
    },
    cautions: mergedCautions([
      ...planned.map(({ cautions }) => cautions),
      planCautions(facts),
      [mainsNearWater, checkValve, hoseClamps],
    ]),
    assumptions: mergedAssumptions([
      water.assumptions,
      planAssumptions(input),
      ...planned.map(({ assumptions }) => assumptions),
    ]),
    method: mergedMethod(
      "Plan of a CO2 system",
      planned.map(({ method }) => method),
    ),
  }
}

function factsOf(input: PlanInput, water: TankWater, ph: PhResult, loop: WaterSide, gas: GasSide): PlanFacts {
  const demand = gas.demand.result
  return {
    input,
    volume_l: water.volume_l,
    surface_area_m2: water.surface_area_m2,
    method: methodChoice(loop.name, {
      ...loop.choice,
      use_g_day: gas.dosing.daily_use_g_day,
      efficiency: demand.dissolution_efficiency,
    }),
    co2: {
      target_co2_mg_l: input.target_co2_mg_l,
      co2_low_mg_l: ph.co2_low_mg_l,
      co2_high_mg_l: ph.co2_high_mg_l,
      level: ph.level,
    },
    ph,
    demand,
    lead_time: gas.lead_time.result,
    dosing: gas.dosing,
    day: gas.day,
    cylinder: gas.cylinder.result,
    working_pressure: gas.working_pressure.result,
    bubble_rate: gas.bubble_rate.result,
    flow: loop.flow.result,
    elements: loop.loop.elements,
    reactor: loop.reactor.result,
    reactor_size: loop.reactor_size,
    minimum_filter: loop.minimum_filter,
    minimum_reactor_filter: loop.minimum_reactor_filter,
    room_safety: gas.room_safety.result,
  }
}

function codesOf(sections: Readonly<Record<PlanSection, Said>>): Record<PlanSection, string[]> {
  const codes = Object.entries(sections).map(([section, { cautions }]) => [
    section,
    cautions.map(({ code }) => code),
  ])
  return Object.fromEntries(codes)
}

function planCautions({ method, reactor, dosing, demand }: PlanFacts): Caution[] {
  const cautions: Caution[] = []
  if (method.name === "inline_reactor" && reactor.verdict === "unsuitable") {
    const why = reactor.reasons
      .filter(({ verdict }) => verdict === "unsuitable")
      .map(({ message }) => message)
    cautions.push({
      code: "reactor_unsuitable",
      severity: "danger",
      message: `A reactor does not work in this loop. ${why.join(" ")}`,
    })
  }
  if (dosing.control === "timer" && dosing.feed_mg_min < demand.ramp_feed_mg_min) {
    cautions.push({ code: "timer_climbs_all_day", severity: "warning", message: dosing.control_reason })
  }
  return cautions
}

function planAssumptions(input: PlanInput): Assumption[] {
  const assumptions: Assumption[] = []
  if (input.cylinder_mass_g === undefined && !input.cylinders?.length) {
    assumptions.push({
      code: "cylinder_assumed",
      message: `You named no cylinder: one of ${ASSUMED_CYLINDER_G / 1000} kg is assumed.`,
    })
  }
  const room = [input.room_volume_m3, input.room_length_m, input.room_width_m, input.room_height_m]
  if (room.every((size) => size === undefined)) {
    assumptions.push({
      code: "room_assumed",
      message: `You named no room: ${ASSUMED_ROOM_M3} m³ are assumed.`,
    })
  }
  return assumptions
}
