import { carbonateSystem, phAtCo2 } from "@/lib/chemistry/carbonate"
import { ionicStrength } from "@/lib/chemistry/ionic-strength"
import { type Co2Level, co2Bands } from "@/lib/chemistry/level"
import { COVERAGE_95 } from "@/lib/chemistry/uncertainty"

/** A point of the map: from 0 at the left and top to 1 at the right and bottom. */
export interface Place {
  readonly x: number
  readonly y: number
}

/** What the map spans: pH evenly, KH by its logarithm, so that equal CO2 is nearly a straight line. */
const ph = { from: 5.5, to: 8.5 }
const kh_dkh = { from: 0.5, to: 20 }
const steps = 12

/** Where a water lies on the map; outside 0 to 1 where the map does not reach. */
export function placeOnMap(water: { readonly ph: number; readonly kh_dkh: number }): Place {
  const decades = Math.log(kh_dkh.to / kh_dkh.from)
  return {
    x: (water.ph - ph.from) / (ph.to - ph.from),
    y: 1 - Math.log(water.kh_dkh / kh_dkh.from) / decades,
  }
}

/** The line of waters that hold so much CO2 at a temperature, from the softest to the hardest. */
export function lineOf(co2_mg_l: number, temperature_c: number): Place[] {
  return Array.from({ length: steps + 1 }, (_, step) => {
    const kh = kh_dkh.from * (kh_dkh.to / kh_dkh.from) ** (step / steps)
    return placeOnMap({ ph: phOf({ co2_mg_l, kh_dkh: kh, temperature_c }), kh_dkh: kh })
  })
}

/** The bands of CO2 as areas of the map, those of one level as one. */
export function areas(temperature_c: number): { level: Co2Level; outline: Place[] }[] {
  const levels = [...new Set(co2Bands.map(({ level }) => level))]
  return levels.map((level) => {
    const index = co2Bands.findIndex((band) => band.level === level)
    const from = co2Bands[index - 1]?.up_to_mg_l ?? 0
    const to = co2Bands.findLast((band) => band.level === level)!.up_to_mg_l
    // Little CO2 is a high pH: the least lies beyond the right edge, the most beyond the left.
    const right = from === 0 ? edge(2) : lineOf(from, temperature_c)
    const left = Number.isFinite(to) ? lineOf(to, temperature_c) : edge(-1)
    return { level, outline: [...right, ...left.reverse()] }
  })
}

/** The waters that the readings may as well stand for: 95 % in pH and in KH, each by its standard error. */
export function doubtOf(
  water: { readonly ph: number; readonly kh_dkh: number },
  errors: { readonly ph_error: number; readonly kh_error_dkh: number },
): Place[] {
  const points = 48
  return Array.from({ length: points }, (_, point) => {
    const angle = (2 * Math.PI * point) / points
    return placeOnMap({
      ph: water.ph + COVERAGE_95 * errors.ph_error * Math.cos(angle),
      kh_dkh: Math.max(0.01, water.kh_dkh + COVERAGE_95 * errors.kh_error_dkh * Math.sin(angle)),
    })
  })
}

/** The pH at which a water holds so much CO2. */
export function phOf(water: {
  readonly co2_mg_l: number
  readonly kh_dkh: number
  readonly temperature_c: number
}): number {
  const system = carbonateSystem({ ...water, ...ionicStrength({ kh_dkh: water.kh_dkh }) })
  return phAtCo2(system, water)
}

function edge(x: number): Place[] {
  return [
    { x, y: 1 },
    { x, y: 0 },
  ]
}
