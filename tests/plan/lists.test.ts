import { describe, expect, test } from "vitest"
import { phForCo2 } from "@/lib/chemistry/ph-for-co2"
import { hoseJoints } from "@/lib/plan/parts"
import { type SystemPlan, systemPlan } from "@/lib/plan/system-plan"
import { figures } from "@/lib/units/figures"
import { isControl, large, small, usual } from "./plans"

const plan = systemPlan(usual).result
const diffuserPlan = systemPlan({ ...usual, equipment: { method: "diffuser" } }).result
const part = (result: SystemPlan, name: string) => result.parts.find((each) => each.part === name)
const text = (list: readonly { code: string; text: string }[], code: string) =>
  list.find((each) => each.code === code)!.text

describe("the parts list", () => {
  test("has one clamp for each hose joint: 4 barbs, 2 at the taps, 2 at the reactor", () => {
    expect(part(plan, "hose_clamp")?.count).toBe(8)
    expect(part(diffuserPlan, "hose_clamp")?.count).toBe(6)
  })

  test("counts the joints of every fitting", () => {
    expect(hoseJoints([{ kind: "barb", count: 3 }, { kind: "uv" }, { kind: "bend", count: 9 }])).toBe(5)
  })

  test("asks for the bore of the loop's hose, both where they differ", () => {
    expect(part(plan, "hose")?.requirement).toContain("16 mm")
    const two = systemPlan({ ...usual, return_hose: { inner_diameter_mm: 12, length_m: 1.5 } }).result
    const hoses = two.parts.filter((each) => each.part === "hose").map(({ requirement }) => requirement)
    expect(hoses).toHaveLength(2)
    expect(hoses[1]).toContain("12 mm")
    expect(part(two, "reactor")?.requirement).toContain("12 mm")
  })

  test("asks for the pressure, the feed and the filter that were computed", () => {
    const { working_pressure, dosing, minimum_filter, cylinder } = plan
    expect(part(plan, "reducer")?.requirement).toContain(
      `${figures(working_pressure.working_pressure_bar, 2)} bar`,
    )
    expect(part(plan, "needle_valve")?.requirement).toContain(`${figures(dosing.feed_ml_min, 2)} mL/min`)
    expect(part(plan, "filter")?.requirement).toContain(`${figures(minimum_filter.max_flow_l_h!, 2)} L/h`)
    expect(part(plan, "cylinder")?.reason).toContain(`${figures(cylinder.days, 2)} days`)
  })

  test("has a controller or a timer, never both", () => {
    for (const control of ["controller", "timer"] as const) {
      const { parts, assembly } = systemPlan({ ...usual, equipment: { control } }).result
      expect(parts.filter(isControl).map((each) => each.part)).toEqual([
        control === "timer" ? "timer" : "ph_controller",
      ])
      expect(assembly.filter(({ code }) => code === "timer" || code === "controller")).toHaveLength(1)
    }
  })

  test("is a timer by itself where the surface loses gas so fast that the feed is harmless", () => {
    const rough = { ...usual, agitation: "strong", surface_area_m2: 2, wished_lead_min: 180 } as const
    expect(systemPlan(rough).result.dosing.control).toBe("timer")
    expect(plan.dosing.control).toBe("controller")
  })

  test("has the device of the method, and a flow meter where bubbles cannot be counted", () => {
    expect(part(plan, "reactor")).toBeDefined()
    expect(part(plan, "flow_meter")).toBeDefined()
    expect(part(diffuserPlan, "reactor")).toBeUndefined()
    expect(part(diffuserPlan, "diffuser")?.requirement).toContain("180 L")
    const drip = systemPlan({ ...small, volume_l: 25, equipment: { method: "diffuser" } }).result
    expect(drip.bubble_rate.bubbles_per_s).toBeLessThan(4)
    expect(part(drip, "bubble_counter")).toBeDefined()
  })

  test("warns the room by an alarm where a burst cylinder would pass the limit, not otherwise", () => {
    expect(part(systemPlan({ ...usual, cylinder_mass_g: 10_000 }).result, "co2_alarm")).toBeDefined()
    const tiny = { ...usual, cylinder_mass_g: 95, room_volume_m3: 60 }
    expect(part(systemPlan(tiny).result, "co2_alarm")).toBeUndefined()
  })
})

