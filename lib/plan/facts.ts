import type { PhResult } from "@/lib/chemistry/ph-for-co2"
import type { ElementInput } from "@/lib/flow/elements"
import type { OperatingPoint } from "@/lib/flow/operating-point"
import type { ReactorInput } from "@/lib/flow/reactor-input"
import type { ReactorAnswer } from "@/lib/flow/reactor-verdict"
import type { BubbleRate } from "@/lib/gas/bubble-rate"
import type { CylinderComparison } from "@/lib/gas/cylinder-life"
import type { Demand } from "@/lib/gas/demand"
import type { LeadTime } from "@/lib/gas/lead-time"
import type { RoomSafety } from "@/lib/gas/room-safety"
import type { WorkingPressure } from "@/lib/gas/working-pressure"
import type { DayCourse } from "./day-course"
import type { MethodChoice } from "./method-choice"
import type { MinimumFilter } from "./minimum-filter"
import type { Control, PlanInput } from "./plan-input"

/** The target for the tank's CO2 and what it may truly be when a controller holds the set-point. */
export interface Co2Target {
  readonly target_co2_mg_l: number
  readonly co2_low_mg_l: number
  readonly co2_high_mg_l: number
  readonly level: PhResult["level"]
}

/** How the gas is dosed: what is fed, from when, and who closes the valve. */
export interface Dosing {
  readonly control: Control
  /** The other one is not needed. */
  readonly control_reason: string
  readonly feed_mg_min: number
  readonly feed_ml_min: number
  readonly open_before_lights_min: number
  readonly close_before_lights_off_min: number
  readonly daily_use_g_day: number
}

/** Everything computed about a system: what the lists in words are made from. */
export interface PlanFacts {
  readonly input: PlanInput
  readonly volume_l: number
  readonly surface_area_m2: number
  readonly method: MethodChoice
  readonly co2: Co2Target
  readonly ph: PhResult
  readonly demand: Demand
  readonly lead_time: LeadTime
  readonly dosing: Dosing
  readonly day: DayCourse
  readonly cylinder: CylinderComparison
  readonly working_pressure: WorkingPressure
  readonly bubble_rate: BubbleRate
  readonly flow: OperatingPoint
  /** What the loop is made of, the device for the gas included. */
  readonly elements: readonly ElementInput[]
  /** Of the reactor that is owned, or of the smallest that would serve; also when another method is planned. */
  readonly reactor: ReactorAnswer
  readonly reactor_size: ReactorInput
  readonly minimum_filter: MinimumFilter
  readonly minimum_reactor_filter: MinimumFilter
  readonly room_safety: RoomSafety
}
