import {
  createShrinkRate,
  DISSOLVED_BELOW_MM,
  type DissolvingInto,
  dissolve,
} from "@/lib/gas/bubble-dissolution"
import { bubbleRise } from "@/lib/gas/bubble-rise"
import { STANDARD_ATMOSPHERE_PA } from "@/lib/gas/carbon-dioxide"
import { findRoot } from "@/lib/numeric/find-root"
import { boreArea } from "./loop"
import { M3_S_PER_L_H } from "./pump-curve"

/**
 * Physics of a through-flow reactor: gas enters at the top, water flows down, bubbles are held until they dissolve.
 * What surrounds the bubbles (`DissolvingInto`) is the water at the reactor's pressure and inlet CO2.
 */

/** Length that uneven flow and the inlet's jet ask for over the calm length. @source engineeringJudgement */
export const JETTING_FACTOR = 1.5

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

export interface CarryOver {
  /** The largest bubble that the water can sweep down: it rises as fast as the water falls. */
  readonly start_diameter_mm: number
  readonly time_s: number
  /** Length of calm body in which it dissolves, m. */
  readonly length_m: number
}

/**
 * How long a body must be to let no bubble out: the largest bubble that water of a speed can sweep down, at most the
 * feed bubble, travels ∫(v − u)dt until it is dissolved. `null` when the water is too full of CO2 to dissolve it.
 *
 * Rise and mass transfer: cliftGraceWeber1978, frossling1938 through `dissolve`. 5-40 °C, feed bubbles to 3 mm.
 */
export function carryOver(velocity_m_s: number, feed_mm: number, into: DissolvingInto): CarryOver | null {
  const start_diameter_mm = sweptBubble(velocity_m_s, feed_mm, into)
  const course = dissolve(start_diameter_mm, into)
  if (course === null) return null
  return { start_diameter_mm, time_s: course.time_s, length_m: velocity_m_s * course.time_s - course.rise_m }
}

/** Diameter of the largest bubble, at most the feed bubble, that rises no faster than the water falls, mm. */
function sweptBubble(velocity_m_s: number, feed_mm: number, { water }: DissolvingInto): number {
  if (velocity_m_s >= bubbleRise(feed_mm, water)) return feed_mm
  if (velocity_m_s <= bubbleRise(DISSOLVED_BELOW_MM, water)) return DISSOLVED_BELOW_MM
  return findRoot({
    f: (diameter_mm) => bubbleRise(diameter_mm, water) - velocity_m_s,
    low: DISSOLVED_BELOW_MM,
    high: feed_mm,
    tolerance: 1e-9,
  })
}

/**
 * Share of the gas fed that leaves the body as bubbles, 0-1: the volume that the largest swept bubble still has at
 * the end of a calm length, over that of the feed bubble.
 */
export function escapedFraction(p: {
  readonly velocity_m_s: number
  readonly feed_mm: number
  readonly length_m: number
  readonly into: DissolvingInto
}): number {
  const { velocity_m_s, feed_mm, length_m, into } = p
  const rate = createShrinkRate(into)
  let diameter_mm = sweptBubble(velocity_m_s, feed_mm, into)
  const step_mm = (diameter_mm - DISSOLVED_BELOW_MM) / STEPS
  let travelled_m = 0
  for (let i = 0; i < STEPS; i++) {
    const middle = diameter_mm - step_mm / 2
    const shrinking = rate(middle)
    if (shrinking <= 0) break
    travelled_m += (step_mm * Math.max(0, velocity_m_s - bubbleRise(middle, into.water))) / shrinking
    if (travelled_m >= length_m) break
    diameter_mm -= step_mm
    if (i === STEPS - 1) return 0
  }
  return (diameter_mm / feed_mm) ** 3
}

/**
 * The greatest water speed at which a body of a length lets no bubble out, m/s, with the jetting factor. The lengths
 * of all bubbles come from one pass over their diameters, since each is a part of the next larger one's.
 */
export function greatestVelocity(length_m: number, feed_mm: number, into: DissolvingInto): number {
  const allowed_m = length_m / JETTING_FACTOR
  const rate = createShrinkRate(into)
  const step_mm = (feed_mm - DISSOLVED_BELOW_MM) / STEPS
  let time_s = 0
  let rise_m = 0
  let last = { velocity_m_s: 0, length_m: 0 }
  for (let i = 0; i < STEPS; i++) {
    const middle = DISSOLVED_BELOW_MM + (i + 0.5) * step_mm
    const shrinking = rate(middle)
    if (shrinking <= 0) return last.velocity_m_s
    time_s += step_mm / shrinking
    rise_m += (step_mm * bubbleRise(middle, into.water)) / shrinking
    const velocity_m_s = bubbleRise(middle + step_mm / 2, into.water)
    const needed_m = velocity_m_s * time_s - rise_m
    if (needed_m >= allowed_m) {
      const share = (allowed_m - last.length_m) / (needed_m - last.length_m)
      return last.velocity_m_s + share * (velocity_m_s - last.velocity_m_s)
    }
    last = { velocity_m_s, length_m: needed_m }
  }
  return (allowed_m + rise_m) / time_s
}

const STEPS = 64

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
