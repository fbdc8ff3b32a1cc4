import { activityCoefficients } from "@/lib/chemistry/activity"
import { airPco2Atm, carbonateSystem, co2AtPh, co2AtPressure } from "@/lib/chemistry/carbonate"
import { logHenry, logK1 } from "@/lib/chemistry/constants"
import { waterDensityKgL, waterVapourPressureAtm } from "@/lib/chemistry/water"
import { bubbleTravel } from "@/lib/flow/bubble-travel"
import { boreVelocity, gasCap, outletCo2, saturation as reactorSaturation } from "@/lib/flow/reactor"
import { holdFeed, hoursToRise, limitLevel, type TankBalance } from "@/lib/gas/balance"
import {
  bubbleVolume,
  counterGasDensity,
  counterWater,
  milligramsPerMillilitre,
  tateVolume,
} from "@/lib/gas/bubble-count"
import { type DissolvingInto, risingBubbleEfficiency } from "@/lib/gas/bubble-dissolution"
import { bubbleMassTransfer, bubbleRise, bubbleWater, cleanBubbleRise } from "@/lib/gas/bubble-rise"
import { compressibility, STANDARD_ATMOSPHERE_PA } from "@/lib/gas/carbon-dioxide"
import { simulateController } from "@/lib/gas/controller-simulation"
import { cylinderLife } from "@/lib/gas/cylinder-life"
import { cylinderState } from "@/lib/gas/cylinder-state"
import { type DayPhase, dayBudget, dayLevel, gasHours, periodicDay } from "@/lib/gas/day"
import { saturation, singlePhasePressure } from "@/lib/gas/equation-of-state"
import { exchangeRate, schmidtNumber, transferVelocity } from "@/lib/gas/exchange"
import { phCurve } from "@/lib/gas/ph-curve"
import {
  gasVolume,
  hoursAbove,
  leakLevelAfter,
  meanAfterRelease,
  peakAfterRelease,
  steadyLeakLevel,
} from "@/lib/gas/room-air"
import { levelAfter } from "@/lib/numeric/first-order"
import { CO2_MG_PER_MOL } from "@/lib/units/chemistry"
import { BadRow, type Deviation, deviation, type ReferenceFormat, type Row, relativeTo } from "./format"

/** Gas rows made by SciPy: `inputs` and `outputs` are lists of name=value. Tolerances are those of the specification. */
export const gas: ReferenceFormat = {
  name: "gas by SciPy",
  recognises: (header) => ["type", "inputs", "outputs"].every((name) => header.includes(name)),
  check(row) {
    const kind = kinds[row.type ?? ""]
    if (!kind) throw new BadRow(`unknown kind: ${row.type}`)
    const computed = kind(inputsOf(row))
    return Object.entries(listOf(row, "outputs")).map(([quantity, text]) =>
      compare(row.type!, quantity, text, computed[quantity]),
    )
  },
}

/** A number and how near it has to come; a number alone has to agree to the printed digits. */
type Computed = number | string | { readonly value: number; readonly within: number }
type Kind = (input: (name: string) => number) => Readonly<Record<string, Computed>>

/** Same closed form in other code. */
const EXACT = 1e-6
/** The rows' water is the compact form (Davies activities, Buck's vapour pressure); the engine has one chemistry. */
const CHEMISTRY = 0.005
/** Bubble courses, from differential equations. */
const COURSE = 0.002
/** Cycles and duty of the controller. */
const CYCLES = 0.01

const chemistry = (value: number) => ({ value, within: CHEMISTRY })
const course = (value: number) => ({ value, within: COURSE })

