import { type CarbonateSystem, co2AtPh } from "@/lib/chemistry/carbonate"
import { checkBounds } from "@/lib/units/bounds"
import { figures } from "@/lib/units/figures"
import { OutOfDomain, withFields } from "@/lib/units/out-of-domain"
import { quantities } from "@/lib/units/quantities"
import {
  AGITATION_K600_CM_H,
  exchangeFromNight,
  exchangeRate,
  K600_FACTOR,
  schmidtExponent,
  transferVelocity,
} from "./exchange"
import type { Judged, OvernightReadings, TankInput } from "./tank-input"

export interface ExchangeContext {
  readonly volume_l: number
  readonly rest_co2_mg_l: number
  readonly system: CarbonateSystem
}

/**
 * The tank's exchange with the air, 1/h: measured over a night if there are readings, else from the surface's class.
 *
 * Throws `OutOfDomain` on the readings, the surface or the volume when they make no exchange that a tank could have.
 */
export function tankExchange(input: TankInput, context: ExchangeContext): Judged {
  const exchange = input.overnight
    ? measuredExchange(input, input.overnight, context)
    : guessedExchange(input, context.volume_l)
  const { min, max } = quantities.exchange_per_h
  if (exchange.value >= min && exchange.value <= max) return exchange
  throw new OutOfDomain(
    input.overnight ? "overnight.end_ph" : "surface_area_m2",
    `This makes an exchange of ${figures(exchange.value, 3)} per hour, outside ${min} to ${max}. Check surface, volume and readings.`,
  )
}

function guessedExchange(input: TankInput, volume_l: number): Judged {
  const { agitation, temperature_c } = input
  const k600_cm_h = AGITATION_K600_CM_H[agitation]
  const schmidt_exponent = schmidtExponent(agitation)
  const transfer_velocity_cm_h = transferVelocity({ k600_cm_h, schmidt_exponent, temperature_c })
  const value = exchangeRate({ transfer_velocity_cm_h, surface_area_m2: tankSurface(input), volume_l })
  return {
    value,
    low: value / K600_FACTOR,
    high: value * K600_FACTOR,
    assumption: {
      code: "exchange",
      message: `A ${agitation} surface trades gas at ${k600_cm_h} cm/h (k600), right within a factor of ${K600_FACTOR}: what CO2 the tank holds beyond its rest halves in ${figures(Math.LN2 / value, 2)} h. Two pH readings in one night with the gas off replace this guess.`,
    },
    sources: ["wanninkhof2014", "jahneExchange1987", "coleCaraco1998", "engineeringJudgement"],
  }
}

/** Standard error of the difference of two readings of one meter in one night; its offset cancels. Judgement. */
const REPEATABILITY_PH = 0.03

/** A measurement that leaves more than this factor either way is worth no more than the guess. */
const WIDEST_SPREAD = K600_FACTOR

function measuredExchange(input: TankInput, night: OvernightReadings, context: ExchangeContext): Judged {
  withFields(
    { start_ph: "overnight.start_ph", end_ph: "overnight.end_ph", elapsed_h: "overnight.elapsed_h" },
    () => checkBounds(night, quantities),
  )
  const { kh_dkh } = input
  const co2 = (ph: number, field: string) =>
    withFields({ ph: field }, () => co2AtPh(context.system, { ph, kh_dkh }))
  const start_co2_mg_l = co2(night.start_ph, "overnight.start_ph")
  const end_co2_mg_l = co2(night.end_ph, "overnight.end_ph")
  const { rest_co2_mg_l } = context
  const value = exchangeFromNight({ ...night, start_co2_mg_l, end_co2_mg_l, rest_co2_mg_l })
  if (value === null) {
    throw new OutOfDomain(
      "overnight.end_ph",
      `CO2 went from ${figures(start_co2_mg_l, 3)} to ${figures(end_co2_mg_l, 3)} mg/L, but it has to fall towards ${figures(rest_co2_mg_l, 3)}. Read earlier in the night, before the pH settles, with gas and light off.`,
    )
  }
  const reading = Math.LN10 * REPEATABILITY_PH * (end_co2_mg_l / (end_co2_mg_l - rest_co2_mg_l))
  const spread = Math.exp((1.96 * reading) / (value * night.elapsed_h))
  if (spread > WIDEST_SPREAD) {
    throw new OutOfDomain(
      "overnight.end_ph",
      `From ${figures(start_co2_mg_l, 3)} to ${figures(end_co2_mg_l, 3)} mg/L the readings tell the exchange no better than a guess: the change is too small, or the end too near the ${figures(rest_co2_mg_l, 2)} mg/L at rest. Leave hours between them, and end while the pH still rises.`,
    )
  }
  return {
    value,
    low: value / spread,
    high: value * spread,
    assumption: {
      code: "exchange_measured",
      message: `Your two readings show that what CO2 the tank holds beyond its rest halves in ${figures(Math.LN2 / value, 2)} h. This replaces surface, agitation and their guess.`,
    },
    sources: [],
  }
}

function tankSurface({ surface_area_m2, length_cm, width_cm }: TankInput): number {
  if (surface_area_m2 !== undefined) return surface_area_m2
  if (length_cm === undefined || width_cm === undefined) {
    throw new OutOfDomain("surface_area_m2", "Give the open water surface, or length and width of the tank.")
  }
  return (length_cm * width_cm) / 10_000
}
