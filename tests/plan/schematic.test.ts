import { describe, expect, test } from "vitest"
import { methodNames } from "@/lib/plan/method-choice"
import { systemPlan } from "@/lib/plan/system-plan"
import { quantities } from "@/lib/units/quantities"
import { usual } from "./plans"

describe.each(methodNames)("the schematic with the %s", (method) => {
  const plan = systemPlan({ ...usual, equipment: { method } }).result
  const { nodes, edges } = plan.schematic
  const valueAt = (id: string, quantity: string) =>
    nodes.find((node) => node.id === id)?.values.find((value) => value.quantity === quantity)?.value

  test("has every part once and joins only parts that it has", () => {
    const ids = nodes.map(({ id }) => id)
    expect(new Set(ids).size).toBe(ids.length)
    const device = method === "inline_reactor" ? "reactor" : method
    expect(ids).toEqual([
      "cylinder",
      "reducer",
      "solenoid",
      "check_valve",
      "tank",
      "filter",
      device,
      "return",
    ])
    for (const { from, to } of edges) {
      expect(ids).toContain(from)
      expect(ids).toContain(to)
    }
  })

  test("leads the gas from the cylinder to the device, and the water in a ring through the tank", () => {
    const follow = (start: string, medium: "gas" | "water", steps: number) => {
      const path = [start]
      for (let i = 0; i < steps; i++) {
        const next = edges.find((edge) => edge.medium === medium && edge.from === path.at(-1))
        if (next) path.push(next.to)
      }
      return path
    }
    const device = method === "inline_reactor" ? "reactor" : method
    expect(follow("cylinder", "gas", 4)).toEqual(["cylinder", "reducer", "solenoid", "check_valve", device])
    const ring = follow("tank", "water", method === "diffuser" ? 3 : 4)
    expect(ring.at(-1)).toBe("tank")
    expect(ring.includes(device)).toBe(method !== "diffuser")
  })

  test("carries the results where they belong", () => {
    expect(valueAt("reducer", "working_pressure_bar")).toBe(plan.working_pressure.working_pressure_bar)
    expect(valueAt("check_valve", "bubbles_per_s")).toBe(plan.bubble_rate.bubbles_per_s)
    expect(valueAt("solenoid", "open_before_lights_min")).toBe(plan.dosing.open_before_lights_min)
    expect(valueAt("tank", "ph")).toBe(plan.ph.ph)
    expect(valueAt("filter", "flow_l_h")).toBe(plan.flow.flow_l_h)
  })

  test("shows each loss of the loop once: together they are the pump's head", () => {
    const heads = [...nodes, ...edges]
      .flatMap(({ values }) => values)
      .filter(({ quantity, of }) => quantity === "head_m" && of !== "pump")
    const sum = heads.reduce((total, { value }) => total + value, 0)
    expect(sum).toBeCloseTo(plan.flow.head_m, 9)
  })

  test("names quantities that have a unit", () => {
    for (const { quantity } of [...nodes, ...edges].flatMap(({ values }) => values)) {
      expect(quantities[quantity].unit).toBeTruthy()
    }
  })
})