describe("assembly and commissioning", () => {
  test("run in the order of the work: cylinder before gas line, water before gas, leaks before livestock", () => {
    const assembly = plan.assembly.map(({ code }) => code)
    expect(assembly.indexOf("secure_cylinder")).toBeLessThan(assembly.indexOf("gas_line"))
    const steps = plan.commissioning.map(({ code }) => code)
    const order = [
      "prime",
      "bleed",
      "leak_check",
      "measure_flow",
      "set_pressure",
      "gas_leak_check",
      "set_feed",
      "raise_slowly",
    ]
    expect(steps.filter((code) => order.includes(code))).toEqual(order)
  })

  test("mount the reactor upright, bleed its air, and check every joint", () => {
    expect(text(plan.assembly, "mount_reactor")).toMatch(/upright/)
    expect(text(plan.commissioning, "bleed")).toMatch(/until only water comes/)
    expect(text(plan.commissioning, "leak_check")).toContain("all 8 hose joints")
  })

  test("have no reactor steps without a reactor", () => {
    const codes = [...diffuserPlan.assembly, ...diffuserPlan.commissioning].map(({ code }) => code)
    for (const code of ["mount_reactor", "bleed", "check_jet"]) expect(codes).not.toContain(code)
    expect(text(diffuserPlan.assembly, "mount_diffuser")).toContain("40 cm")
  })

  test("time the bucket by the flow: 5 L at 568 L/h take 32 s", () => {
    expect(text(plan.commissioning, "measure_flow")).toContain("about 32 s (568 L/h")
  })

  test("set the pressure, the feed and the set-point that were computed", () => {
    const { working_pressure, dosing, bubble_rate, ph, co2 } = plan
    expect(text(plan.commissioning, "set_pressure")).toContain(
      `${figures(working_pressure.working_pressure_bar, 2)} bar`,
    )
    expect(text(plan.commissioning, "set_feed")).toContain(`${figures(dosing.feed_ml_min, 2)} mL/min`)
    expect(text(plan.commissioning, "set_feed")).toContain(`${figures(bubble_rate.bubbles_per_s, 2)} bubbles`)
    expect(text(plan.assembly, "controller")).toContain(`Set-point ${ph.ph.toFixed(2)}`)
    expect(text(plan.commissioning, "confirm_level")).toContain(`${figures(co2.co2_high_mg_l, 2)} mg/L`)
  })

  test("raise the level over a week, from a third to the target, with the livestock watched", () => {
    const raise = text(plan.commissioning, "raise_slowly")
    expect(raise).toContain("day 1 10 mg/L")
    expect(raise).toContain(`day 8 30 mg/L (set-point ${plan.ph.ph.toFixed(2)})`)
    expect(raise).toMatch(/Stay by the tank/)
  })

  test("step the set-point as the chemistry does: each step's pH holds that step's CO2", () => {
    const raise = text(plan.commissioning, "raise_slowly")
    for (const [co2_mg_l, shown] of [...raise.matchAll(/([\d.]+) mg\/L \(set-point ([\d.]+)\)/g)].map(
      ([, level, ph]) => [Number(level), Number(ph)] as const,
    )) {
      const { ph } = phForCo2({ ...usual, co2_mg_l }).result
      expect(Math.abs(ph - shown)).toBeLessThan(0.02)
    }
    expect(raise.match(/set-point/g)).toHaveLength(4)
  })

  test("on a timer promise no more than the timer reaches", () => {
    const timer = systemPlan({ ...usual, equipment: { control: "timer" } }).result
    const evening = `${figures(timer.day.highest_co2_mg_l, 2)} mg/L`
    expect(text(timer.commissioning, "raise_slowly")).toContain(evening)
    const trouble = timer.troubleshooting.find(({ code }) => code === "ph_not_falling")!
    expect(trouble.actions.join(" ")).toContain(`climbs to ${figures(timer.day.highest_co2_mg_l, 2)}`)
    expect(trouble.actions.join(" ")).not.toContain("probe")
  })

  test("tell where the flow must not start below, for the gas", () => {
    expect(text(plan.commissioning, "check_jet")).toContain(
      `Below ${figures(plan.reactor.minimum_flow_l_h, 3)} L/h`,
    )
  })

  test("lead the surplus of a strong filter around the biggest body there is", () => {
    const river = systemPlan({
      ...large,
      pump: { max_flow_l_h: 10_000, max_head_m: 6 },
      hose: { inner_diameter_mm: 32, length_m: 2 },
      equipment: { method: "inline_reactor" },
    }).result
    expect(river.reactor_size.bypass_fraction).toBeGreaterThan(0)
    expect(river.reactor.holds_bubbles).toBe(true)
    expect(text(river.assembly, "bypass")).toContain(
      `${figures(100 * river.reactor_size.bypass_fraction!, 2)} %`,
    )
  })
})

