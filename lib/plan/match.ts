import { JETTING_FACTOR } from "@/lib/flow/bubble-travel"
import type { PumpInput } from "@/lib/flow/loop-input"
import { flowAt, type LoopInput, prepareLoop } from "@/lib/flow/loop-input"
import { DUE_CLOGGING } from "@/lib/flow/media"
import { JET_M_S, reactorState, worst } from "@/lib/flow/reactor-criteria"
import { prepareReactor, type ReactorInput } from "@/lib/flow/reactor-input"
import { type Cylinder, cylinderLife } from "@/lib/gas/cylinder-life"
import { gasDefaults } from "@/lib/gas/defaults"
import type { GasMethodName } from "@/lib/gas/methods"
import { LIMITS_PPM, roomSafety } from "@/lib/gas/room-safety"
import { figures } from "@/lib/units/figures"
import { OutOfDomain } from "@/lib/units/out-of-domain"
import type { FlowNeed } from "./minimum-filter"

/** One thing that a shop sells, with the numbers that decide whether it fits. */
export type CatalogItem = FilterItem | ReactorItem | CylinderItem | DiffuserItem

interface Item {
  readonly id: string
  readonly name: string
}
export interface FilterItem extends Item {
  readonly kind: "filter"
  readonly pump: PumpInput
  /** Bore of the hose that it takes; absent, that of the loop. */
  readonly hose_inner_diameter_mm?: number | undefined
}
export interface ReactorItem extends Item, ReactorInput {
  readonly kind: "reactor"
}
export interface CylinderItem extends Item, Omit<Cylinder, "name"> {
  readonly kind: "cylinder"
}
export interface DiffuserItem extends Item {
  readonly kind: "diffuser"
  readonly method: Extract<GasMethodName, "diffuser" | "inline_diffuser">
  readonly max_volume_l: number
}

/** An item that fits, best first within its kind. */
export interface CatalogMatch {
  readonly item_id: string
  readonly name: string
  readonly kind: CatalogItem["kind"]
  /** From 1, within its kind. */
  readonly rank: number
  readonly fit: "good" | "possible"
  readonly reason: string
  /** How far it is above what is needed, as a share: 0.2 is a fifth more. */
  readonly margin: number
}

/** The job that the items have to fit. */
export interface MatchJob {
  readonly method: GasMethodName
  /** The loop as it is, with the device for the gas among its elements. */
  readonly loop: LoopInput
  /** The same loop with nothing for the gas in it. */
  readonly bare: LoopInput
  readonly volume_l: number
  readonly need: FlowNeed
  readonly feed_mg_min: number
  readonly inlet_co2_mg_l: number
  readonly daily_use_g_day: number
  readonly room_volume_m3: number
  readonly air_changes_per_h: number
}

/**
 * The items of a catalogue that fit a job, ranked within their kind. What does not fit, or contradicts itself, is left
 * out. Filters and reactors are solved in this very loop; a margin of a fifth to one is best, since a far bigger part
 * costs more and does no more.
 */
export function matchCatalog(catalog: readonly CatalogItem[], job: MatchJob): CatalogMatch[] {
  const fitting = catalog.flatMap((item) => {
    const found = judged(item, job)
    return found === null ? [] : [{ item_id: item.id, name: item.name, kind: item.kind, ...found }]
  })
  const ranks = new Map<string, number>()
  return fitting
    .sort((a, b) => a.kind.localeCompare(b.kind) || order(a) - order(b) || a.name.localeCompare(b.name))
    .map((match) => {
      const rank = (ranks.get(match.kind) ?? 0) + 1
      ranks.set(match.kind, rank)
      return { ...match, rank }
    })
}

type Judgement = Pick<CatalogMatch, "fit" | "reason" | "margin">

/** Share above the need that is comfortable, and from which a part is bigger than it has to be. */
const COMFORT = { from: 0.2, to: 1 }

/** Good before possible; then the nearest to the comfortable margin. */
function order({ fit, margin }: Judgement): number {
  const off = Math.max(COMFORT.from - margin, margin - COMFORT.to, 0)
  return (fit === "good" ? 0 : 1e6) + off
}

function judged(item: CatalogItem, job: MatchJob): Judgement | null {
  try {
    switch (item.kind) {
      case "filter":
        return judgeFilter(item, job)
      case "reactor":
        return judgeReactor(item, job)
      case "cylinder":
        return judgeCylinder(item, job)
      case "diffuser":
        return judgeDiffuser(item, job)
    }
  } catch (error) {
    // A shop's item with numbers that no pump or reactor can have fits no tank.
    if (error instanceof OutOfDomain) return null
    throw error
  }
}

