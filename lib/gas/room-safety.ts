import { type Answer, type Caution, method, type Severity } from "@/lib/chemistry/answer"
import { cylinderSecured, localRules, roomVentilation } from "@/lib/chemistry/cautions"
import { checkBounds } from "@/lib/units/bounds"
import { figures } from "@/lib/units/figures"
import { OutOfDomain, withFields } from "@/lib/units/out-of-domain"
import { quantities } from "@/lib/units/quantities"
import {
  gasVolume,
  hoursAbove,
  meanAfterRelease,
  peakAfterRelease,
  type RoomAir,
  steadyLeakLevel,
} from "./room-air"

export interface RoomSafetyInput {
  readonly cylinder_mass_g: number
  readonly room_volume_m3?: number | undefined
  readonly room_length_m?: number | undefined
  readonly room_width_m?: number | undefined
  readonly room_height_m?: number | undefined
  readonly air_changes_per_h: number
  readonly room_c: number
  readonly background_ppm: number
  /** A steady leak to look at beside the sudden release. */
  readonly leak_g_h?: number | undefined
  /** Normal dosing, to show how little it adds. */
  readonly daily_use_g_day?: number | undefined
}

export type RoomVerdict = "ok" | "ventilate" | "leave" | "life_danger"

export interface RoomSafety {
  readonly peak_ppm: number
  /** `null` if the ventilation never brings the room below 5,000 ppm. */
  readonly hours_above_5000_ppm: number | null
  readonly verdict: RoomVerdict
  readonly mean_8h_ppm: number
  readonly gas_m3: number
  readonly room_volume_m3: number
  /** `null` unless a leak was given. */
  readonly leak_steady_ppm: number | null
  /** `null` unless a daily use was given. */
  readonly dosing_ppm: number | null
}

export interface RoomUncertainty {
  readonly hours_above_low_h: number | null
  readonly hours_above_high_h: number | null
}

/**
 * CO2 in a room after a cylinder has emptied itself into it, and how long it stays.
 *
 * Well-mixed room from which the gas pushes air out, then air changes; real-gas density. Near the floor and in
 * cabinets it is far worse. The interval halves and doubles the air changes. Throws `OutOfDomain` on the field to
 * change. Not for sizing gas detectors or for duties under the law.
 */
export function roomSafety(input: RoomSafetyInput): Answer<RoomSafety, RoomUncertainty> {
  checkBounds(input, quantities)
  const room: RoomAir = { ...input, room_volume_m3: roomVolume(input) }
  const { cylinder_mass_g, room_c, air_changes_per_h, leak_g_h, daily_use_g_day } = input
  const peak_ppm = peakAfterRelease(room, cylinder_mass_g)
  const hoursAt = (changes: number) =>
    hoursAbove({ ...room, air_changes_per_h: changes }, peak_ppm, LIMITS_PPM.working_day)
  const result: RoomSafety = {
    peak_ppm,
    hours_above_5000_ppm: hoursAt(air_changes_per_h),
    verdict: verdictOn(peak_ppm),
    mean_8h_ppm: meanAfterRelease(room, peak_ppm, 8),
    gas_m3: gasVolume({ mass_g: cylinder_mass_g, room_c }),
    room_volume_m3: room.room_volume_m3,
    leak_steady_ppm: leak_g_h === undefined ? null : steadyLeakLevel(room, leak_g_h),
    dosing_ppm:
      daily_use_g_day === undefined
        ? null
        : steadyLeakLevel(room, daily_use_g_day / 24) - room.background_ppm,
  }
  return {
    result,
    uncertainty: {
      hours_above_low_h: hoursAt(2 * air_changes_per_h),
      hours_above_high_h: hoursAt(air_changes_per_h / 2),
    },
    cautions: [
      release(result, cylinder_mass_g),
      ...leak(result.leak_steady_ppm),
      pooling,
      ...(result.hours_above_5000_ppm === null ? [noVentilation] : []),
      ...(cylinder_mass_g > CABINET_G ? [cabinet(cylinder_mass_g)] : []),
      roomVentilation,
      cylinderSecured,
      localRules,
    ],
    assumptions: [
      {
        code: "well_mixed_room",
        message: `The whole charge escapes at once and mixes with ${figures(room.room_volume_m3, 3)} m³ of air, which changes ${figures(air_changes_per_h, 2)} times an hour (0.2 a tight home, 0.5 usual, 2 with a window open).`,
      },
    ],
    method: method("Well-mixed room", [
      "tsonopoulos1974",
      "nioshCarbonDioxide",
      "eu200615",
      "engineeringJudgement",
    ]),
  }
}

