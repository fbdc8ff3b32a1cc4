import fc from "fast-check"
import { describe, expect, test } from "vitest"
import { gasDefaults } from "@/lib/gas/defaults"
import { gasDemand } from "@/lib/gas/demand"
import { leadTime } from "@/lib/gas/lead-time"
import { OutOfDomain } from "@/lib/units/out-of-domain"

const between = (min: number, max: number) => fc.double({ min, max, noNaN: true })
const tank = { ...gasDefaults, kh_dkh: 4, volume_l: 180, surface_area_m2: 0.4 }

describe("gasDemand", () => {
  test("accounts for every gram: use is loss, uptake and what escapes, less what breathes in", () => {
    fc.assert(
      fc.property(
        between(20, 1000),
        between(0.05, 1),
        between(10, 40),
        between(0, 3),
        between(2, 4),
        (volume_l, surface_area_m2, target_co2_mg_l, plant_uptake_mg_l_h, rest_co2_mg_l) => {
          const { result } = gasDemand({
            ...tank,
            volume_l,
            surface_area_m2,
            target_co2_mg_l,
            plant_uptake_mg_l_h,
            rest_co2_mg_l,
            method: "diffuser",
          })
          const out = result.loss_to_air_g_day + result.plant_uptake_g_day + result.escaped_g_day
          const scale = out + result.respiration_g_day
          const rest = result.daily_use_g_day + result.respiration_g_day - out
          expect(Math.abs(rest) / scale).toBeLessThan(1e-9)
        },
      ),
    )
  })

  test("takes length, width and height for volume and surface", () => {
    const sides = { ...gasDefaults, kh_dkh: 4, length_cm: 100, width_cm: 40, height_cm: 45 }
    expect(gasDemand(sides).result).toEqual(gasDemand(tank).result)
  })

  test("needs more gas for a higher target, a livelier surface, more plants, and a worse diffuser", () => {
    fc.assert(
      fc.property(
        between(10, 60),
        between(0, 5),
        between(0.3, 0.9),
        (target_co2_mg_l, uptake, efficiency) => {
          const base = {
            ...tank,
            target_co2_mg_l,
            plant_uptake_mg_l_h: uptake,
            dissolution_efficiency: efficiency,
          }
          const hold = (more: object) => gasDemand({ ...base, ...more }).result.hold_feed_mg_min
          const here = hold({})
          expect(hold({ target_co2_mg_l: target_co2_mg_l + 1 })).toBeGreaterThan(here)
          expect(hold({ agitation: "agitated" })).toBeGreaterThan(here)
          expect(hold({ agitation: "calm" })).toBeLessThan(here)
          expect(hold({ plant_uptake_mg_l_h: uptake + 0.1 })).toBeGreaterThan(here)
          expect(hold({ dissolution_efficiency: efficiency + 0.05 })).toBeLessThan(here)
          expect(hold({ rest_co2_mg_l: 3 })).toBeLessThan(here)
        },
      ),
    )
  })

  test("spans the surface's factor of two either way", () => {
    const { result, uncertainty } = gasDemand({ ...tank, plant_uptake_mg_l_h: 0, dissolution_efficiency: 1 })
    expect(uncertainty.hold_feed_high_mg_min / result.hold_feed_mg_min).toBeCloseTo(2, 9)
    expect(uncertainty.hold_feed_low_mg_min / result.hold_feed_mg_min).toBeCloseTo(0.5, 9)
    expect(uncertainty.daily_use_low_g_day).toBeLessThan(result.daily_use_g_day)
    expect(uncertainty.daily_use_high_g_day).toBeGreaterThan(result.daily_use_g_day)
  })

  test("takes the efficiency of a diffuser from its bubbles when they are known", () => {
    const bubbles = (bubble_diameter_mm: number, depth_m = 0.4) =>
      gasDemand({ ...tank, method: "diffuser", bubble_diameter_mm, depth_m }).result.dissolution_efficiency
    expect(bubbles(0.8)).toBeCloseTo(0.84, 2)
    expect(bubbles(1.5)).toBeCloseTo(0.4, 2)
    expect(() => bubbles(5, 0.1)).toThrow(/^bubble_diameter_mm:/)
  })

  test("says so when the plants would take more than there is", () => {
    const thirsty = {
      ...tank,
      plant_uptake_mg_l_h: 8,
      close_before_lights_off_min: 300,
      agitation: "calm" as const,
    }
    expect(gasDemand(thirsty).cautions.map(({ code }) => code)).toContain("plants_take_all")
    expect(gasDemand(tank).cautions.map(({ code }) => code)).not.toContain("plants_take_all")
  })

  test("names what it took for granted", () => {
    const codes = (more: object) => gasDemand({ ...tank, ...more }).assumptions.map(({ code }) => code)
    expect(codes({})).toEqual(
      expect.arrayContaining(["exchange", "efficiency", "plant_uptake", "rests_at_air", "well_mixed", "day"]),
    )
    expect(codes({ rest_co2_mg_l: 3 })).not.toContain("rests_at_air")
  })

  test.each([
    [{ volume_l: undefined }, "volume_l"],
    [{ surface_area_m2: undefined }, "surface_area_m2"],
    [{ volume_l: 0 }, "volume_l"],
    [{ temperature_c: 41 }, "temperature_c"],
    [{ target_co2_mg_l: 2, rest_co2_mg_l: 3 }, "target_co2_mg_l"],
    [{ target_co2_mg_l: 5, air_co2_ppm: 5000 }, "target_co2_mg_l"],
    [{ rest_co2_mg_l: 0.2 }, "rest_co2_mg_l"],
    [{ photoperiod_h: 20, wished_lead_min: 300 }, "wished_lead_min"],
    [{ close_before_lights_off_min: 500 }, "close_before_lights_off_min"],
    [{ surface_area_m2: 100, volume_l: 20 }, "surface_area_m2"],
    [{ conductivity_us_cm: 20_000 }, "conductivity_us_cm"],
    [{ volume_l: undefined, length_cm: 5, width_cm: 5, height_cm: 5 }, "height_cm"],
  ])("refuses %o and says which field to mend", (bad, field) => {
    expect(() => gasDemand({ ...tank, ...bad })).toThrow(OutOfDomain)
    expect(() => gasDemand({ ...tank, ...bad })).toThrow(new RegExp(`^${field}:`))
  })
})

