import type { Caution } from "@/lib/chemistry/answer"
import { cylinderSecured, localRules, roomVentilation } from "@/lib/chemistry/cautions"
import { figures } from "@/lib/units/figures"
import type { CylinderInput, CylinderLife } from "./cylinder-life"

/** What the person must know about these cylinders at this temperature. */
export function cylinderCautions(
  cylinders: readonly CylinderLife[],
  { ambient_c }: Pick<CylinderInput, "ambient_c">,
): Caution[] {
  const each = (make: (cylinder: CylinderLife) => Caution | undefined) =>
    cylinders.map(make).filter((caution) => caution !== undefined)
  return [
    ...each(overfilled),
    ...hot(ambient_c),
    ...each((cylinder) => liquidFull(cylinder, ambient_c)),
    ...each(gauge),
    ...each(longLife),
    ...each(cartridge),
    endOfCharge,
    cylinderSecured,
    roomVentilation,
    localRules,
  ]
}

/** °C above which to warn, and above which a cylinder must not stay. */
const WARM_C = 30
const HOT_C = 50

function titled(cylinder: CylinderLife): string {
  return cylinder.name ?? `The cylinder of ${figures(cylinder.cylinder_mass_g, 3)} g`
}

function overfilled(cylinder: CylinderLife): Caution | undefined {
  if (cylinder.fill_ratio_ok) return undefined
  const limit = cylinder.max_fill_ratio_kg_l
  return {
    code: "overfilled",
    severity: "danger",
    message:
      limit === 0
        ? `${titled(cylinder)} is tested below 190 bar: it is not made for CO2. Do not use it.`
        : `${titled(cylinder)} is filled to ${figures(cylinder.fill_ratio_kg_l, 3)} kg/L, above the ${limit} that its test pressure allows. In a warm room it may burst its disc. Take it back to the filler.`,
  }
}

function hot(ambient_c: number): Caution[] {
  if (ambient_c <= WARM_C) return []
  const message =
    ambient_c > HOT_C
      ? `At ${figures(ambient_c, 3)} °C a full cylinder comes near its test pressure. Take it out of the car, the sun or the heater's reach now.`
      : `At ${figures(ambient_c, 3)} °C a full cylinder stands far above its usual pressure. Keep it in a cooler place.`
  return [{ code: "hot_cylinder", severity: ambient_c > HOT_C ? "danger" : "warning", message }]
}

function liquidFull(cylinder: CylinderLife, ambient_c: number): Caution | undefined {
  const { liquid_full_c, phase } = cylinder
  if (phase === "gas" || phase === "two_phase" || liquid_full_c === null) return undefined
  return {
    code: "liquid_full",
    severity: "warning",
    message: `${titled(cylinder)} holds liquid alone above ${figures(liquid_full_c, 3)} °C, so at ${figures(ambient_c, 3)} °C it reads ${figures(cylinder.pressure_bar_abs, 3)} bar, more than the vapour pressure. Let a fresh charge cool, and never heat it.`,
  }
}

function gauge(cylinder: CylinderLife): Caution | undefined {
  const { liquid_gone_g, cylinder_mass_g } = cylinder
  if (liquid_gone_g === null || liquid_gone_g >= cylinder_mass_g) return undefined
  return {
    code: "gauge_is_flat",
    severity: "info",
    message: `The gauge of ${titled(cylinder).replace("The", "the")} stays the same until ${figures(liquid_gone_g, 2)} g are left (${figures((100 * liquid_gone_g) / cylinder_mass_g, 2)} %), and falls only then. Weigh the cylinder to know what is in it.`,
  }
}

function longLife(cylinder: CylinderLife): Caution | undefined {
  if (cylinder.days < 5 * 365) return undefined
  return {
    code: "test_interval",
    severity: "info",
    message: `${titled(cylinder)} outlasts its periodic test (5 to 10 years, by country and make). A filler refuses it after the date stamped on it.`,
  }
}

/** g and days: below both a cartridge costs more than a small cylinder. Common practice, no source. */
const CARTRIDGE_G = 100
const CARTRIDGE_DAYS = 30

function cartridge(cylinder: CylinderLife): Caution | undefined {
  if (cylinder.cylinder_mass_g > CARTRIDGE_G || cylinder.days >= CARTRIDGE_DAYS) return undefined
  return {
    code: "cartridge_uneconomic",
    severity: "info",
    message: `${titled(cylinder)} lasts ${figures(cylinder.days, 2)} days. A refillable cylinder costs less from the first months; disposable cartridges suit tanks of up to about 40 L.`,
  }
}

const endOfCharge: Caution = {
  code: "end_of_charge",
  severity: "warning",
  message:
    "When the gauge falls, refill soon: the outlet pressure of a single-stage reducer rises as the cylinder empties and can send a surge of gas into the tank.",
}