function judgeFilter(
  { pump, hose_inner_diameter_mm }: FilterItem,
  { loop, need }: MatchJob,
): Judgement | null {
  const hose =
    hose_inner_diameter_mm === undefined
      ? loop.hose
      : { ...loop.hose, inner_diameter_mm: hose_inner_diameter_mm }
  const prepared = prepareLoop({ ...loop, pump, hose })
  const clean = flowAt(prepared, 0)
  const due = flowAt(prepared, DUE_CLOGGING)
  const margin = Math.min(clean / need.clean_flow_l_h, due / Math.max(need.due_flow_l_h, 1)) - 1
  if (margin < 0) return null
  return {
    fit: margin >= COMFORT.from ? "good" : "possible",
    reason: `It moves ${figures(clean, 3)} L/h through this loop and ${figures(due, 3)} when due for cleaning; ${neededFlow(need)}.`,
    margin,
  }
}

/** Only a reactor asks for a flow when the filter is due: every other method gets by with what is left. */
function neededFlow({ clean_flow_l_h, due_flow_l_h }: FlowNeed): string {
  const clean = figures(clean_flow_l_h, 3)
  return due_flow_l_h > 0
    ? `${clean} and ${figures(due_flow_l_h, 3)} are needed`
    : `${clean} is needed while it is clean`
}

function judgeReactor(item: ReactorItem, job: MatchJob): Judgement | null {
  const { id: _, name: __, kind: ___, ...reactor } = item
  const { bare, volume_l, feed_mg_min, inlet_co2_mg_l } = job
  const prepared = prepareReactor({ ...bare, volume_l, reactor, feed_mg_min, inlet_co2_mg_l })
  const now = reactorState(prepared, bare.clogging)
  const due = reactorState(prepared, DUE_CLOGGING)
  const verdict = worst([now.verdict, due.verdict])
  if (verdict === "unsuitable") return null
  const required_m = JETTING_FACTOR * now.required_length_m
  return {
    fit: now.verdict === "suitable" ? "good" : "possible",
    reason: `At ${figures(now.flow_l_h, 3)} L/h its bubbles need ${figures(100 * required_m, 2)} of its ${figures(100 * prepared.length_m, 2)} cm, and its jet runs at ${figures(now.nozzle_velocity_m_s, 2)} m/s, ${figures(due.nozzle_velocity_m_s, 2)} when the filter is due.`,
    margin: Math.min(prepared.length_m / required_m, due.nozzle_velocity_m_s / JET_M_S.least) - 1,
  }
}

/** Days that a charge should last at least. Common practice, no source. */
const LEAST_DAYS = 60

function judgeCylinder(item: CylinderItem, job: MatchJob): Judgement | null {
  const { kind: _, id: __, ...cylinder } = item
  const { days } = cylinderLife({
    daily_use_g_day: job.daily_use_g_day,
    cylinders: [cylinder],
    usable_fraction: gasDefaults.usable_fraction,
    ambient_c: gasDefaults.ambient_c,
    cut_off_bar_abs: gasDefaults.cut_off_bar_abs,
  }).result
  const { peak_ppm } = roomSafety({ ...gasDefaults, ...job, cylinder_mass_g: item.cylinder_mass_g }).result
  const margin = days / LEAST_DAYS - 1
  if (margin < 0) return null
  const tooMuch = peak_ppm >= LIMITS_PPM.short_term
  return {
    fit: tooMuch ? "possible" : "good",
    reason: `It lasts ${figures(days, 2)} days.${tooMuch ? ` Emptied into the room it makes ${figures(peak_ppm, 2)} ppm: keep it ventilated, or take a smaller one.` : ""}`,
    margin,
  }
}

function judgeDiffuser({ method, max_volume_l }: DiffuserItem, job: MatchJob): Judgement | null {
  const margin = max_volume_l / job.volume_l - 1
  if (margin < 0 || method !== job.method) return null
  return {
    fit: margin >= COMFORT.from ? "good" : "possible",
    reason: `It is made for tanks up to ${figures(max_volume_l, 3)} L; this one holds ${figures(job.volume_l, 3)} L.`,
    margin,
  }
}