describe("two pH readings of a night", () => {
  const overnight = { start_ph: 6.65, end_ph: 7, elapsed_h: 8 }

  test("replace surface and agitation", () => {
    const measured = gasDemand({ ...tank, overnight }).result.exchange_per_h
    const other = { ...tank, surface_area_m2: undefined, agitation: "strong" as const, overnight }
    expect(gasDemand(other).result.exchange_per_h).toBe(measured)
    expect(gasDemand({ ...tank, overnight }).assumptions.map(({ code }) => code)).toContain(
      "exchange_measured",
    )
  })

  test("find the exchange that made them", () => {
    // CO2 is proportional to 10^-pH within a per cent here: ln[(C1 - C)/(C2 - C)]/t with 29.7, 13.2 and 0.61 mg/L.
    const { exchange_per_h } = gasDemand({ ...tank, overnight }).result
    expect(Math.abs(exchange_per_h / (Math.log((29.7 - 0.61) / (13.27 - 0.61)) / 8) - 1)).toBeLessThan(0.01)
  })

  test("narrow the interval", () => {
    const width = (more: object) => {
      const { uncertainty, result } = gasDemand({ ...tank, dissolution_efficiency: 1, ...more })
      return (uncertainty.hold_feed_high_mg_min - uncertainty.hold_feed_low_mg_min) / result.hold_feed_mg_min
    }
    expect(width({ overnight })).toBeLessThan(0.35)
    expect(width({})).toBeGreaterThan(1)
  })

  test.each([
    [{ start_ph: 7, end_ph: 6.8, elapsed_h: 8 }, "overnight.end_ph"],
    [{ start_ph: 6.65, end_ph: 8.8, elapsed_h: 8 }, "overnight.end_ph"],
    [{ start_ph: 6.79, end_ph: 6.8, elapsed_h: 4 }, "overnight.end_ph"],
    [{ start_ph: 6.65, end_ph: 7, elapsed_h: 0 }, "overnight.elapsed_h"],
    [{ start_ph: 3, end_ph: 7, elapsed_h: 8 }, "overnight.start_ph"],
  ])("are refused where they make no sense: %o", (night, field) => {
    expect(() => gasDemand({ ...tank, overnight: night })).toThrow(new RegExp(`^${field}:`))
  })
})

