import type { Caution } from "@/lib/chemistry/answer"
import type { PlanInput } from "@/lib/plan/plan-input"
import type { Schematic } from "@/lib/plan/schematic"
import type { PlanSection, PlanUncertainty, SystemPlan } from "@/lib/plan/system-plan"
import { clock, type Line, linesOf, numberLine, wordLine } from "./lines"
import type { Report } from "./report"

/** A report as it stands on a sheet, for the screen and for paper alike. */
export interface Sheet {
  /** What the customer takes home, in the order in which it is asked. */
  readonly answer: readonly Line[]
  /** What it was worked out from. */
  readonly given: readonly Line[]
  readonly parts: readonly SheetPart[]
  readonly lists: readonly SheetList[]
  /** Cautions that stand beside no part. */
  readonly cautions: readonly Caution[]
  readonly schematic?: Schematic
}

export interface SheetPart {
  readonly title: string
  readonly lines: readonly Line[]
  readonly cautions: readonly Caution[]
}

export interface SheetList {
  readonly title: string
  readonly items: readonly { readonly lead?: string; readonly text: string }[]
}

type Stored = Pick<Report, "kind" | "answer">

/** A report laid out. */
export function sheetOf(report: Stored): Sheet {
  return report.kind === "plan" ? planSheet(report) : resultSheet(report)
}

function resultSheet({ answer }: Stored): Sheet {
  return {
    answer: linesOf(answer.result),
    given: linesOf(answer.input),
    parts: [],
    lists: [],
    cautions: gravestFirst(answer.cautions as Caution[]),
  }
}

function planSheet({ answer }: Stored): Sheet {
  const plan = answer.result as unknown as SystemPlan
  const uncertainty = answer.uncertainty as unknown as PlanUncertainty
  const input = answer.input as unknown as PlanInput
  const beside = cautionsBeside(answer.cautions as Caution[], plan)
  return {
    answer: answerLines(plan, uncertainty),
    given: givenLines(plan, input),
    parts: [
      { title: "Level and pH", lines: levelLines(plan), cautions: beside(["ph"]) },
      { title: "Gas", lines: gasLines(plan, uncertainty), cautions: beside(["demand", "lead_time"]) },
      {
        title: "Pressure and bubbles",
        lines: pressureLines(plan, uncertainty),
        cautions: beside(["working_pressure", "bubble_rate"]),
      },
      { title: "Cylinder", lines: cylinderLines(plan), cautions: beside(["cylinder"]) },
      { title: "Water", lines: waterLines(plan, uncertainty), cautions: beside(["flow", "reactor"]) },
      { title: "Room", lines: roomLines(plan, uncertainty), cautions: beside(["room_safety"]) },
    ],
    lists: planLists(plan),
    cautions: beside.left(),
    schematic: plan.schematic,
  }
}

/** Gives each caution to the first part that it concerns, and what concerns none to the end. */
function cautionsBeside(cautions: readonly Caution[], { caution_sections }: SystemPlan) {
  const shown = new Set<string>()
  const take = (wanted: (code: string) => boolean) => {
    const taken = cautions.filter(({ code }) => wanted(code) && !shown.has(code))
    for (const { code } of taken) shown.add(code)
    return gravestFirst(taken)
  }
  const beside = (sections: readonly PlanSection[]) => {
    const codes = new Set(sections.flatMap((section) => caution_sections[section]))
    return take((code) => codes.has(code))
  }
  return Object.assign(beside, { left: () => take(() => true) })
}

const severities = ["danger", "warning", "info"]

function gravestFirst(cautions: readonly Caution[]): Caution[] {
  return [...cautions].sort(
    (one, other) => severities.indexOf(one.severity) - severities.indexOf(other.severity),
  )
}

function answerLines({ ph, co2, method, day, dosing, cylinder }: SystemPlan, of: PlanUncertainty): Line[] {
  return [
    numberLine("Hold the pH at", "ph", ph.ph, [ph.ph_low, ph.ph_high]),
    numberLine(
      "CO2 that it stands for",
      "target_co2_mg_l",
      co2.target_co2_mg_l,
      [co2.co2_low_mg_l, co2.co2_high_mg_l],
      2,
    ),
    wordLine("Gas goes in by", method.label),
    wordLine("Gas is open", `${clock(day.gas_opens_h)} to ${clock(day.gas_closes_h)}, by ${dosing.control}`),
    wordLine("Lights are on", `${clock(day.lights_on_h)} to ${clock(day.lights_off_h)}`),
    numberLine(
      "Gas used",
      "daily_use_g_day",
      dosing.daily_use_g_day,
      [of.demand.daily_use_low_g_day, of.demand.daily_use_high_g_day],
      2,
    ),
    numberLine("The cylinder lasts", "days", cylinder.days, [cylinder.days_low, cylinder.days_high], 2),
  ]
}