const kinds: Readonly<Record<string, Kind>> = {
  chem(input) {
    const temperature_c = input("T_C")
    const water = { temperature_c, ionic_strength_mol_l: input("I_molL") }
    const system = carbonateSystem(water)
    const air = airPco2Atm({ temperature_c, air_co2_ppm: input("air_ppm") })
    return {
      CO2_mgL: chemistry(co2AtPh(system, { ph: input("pH"), kh_dkh: input("dKH") })),
      // Named mg/L, but made with K_H as it is printed: per kilogram of water.
      Ceq_mgL: chemistry(co2AtPressure(system, air) / waterDensityKgL(temperature_c)),
      KH_mgL_atm: chemistry(co2AtPressure(system, 1) / waterDensityKgL(temperature_c)),
      pK1: -logK1(temperature_c),
      gamma: chemistry(activityCoefficients(water).hco3),
    }
  },
  exchange(input) {
    const temperature_c = input("T_C")
    const velocity = transferVelocity({
      k600_cm_h: input("k600_cm_h"),
      schmidt_exponent: input("n"),
      temperature_c,
    })
    const rate = exchangeRate({
      transfer_velocity_cm_h: velocity,
      surface_area_m2: input("A_m2"),
      volume_l: input("V_L"),
    })
    return { Sc: schmidtNumber(temperature_c), kL_cm_h: velocity, k_per_h: rate }
  },
  lead(input) {
    const tank = tankOf(input)
    const feed_mg_min = input("F_mg_min")
    const hours = hoursToRise(tank, {
      feed_mg_min,
      start_co2_mg_l: input("C0_mgL"),
      co2_mg_l: input("fraction") * input("target_mgL"),
    })
    return { lead_h: hours ?? Number.POSITIVE_INFINITY, Cinf_mgL: limitLevel(tank, feed_mg_min, false) }
  },
  decay(input) {
    const k = input("k_per_h")
    const limit = input("Ceq_mgL") + input("resp_mgL_h") / k
    return { C_mgL: levelAfter({ start: input("C0_mgL"), limit, k, time: input("hours") }) }
  },
  day_constant: (input) => dayOf(input, null),
  day_hold: (input) => dayOf(input, input("target_mgL")),
  controller: controllerOf,
  saturation(input) {
    const temperature_c = input("T_C")
    const at = saturation(temperature_c)
    if (!at) throw new BadRow(`no saturation at ${temperature_c} °C`)
    return {
      psat_bar: at.pressure_pa / 1e5,
      rho_liq: at.liquid_kg_m3,
      rho_vap: at.vapour_kg_m3,
      eos_p_of_rho_vap_bar: singlePhasePressure({ density_kg_m3: at.vapour_kg_m3, temperature_c }) / 1e5,
    }
  },
  cylinder_pressure(input) {
    const state = cylinderState({ fill_kg_l: input("fill_kg_L"), temperature_c: input("T_C") })
    return {
      p_bar: state.pressure_bar_abs,
      state: state.phase === "two_phase" ? "two-phase" : "single-phase",
    }
  },
  cylinder_life(input) {
    const { result } = cylinderLife({
      cylinder_mass_g: input("fill_kg") * 1000,
      fill_ratio_kg_l: input("fill_kg_L"),
      ambient_c: input("T_C"),
      daily_use_g_day: input("g_per_day"),
      cut_off_bar_abs: input("cutoff_bar_abs"),
      refill_price: input("refill_price"),
      usable_fraction: 1,
    })
    return {
      water_capacity_L: result.water_capacity_l,
      residual_g: result.residual_g,
      usable_g: result.usable_g,
      days: result.days,
      refills_per_year: result.refills_per_year,
      cost_per_month: result.cost_per_month!,
      liquid_gone_g: result.liquid_gone_g ?? Number.NaN,
    }
  },
  room_full_release(input) {
    const room = roomOf(input)
    const mass_g = input("kg") * 1000
    const gas_m3 = gasVolume({ mass_g, room_c: room.room_c })
    const peak = peakAfterRelease(room, mass_g)
    return {
      gas_m3,
      ppm_simple: room.background_ppm + (1e6 * gas_m3) / room.room_volume_m3,
      ppm_peak: peak,
      twa8h_ppm: meanAfterRelease(room, peak, 8),
      h_to_5000ppm: hoursAbove(room, peak, 5000) ?? Number.POSITIVE_INFINITY,
    }
  },
  room_leak(input) {
    const room = roomOf(input)
    const leak = input("leak_g_h")
    return {
      ppm_at_hours: leakLevelAfter(room, leak, input("hours")),
      ppm_steady: steadyLeakLevel(room, leak),
    }
  },
  bubble_count(input) {
    const temperature_c = input("T_C")
    const counter_pressure_bar = input("counter_gauge_bar")
    const bore = input("nozzle_id_mm")
    const liquid = counterWater(temperature_c)
    const volume = bubbleVolume(bore, liquid)
    const mass = volume * counterGasDensity({ counter_pressure_bar, temperature_c })
    const feed = input("feed_mg_min")
    return {
      tate_uL: tateVolume(bore, liquid),
      bubble_uL: volume,
      Z: compressibility({
        pressure_pa: STANDARD_ATMOSPHERE_PA + counter_pressure_bar * 1e5,
        temperature_c,
      }),
      mg_per_bubble: mass,
      bubbles_per_s: feed / 60 / mass,
      mL_min_at_1atm: feed / milligramsPerMillilitre(temperature_c),
    }
  },
  bubble_rise(input) {
    const water = bubbleWater(input("T_C"))
    const diameter = input("d_mm")
    return {
      u_t_m_s: bubbleRise(diameter, water),
      kL_rigid_m_s: bubbleMassTransfer(diameter, water),
      D_CO2: water.co2_diffusivity_m2_s,
      mendelson_m_s: cleanBubbleRise(diameter, water),
    }
  },
  diffuser_eta(input) {
    const efficiency = risingBubbleEfficiency({
      bubble_diameter_mm: input("d_mm"),
      depth_m: input("depth_m"),
      plume_m_s: input("plume_m_s"),
      into: surroundings(input("T_C"), input("C_mgL")),
    })
    return { eta: course(efficiency) }
  },
  reactor(input) {
    const body = input("body_id_mm")
    const flow = input("Q_L_h")
    const inlet = input("C_in_mgL")
    const feed = input("F_mg_min")
    const pressure_pa = STANDARD_ATMOSPHERE_PA + input("gauge_bar") * 1e5
    const into: DissolvingInto = { ...surroundings(input("T_C"), inlet), pressure_pa }
    const velocity = boreVelocity(flow, body)
    const travel = bubbleTravel(input("feed_bubble_mm"), into).carryOver(velocity)
    const cap = gasCap(body, into)
    return {
      v_body: velocity,
      v_nozzle: boreVelocity(flow, input("nozzle_id_mm")),
      d_start_mm: course(travel.start_diameter_mm),
      t_dissolve_s: course(travel.time_s),
      L_req_m: course(travel.length_m),
      pocket_fresh_mg_min: chemistry(cap.fresh_mg_min),
      pocket_aged_mg_min: chemistry(cap.aged_mg_min),
      C_out_mgL: outletCo2(inlet, feed, flow),
      C_sat_mgL: chemistry(reactorSaturation(into)),
    }
  },
}

