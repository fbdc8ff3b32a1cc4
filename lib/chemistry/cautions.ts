import { figures } from "@/lib/units/figures"
import type { Caution } from "./answer"
import { co2Band } from "./level"

/** The cautions that every room of the engine shares. Each room shows those that apply to its own result. */

const SIGNS = "gasping at the surface, fast breathing, fish lying still, shrimp fleeing the water"

/** What the upper bound of CO2 means for the animals. `pco2_uatm` is that of the upper bound. */
export function livestock({
  co2_high_mg_l,
  pco2_uatm,
}: {
  readonly co2_high_mg_l: number
  readonly pco2_uatm: number
}): Caution {
  const { severity, up_to_mg_l } = co2Band(co2_high_mg_l)
  const mayBe = `CO2 may be as high as ${figures(co2_high_mg_l, 2)} mg/L (${figures(pco2_uatm, 2)} µatm)`
  return { code: "livestock", severity, message: `${mayBe}${meaning(up_to_mg_l)}` }
}

function meaning(up_to_mg_l: number): string {
  if (up_to_mg_l <= 30) {
    return `. Healthy livestock usually bears that; low oxygen, the night, unfamiliar water and sensitive species change it. Watch for ${SIGNS}.`
  }
  if (up_to_mg_l <= 40) {
    return `, above the 30 mg/L that planted tanks aim at. Measure in a second way before you add gas, and watch for ${SIGNS}.`
  }
  if (up_to_mg_l <= 60) {
    return `. Above 40 mg/L many fish and shrimp suffer. Give less gas or measure more exactly, aerate, and watch for ${SIGNS}.`
  }
  return `. Above 60 mg/L animals are in danger: stop the gas and aerate until a surer reading shows less. Signs of distress: ${SIGNS}. Deaths within a day are recorded from 150 mg/L.`
}

export const raiseSlowly: Caution = {
  code: "raise_slowly",
  severity: "warning",
  message:
    "Raise CO2 in small steps over several days, with the livestock watched for the first hours after each step. At the first sign of distress stop the gas and aerate.",
}

export const cylinderSecured: Caution = {
  code: "cylinder_secured",
  severity: "danger",
  message:
    "Stand the cylinder upright and fasten it, valve protected. Never heat it, and keep it below 50 °C. Only a licensed filler may fill and test it; a disposable cartridge is never refilled.",
}

export const roomVentilation: Caution = {
  code: "room_ventilation",
  severity: "warning",
  message:
    "CO2 is heavier than air and gathers in cabinets and cellars. Ventilate; 5,000 ppm is the limit over a working day, 30,000 ppm for minutes. If you feel short of breath or dizzy, leave and let in air from outside.",
}

export const mainsNearWater: Caution = {
  code: "mains_near_water",
  severity: "warning",
  message:
    "Mains equipment stands near water: give every cable a drip loop, put the circuit behind a residual-current device (30 mA), and unplug before you reach into the water.",
}

export const checkValve: Caution = {
  code: "check_valve",
  severity: "warning",
  message:
    "Put a check valve in the gas line close to the water, and replace it when it no longer holds: without gas, pump pressure and siphon push water back to the solenoid and the reducer.",
}

export const hoseClamps: Caution = {
  code: "hose_clamps",
  severity: "warning",
  message:
    "Clamp every hose joint of the water loop. A joint that slips empties the tank onto the floor. Look for leaks after an hour and after a day.",
}

export const localRules: Caution = {
  code: "local_rules",
  severity: "info",
  message:
    "Local codes, the makers' manuals and licensed practice come first. This result informs; it replaces none of them.",
}