/** Exposure limits of CO2 in air. @source nioshCarbonDioxide; eu200615 has the same 8-h limit */
export const LIMITS_PPM = { working_day: 5_000, short_term: 30_000, life: 40_000 } as const

/** A cylinder of more does not belong in a cabinet without vents. Judgement. */
const CABINET_G = 2000

function roomVolume(input: RoomSafetyInput): number {
  const { room_volume_m3, room_length_m, room_width_m, room_height_m } = input
  if (room_volume_m3 !== undefined) return room_volume_m3
  if (room_length_m === undefined || room_width_m === undefined || room_height_m === undefined) {
    throw new OutOfDomain("room_volume_m3", "Give the room's volume, or its length, width and height.")
  }
  const volume = room_length_m * room_width_m * room_height_m
  withFields({ room_volume_m3: "room_length_m" }, () => checkBounds({ room_volume_m3: volume }, quantities))
  return volume
}

function verdictOn(peak_ppm: number): RoomVerdict {
  if (peak_ppm >= LIMITS_PPM.life) return "life_danger"
  if (peak_ppm >= LIMITS_PPM.short_term) return "leave"
  return peak_ppm >= LIMITS_PPM.working_day ? "ventilate" : "ok"
}

const SEVERITY: Readonly<Record<RoomVerdict, Severity>> = {
  ok: "info",
  ventilate: "warning",
  leave: "danger",
  life_danger: "danger",
}

const ADVICE: Readonly<Record<RoomVerdict, string>> = {
  ok: "below the 5,000 ppm of a working day. Open a window all the same.",
  ventilate: "above the 5,000 ppm of a working day. Ventilate before anyone stays in the room.",
  leave:
    "above the 30,000 ppm that are bearable for minutes. Leave, let in air from outside, do not go back in.",
  life_danger:
    "above the 40,000 ppm that endanger life at once. Leave, call for help, do not go in without breathing apparatus.",
}

function release({ peak_ppm, verdict }: RoomSafety, cylinder_mass_g: number): Caution {
  return {
    code: "full_release",
    severity: SEVERITY[verdict],
    message: `If ${figures(cylinder_mass_g, 3)} g escape at once the room holds ${figures(peak_ppm, 2)} ppm, ${ADVICE[verdict]}`,
  }
}

function leak(leak_steady_ppm: number | null): Caution[] {
  if (leak_steady_ppm === null) return []
  const verdict = verdictOn(leak_steady_ppm)
  const message = `The leak leads to ${figures(leak_steady_ppm, 2)} ppm, ${ADVICE[verdict]} Close the cylinder and find it with soapy water.`
  return [{ code: "leak", severity: SEVERITY[verdict], message }]
}

const pooling: Caution = {
  code: "pools_low",
  severity: "warning",
  message:
    "CO2 is one and a half times as heavy as air: near the floor, in a cabinet or a cellar it is many times what a mixed room holds. Children and animals breathe there first. Put a detector low.",
}

const noVentilation: Caution = {
  code: "no_ventilation",
  severity: "danger",
  message:
    "Without air changes the room never falls below 5,000 ppm again. Give it a vent or keep the cylinder elsewhere.",
}

function cabinet(cylinder_mass_g: number): Caution {
  return {
    code: "cabinet_vents",
    severity: "warning",
    message: `A cylinder of ${figures(cylinder_mass_g / 1000, 2)} kg belongs in no cabinet without vents at top and bottom.`,
  }
}