/** The rows' own K_H is per kilogram of water and passed in as such; ours is 0.3 % less, per litre. */
function surroundings(temperature_c: number, co2_mg_l: number): Omit<DissolvingInto, "pressure_pa"> {
  return {
    water: bubbleWater(temperature_c),
    co2_mg_l,
    henry_mg_l_atm: CO2_MG_PER_MOL * 10 ** logHenry(temperature_c),
    vapour_pressure_atm: waterVapourPressureAtm(temperature_c),
  }
}

function tankOf(input: (name: string) => number, uptake = 0): TankBalance {
  return {
    volume_l: input("V_L"),
    exchange_per_h: input("k_per_h"),
    air_co2_mg_l: input("Ceq_mgL"),
    plant_uptake_mg_l_h: uptake,
    respiration_mg_l_h: 0,
    dissolution_efficiency: input("eta"),
  }
}

function dayOf(input: (name: string) => number, target_co2_mg_l: number | null): Record<string, number> {
  const tank = tankOf(input, input("uptake_mgL_h"))
  const plan = {
    feed_mg_min: input("F_mg_min"),
    target_co2_mg_l,
    lead_h: input("lead_h"),
    photoperiod_h: input("photoperiod_h"),
    close_before_dark_h: input("gas_off_before_dark_h"),
  }
  const phases = periodicDay(tank, plan)
  const held = phases.find(({ course: how }: DayPhase) => how === "hold")
  return {
    C_start_mgL: phases[0]!.start_co2_mg_l,
    C_lights_on: dayLevel(tank, phases, plan.lead_h),
    C_gas_off: dayLevel(tank, phases, gasHours(plan)),
    g_per_day: dayBudget(tank, phases).fed_mg / 1000,
    t_reach_h: held?.start_h ?? Number.POSITIVE_INFINITY,
    hold_mg_min: target_co2_mg_l === null ? Number.NaN : holdFeed(tank, target_co2_mg_l, true),
  }
}

