import type { DissolvingInto } from "@/lib/gas/bubble-dissolution"
import { STANDARD_ATMOSPHERE_PA } from "@/lib/gas/carbon-dioxide"
import { boreArea } from "./loop"
import { M3_S_PER_L_H } from "./pump-curve"

/**
 * Physics of a through-flow reactor: gas enters at the top, water flows down, bubbles are held until they dissolve.
 * What surrounds the bubbles (`DissolvingInto`) is the water at the reactor's pressure and inlet CO2.
 */

/** Mass transfer through the calm surface of a gas cap, m/s; 3e-5 to 3e-4. @source engineeringJudgement */
const CAP_TRANSFER_M_S = 1e-4

/** Nitrogen and oxygen that gather in an aged cap, atm: air less its water vapour. @source engineeringJudgement */
const AGED_INERT_ATM = 0.97

/** Water speed in a bore, m/s. */
export function boreVelocity(flow_l_h: number, diameter_mm: number): number {
  return (flow_l_h * M3_S_PER_L_H) / boreArea(diameter_mm / 1000)
}

/** The flow that reaches a speed in a bore, L/h: the inverse of {@link boreVelocity}. */
export function flowAtVelocity(velocity_m_s: number, diameter_mm: number): number {
  return (velocity_m_s * boreArea(diameter_mm / 1000)) / M3_S_PER_L_H
}

export interface GasCap {
  /** What a flat cap of pure CO2 under the lid dissolves, mg/min. */
  readonly fresh_mg_min: number
  /** The same after hours, when nitrogen and oxygen from the water have filled most of it. */
  readonly aged_mg_min: number
}

/** What the surface of a gas cap over the body's whole bore dissolves; 0 where the water holds more already. */
export function gasCap(body_mm: number, into: DissolvingInto): GasCap {
  const area_m2 = boreArea(body_mm / 1000)
  // mg/L are g/m³: m/s · m² · g/m³ is g/s, times 1000 · 60 mg/min.
  const dissolved = (co2_atm: number) =>
    CAP_TRANSFER_M_S * area_m2 * Math.max(0, into.henry_mg_l_atm * co2_atm - into.co2_mg_l) * 60_000
  const dry_atm = into.pressure_pa / STANDARD_ATMOSPHERE_PA - into.vapour_pressure_atm
  return { fresh_mg_min: dissolved(dry_atm), aged_mg_min: dissolved(dry_atm - AGED_INERT_ATM) }
}

/** CO2 that the water could hold under pure CO2 at the reactor's pressure, mg/L. */
export function saturation({ henry_mg_l_atm, pressure_pa, vapour_pressure_atm }: DissolvingInto): number {
  return henry_mg_l_atm * (pressure_pa / STANDARD_ATMOSPHERE_PA - vapour_pressure_atm)
}

/** CO2 that leaves the reactor once `feed_mg_min` has dissolved in the flow, mg/L. */
export function outletCo2(inlet_co2_mg_l: number, feed_mg_min: number, flow_l_h: number): number {
  return inlet_co2_mg_l + (60 * feed_mg_min) / flow_l_h
}

/**
 * Volume of body that 2 mm bubbles of an aged gas, filling 5 % of it, need to dissolve a feed, L.
 *
 * @source engineeringJudgement: k_L 9e-5 m/s (frossling1938 at 2 mm), a driving difference of 0.21 kg/m³.
 */
export function contactVolume(feed_mg_min: number): number {
  const BUBBLE_M = 0.002
  const HOLD_UP = 0.05
  const TRANSFER_M_S = 9e-5
  const DIFFERENCE_KG_M3 = 0.21
  const feed_kg_s = feed_mg_min / 6e7
  return (1000 * feed_kg_s * BUBBLE_M) / (6 * HOLD_UP * TRANSFER_M_S * DIFFERENCE_KG_M3)
}