describe("leadTime", () => {
  test("is shorter with more feed and a calmer surface, and never says less than it takes", () => {
    fc.assert(
      fc.property(between(2.5, 10), between(0.5, 1), (feed_ratio, dissolution_efficiency) => {
        const base = { ...tank, dissolution_efficiency }
        const { hold_feed_mg_min } = leadTime(base).result
        const lead = (more: object) =>
          leadTime({ ...base, feed_mg_min: feed_ratio * hold_feed_mg_min, ...more }).result.lead_time_min!
        const here = lead({})
        expect(lead({ feed_mg_min: 1.05 * feed_ratio * hold_feed_mg_min })).toBeLessThan(here)
        expect(lead({ surface_area_m2: 0.3 })).toBeLessThan(here)
        expect(lead({ target_co2_mg_l: 31 })).toBeGreaterThan(here)
        const { lead_time_low_min, lead_time_high_min } = leadTime({ ...base, feed_ratio }).uncertainty
        const middle = leadTime({ ...base, feed_ratio }).result.lead_time_min!
        expect(lead_time_low_min).toBeLessThan(middle)
        if (lead_time_high_min !== null) expect(lead_time_high_min).toBeGreaterThan(middle)
      }),
      { numRuns: 40 },
    )
  })

  test("has the tank at the wished share when the lights come on, day after day", () => {
    const { result } = leadTime({ ...tank, reach_fraction: 0.9 })
    expect(result.reached_fraction).toBeCloseTo(0.9, 8)
    expect(result.lights_on_co2_mg_l).toBeCloseTo(27, 7)
    expect(result.series[0]?.co2_mg_l).toBeCloseTo(result.series.at(-1)!.co2_mg_l, 7)
    expect(result.open_before_lights_min).toBe(result.lead_time_min)
    expect(result.close_before_lights_off_min).toBe(60)
  })

  test("a feed that is too small is named, with the most that it reaches", () => {
    const { result, cautions } = leadTime({ ...tank, feed_ratio: 0.6 })
    expect(result.lead_time_min).toBeNull()
    expect(result.open_before_lights_min).toBeNull()
    expect(result.reached_fraction).toBeGreaterThan(0.5)
    expect(result.reached_fraction).toBeLessThan(0.95)
    const caution = cautions.find(({ code }) => code === "never_reached")
    expect(caution?.message).toContain(String(Number(result.lights_on_co2_mg_l.toPrecision(2))))
  })

  test("takes the feed by mass, by volume or as a multiple, all the same", () => {
    const byRatio = leadTime(tank).result
    const { feed_ratio: _, ...without } = tank
    const byMass = leadTime({ ...tank, feed_mg_min: byRatio.feed_mg_min }).result
    const byVolume = leadTime({ ...without, feed_ratio: 1, feed_ml_min: byRatio.feed_ml_min }).result
    expect(byMass.lead_time_min).toBeCloseTo(byRatio.lead_time_min!, 6)
    expect(byVolume.lead_time_min).toBeCloseTo(byRatio.lead_time_min!, 6)
    expect(byVolume.feed_ratio).toBeCloseTo(4.5, 9)
  })

  test("a feed beyond what water holds is cut at saturation, and says so", () => {
    const strong = {
      ...tank,
      volume_l: 20,
      surface_area_m2: 0.06,
      agitation: "calm" as const,
      feed_mg_min: 150,
    }
    const { result, cautions } = leadTime(strong)
    expect(result.uncontrolled_limit_co2_mg_l).toBeLessThan(1500)
    expect(cautions.map(({ code }) => code)).toContain("saturated")
  })

  test("fits the demand: the feed for a wished lead has that lead", () => {
    fc.assert(
      fc.property(between(30, 240), between(0.1, 1), (wished_lead_min, surface_area_m2) => {
        const demand = gasDemand({ ...tank, surface_area_m2, wished_lead_min }).result
        fc.pre(demand.ramp_ratio > 1.001)
        const lead = leadTime({ ...tank, surface_area_m2, feed_mg_min: demand.ramp_feed_mg_min }).result
        expect(Math.abs(lead.lead_time_min! / wished_lead_min - 1)).toBeLessThan(1e-5)
        expect(lead.daily_use_g_day / demand.daily_use_g_day).toBeCloseTo(1, 5)
      }),
      { numRuns: 40 },
    )
  })
})