/** Minutes of light and gas without a break: enough full cycles for a mean, also of a valve that opens once a day. */
const CONTROLLED_MIN = 14_400

function controllerOf(input: (name: string) => number): Record<string, Computed> {
  const off_ph = input("pH_off")
  const on_ph = off_ph + input("hysteresis_pH")
  const kh_dkh = input("dKH")
  const system = carbonateSystem({ temperature_c: input("T_C"), ionic_strength_mol_l: input("I_molL") })
  const { holding } = simulateController(
    {
      tank: tankOf(input, input("uptake_mgL_h")),
      feed_mg_min: input("F_mg_min"),
      off_ph,
      on_ph,
      probe_lag_min: input("probe_tau_s") / 60,
      line_lag_min: input("reactor_tau_s") / 60,
      ph: phCurve(system, kh_dkh),
    },
    {
      duration_min: CONTROLLED_MIN,
      gas_until_min: CONTROLLED_MIN,
      lights_from_min: 0,
      lights_until_min: CONTROLLED_MIN,
    },
    { co2_mg_l: co2AtPh(system, { ph: on_ph, kh_dkh }), source_mg_l_min: 0, probe_ph: on_ph },
  )
  if (!holding) throw new BadRow("the controller does not cycle")
  return {
    cycles_per_h: { value: (60 * holding.cycles) / holding.minutes, within: CYCLES },
    duty: { value: holding.open_min / holding.minutes, within: CYCLES },
    C_min: chemistry(holding.min_co2_mg_l),
    C_max: chemistry(holding.max_co2_mg_l),
  }
}

function roomOf(input: (name: string) => number) {
  return {
    room_volume_m3: input("room_m3"),
    air_changes_per_h: input("ach"),
    room_c: input("T_C"),
    background_ppm: input("bg_ppm"),
  }
}

function compare(kind: string, quantity: string, text: string, computed: Computed | undefined): Deviation {
  if (computed === undefined) throw new BadRow(`${kind} has no quantity ${quantity}`)
  if (typeof computed === "string") {
    const [expected, actual] = [1, computed === text ? 1 : 0]
    return deviation({ kind, quantity, expected, actual }, relativeTo(0))
  }
  const { value, within } = typeof computed === "number" ? { value: computed, within: EXACT } : computed
  return deviation({ kind, quantity, expected: numberOf(quantity, text), actual: value }, relativeTo(within))
}

function inputsOf(row: Row): (name: string) => number {
  const inputs = listOf(row, "inputs")
  return (name) => {
    const text = inputs[name]
    if (text === undefined) throw new BadRow(`input ${name} is missing`)
    return numberOf(name, text)
  }
}

function listOf(row: Row, column: string): Record<string, string> {
  const pairs = (row[column] ?? "").split(";").map((pair) => pair.split("="))
  if (!pairs.every((pair) => pair.length === 2 && pair[0] && pair[1])) {
    throw new BadRow(`${column} is not a list of name=value: ${row[column]}`)
  }
  return Object.fromEntries(pairs.map(([name, value]) => [name!.trim(), value!.trim()]))
}

function numberOf(name: string, text: string): number {
  const value = text === "inf" ? Number.POSITIVE_INFINITY : Number(text)
  if (Number.isNaN(value)) throw new BadRow(`${name} is not a number: ${text}`)
  return value
}