describe("maintenance", () => {
  test("cleans the filter when its flow has fallen to the limit, as a time of the bucket", () => {
    const chore = plan.maintenance.find(({ code }) => code === "clean_filter")!
    const limit = Math.max(plan.reactor.minimum_flow_l_h, plan.flow.due_flow_l_h)
    expect(chore.when).toContain(`${figures(limit, 3)} L/h`)
    expect(chore.when).toContain(`${figures((3600 * 5) / limit, 2)} s`)
    expect(chore.text).toContain("gas-locks")
  })

  test("weighs the cylinder, since the gauge stays flat until the liquid is gone", () => {
    const chore = plan.maintenance.find(({ code }) => code === "weigh_cylinder")!
    expect(chore.text).toContain(`until ${figures(plan.cylinder.liquid_gone_g!, 2)} g are left`)
    expect(chore.when).toContain(`${figures(plan.cylinder.days, 2)} days`)
    const summer = systemPlan({ ...usual, ambient_c: 35 }).result.maintenance
    expect(summer.find(({ code }) => code === "weigh_cylinder")?.text).toContain("holds no liquid")
  })

  test("calibrates a probe only where there is one", () => {
    const codes = (result: SystemPlan) => result.maintenance.map(({ code }) => code)
    expect(codes(plan)).toContain("calibrate_probe")
    const timer = systemPlan({ ...usual, equipment: { control: "timer" } }).result
    expect(codes(timer)).not.toContain("calibrate_probe")
  })

  test("cleans what the method has: a reactor is bled, a diffuser soaked", () => {
    expect(plan.maintenance.map(({ code }) => code)).toContain("bleed_reactor")
    expect(diffuserPlan.maintenance.map(({ code }) => code)).toContain("clean_diffuser")
  })
})

describe("troubleshooting", () => {
  test("begins with gasping fish, and there with shutting the gas", () => {
    const [first] = plan.troubleshooting
    expect(first?.code).toBe("fish_gasping")
    expect(first?.severity).toBe("danger")
    expect(first?.actions[0]).toMatch(/Shut the cylinder/)
    expect(first?.actions[1]).toMatch(/air stone/)
  })

  test("covers the reactor, bubbles in the tank, and a pH that does not fall or falls at night", () => {
    const codes = plan.troubleshooting.map(({ code }) => code)
    for (const code of ["reactor_noisy", "bubbles_in_tank", "ph_not_falling", "ph_falling_at_night"]) {
      expect(codes).toContain(code)
    }
  })

  test("names the clogging at which this reactor locks, and that of one that is too weak from the start", () => {
    const actions = (result: SystemPlan) =>
      result.troubleshooting.find(({ code }) => code === "reactor_noisy")!.actions.join(" ")
    expect(actions(plan)).toContain(`a clogging of ${figures(plan.reactor.limit_clogging!, 2)}`)
    const weak = systemPlan({
      ...usual,
      pump: { max_flow_l_h: 500, max_head_m: 0.8 },
      equipment: { method: "inline_reactor" },
    }).result
    expect(actions(weak)).toContain("too weak for it even when clean")
  })

  test("gives the hours in which the gas has to be off", () => {
    const night = plan.troubleshooting.find(({ code }) => code === "ph_falling_at_night")!
    expect(night.actions.join(" ")).toContain("from 17:00 to 8:45")
  })
})