function givenLines({ volume_l, surface_area_m2, room_safety }: SystemPlan, input: PlanInput): Line[] {
  return [
    numberLine("Water in the tank", "volume_l", volume_l),
    numberLine("Open surface", "surface_area_m2", surface_area_m2, undefined, 2),
    numberLine("Carbonate hardness", "kh_dkh", input.kh_dkh),
    numberLine("Temperature", "temperature_c", input.temperature_c),
    wordLine("Plants", `${input.plant_demand} demand`),
    numberLine("Hose", "inner_diameter_mm", input.hose.inner_diameter_mm),
    numberLine("Length of hose", "length_m", input.hose.length_m),
    numberLine("Room", "room_volume_m3", room_safety.room_volume_m3),
  ]
}

function levelLines({ ph }: SystemPlan): Line[] {
  return [
    numberLine("pH of the water without added gas", "degassed_ph", ph.degassed_ph),
    numberLine("Drop of pH to the set-point", "ph_drop", ph.ph_drop, undefined, 2),
  ]
}

function gasLines({ dosing, demand, lead_time }: SystemPlan, of: PlanUncertainty): Line[] {
  return [
    numberLine("Feed while the level rises", "feed_mg_min", dosing.feed_mg_min, undefined, 2),
    numberLine(
      "Feed that holds it",
      "hold_feed_mg_min",
      demand.hold_feed_mg_min,
      [of.demand.hold_feed_low_mg_min, of.demand.hold_feed_high_mg_min],
      2,
    ),
    numberLine(
      "Time to reach it",
      "lead_time_min",
      lead_time.lead_time_min,
      [of.lead_time.lead_time_low_min, of.lead_time.lead_time_high_min],
      2,
    ),
    numberLine(
      "Level if nothing throttled the feed",
      "uncontrolled_co2_mg_l",
      demand.uncontrolled_co2_mg_l,
      undefined,
      2,
    ),
  ]
}

function pressureLines({ working_pressure, bubble_rate }: SystemPlan, of: PlanUncertainty): Line[] {
  const { working_pressure_bar, low_bar, high_bar } = working_pressure
  const { bubbles_per_s_low, bubbles_per_s_high } = of.bubble_rate
  return [
    numberLine("Set the reducer to", "working_pressure_bar", working_pressure_bar, [low_bar, high_bar], 2),
    numberLine(
      "Bubbles to start from",
      "bubbles_per_s",
      bubble_rate.bubbles_per_s,
      [bubbles_per_s_low, bubbles_per_s_high],
      2,
    ),
  ]
}

function cylinderLines({ cylinder }: SystemPlan): Line[] {
  const { cylinder_mass_g, pressure_bar_abs, refills_per_year, max_fill_ratio_kg_l } = cylinder
  return [
    numberLine("Cylinder", "cylinder_mass_g", cylinder_mass_g),
    numberLine("Pressure in it, absolute", "pressure_bar_abs", pressure_bar_abs, undefined, 2),
    numberLine("Refills a year", "refills_per_year", refills_per_year, undefined, 2),
    numberLine("Fill it to no more than", "max_fill_ratio_kg_l", max_fill_ratio_kg_l, undefined, 2),
  ]
}

function waterLines({ flow, reactor, method, minimum_filter }: SystemPlan, of: PlanUncertainty): Line[] {
  const { flow_low_l_h, flow_high_l_h } = of.flow
  const lines = [
    numberLine("Real flow of the filter", "flow_l_h", flow.flow_l_h, [flow_low_l_h, flow_high_l_h]),
    numberLine("Flow when it is due for cleaning", "flow_l_h", flow.due_flow_l_h),
  ]
  if (method.name !== "inline_reactor") return lines
  return [
    ...lines,
    wordLine("The reactor on this filter", reactor.verdict),
    numberLine("It needs at least", "flow_l_h", reactor.minimum_flow_l_h),
    numberLine(
      "A filter for it is rated for at least",
      "flow_l_h",
      minimum_filter.max_flow_l_h,
      undefined,
      2,
    ),
  ]
}

function roomLines({ room_safety }: SystemPlan, of: PlanUncertainty): Line[] {
  const { peak_ppm, hours_above_5000_ppm, verdict } = room_safety
  return [
    numberLine("If the whole charge escapes", "peak_ppm", peak_ppm, undefined, 2),
    numberLine(
      "Time above 5,000 ppm",
      "hours_above_5000_ppm",
      hours_above_5000_ppm,
      [of.room_safety.hours_above_low_h, of.room_safety.hours_above_high_h],
      2,
    ),
    wordLine("So", verdict.replaceAll("_", " ")),
  ]
}

function planLists({ method, parts, assembly, commissioning, maintenance, troubleshooting }: SystemPlan) {
  return [
    { title: "Why this method", items: method.reasons.map((text) => ({ text })) },
    {
      title: "Parts",
      items: parts.map(({ count, requirement, reason }) => ({
        lead: `${count} ×`,
        text: `${requirement}. ${reason}`,
      })),
    },
    { title: "Assembly, in this order", items: assembly.map(({ text }) => ({ text })) },
    { title: "First start", items: commissioning.map(({ text }) => ({ text })) },
    { title: "Upkeep", items: maintenance.map(({ when, text }) => ({ lead: when, text })) },
    {
      title: "When something is wrong",
      items: troubleshooting.map(({ symptom, actions }) => ({ lead: symptom, text: actions.join(" ") })),
    },
  ] as const satisfies readonly SheetList[]
}
