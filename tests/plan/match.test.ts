import { describe, expect, test } from "vitest"
import type { CatalogItem } from "@/lib/plan/match"
import { systemPlan } from "@/lib/plan/system-plan"
import { large, small, usual } from "./plans"

const filter = (id: string, max_flow_l_h: number, max_head_m: number): CatalogItem => ({
  id,
  name: `Filter ${id}`,
  kind: "filter",
  pump: { max_flow_l_h, max_head_m },
})
const reactor = (id: string, body_diameter_mm: number, body_length_mm: number): CatalogItem => ({
  id,
  name: `Reactor ${id}`,
  kind: "reactor",
  body_diameter_mm,
  body_length_mm,
})
const cylinder = (id: string, cylinder_mass_g: number): CatalogItem => ({
  id,
  name: `Cylinder ${id}`,
  kind: "cylinder",
  cylinder_mass_g,
})
const diffuser = (id: string, method: "diffuser" | "inline_diffuser", max_volume_l: number): CatalogItem => ({
  id,
  name: `Diffuser ${id}`,
  kind: "diffuser",
  method,
  max_volume_l,
})

const catalog: readonly CatalogItem[] = [
  filter("weak", 500, 0.8),
  filter("enough", 1000, 1.6),
  filter("comfortable", 1400, 2.1),
  filter("monster", 9000, 5.5),
  reactor("straw", 25, 150),
  reactor("slim", 50, 350),
  reactor("wide", 75, 400),
  cylinder("cartridge", 95),
  cylinder("half", 500),
  cylinder("two", 2000),
  cylinder("ten", 10_000),
  diffuser("nano", "diffuser", 60),
  diffuser("usual", "diffuser", 250),
  diffuser("inline", "inline_diffuser", 300),
]

const matchesOf = (input = usual, items = catalog) =>
  systemPlan({ ...input, catalog: items }).result.catalog_matches
const ids = (kind: CatalogItem["kind"], input = usual) =>
  matchesOf(input)
    .filter((match) => match.kind === kind)
    .map(({ item_id }) => item_id)

describe("matchCatalog", () => {
  test("ranks the filters that fit: comfortable before just enough before far too big, weak ones left out", () => {
    expect(ids("filter")).toEqual(["comfortable", "monster", "enough"])
    const [best] = matchesOf().filter(({ kind }) => kind === "filter")
    expect(best?.fit).toBe("good")
    expect(best?.reason).toContain("L/h")
  })

  test("judges a filter in this very loop: its margin is its flow over what is needed", () => {
    const { catalog_matches, minimum_filter, flow } = systemPlan({ ...usual, catalog }).result
    const same = catalog_matches.find(({ item_id }) => item_id === "enough")!
    const shares = [
      flow.clean_flow_l_h / minimum_filter.clean_flow_l_h,
      flow.due_flow_l_h / minimum_filter.due_flow_l_h,
    ]
    expect(same.margin).toBeCloseTo(Math.min(...shares) - 1, 9)
  })

  test("says nothing of a flow that is needed when due where the method needs none", () => {
    const reasonFor = (method: "inline_reactor" | "diffuser") =>
      matchesOf({ ...usual, equipment: { method } }).find(({ kind }) => kind === "filter")?.reason
    expect(reasonFor("inline_reactor")).toMatch(/; \d+ and \d+ are needed\.$/)
    expect(reasonFor("diffuser")).toMatch(/; \d+ is needed while it is clean\.$/)
  })

  test("offers reactors that hold their bubbles, and none for a filter that cannot run one", () => {
    expect(ids("reactor")).toEqual(expect.arrayContaining(["slim", "wide"]))
    expect(ids("reactor")).not.toContain("straw")
    expect(ids("reactor", small)).toEqual([])
  })

  test("offers cylinders that last two months, the ones that are safe in the room first", () => {
    expect(ids("cylinder", usual)).not.toContain("cartridge")
    const small_room = { ...usual, room_volume_m3: 20 }
    const found = matchesOf(small_room).filter(({ kind }) => kind === "cylinder")
    expect(found.at(-1)?.fit).toBe("possible")
    expect(found.find(({ item_id }) => item_id === "ten")?.reason).toContain("ppm")
  })

  test("offers diffusers of the planned method that are big enough", () => {
    expect(ids("diffuser", { ...usual, equipment: { method: "diffuser" } })).toEqual(["usual"])
    expect(ids("diffuser", { ...usual, equipment: { method: "inline_diffuser" } })).toEqual(["inline"])
    expect(ids("diffuser", { ...large, equipment: { method: "diffuser" } })).toEqual([])
    expect(ids("diffuser", usual)).toEqual([])
  })

  test("counts the ranks from 1 within each kind", () => {
    for (const kind of ["filter", "reactor", "cylinder"] as const) {
      const ranks = matchesOf()
        .filter((match) => match.kind === kind)
        .map(({ rank }) => rank)
      expect(ranks).toEqual(ranks.map((_, i) => i + 1))
    }
  })

  test("leaves out items whose numbers no pump or reactor can have", () => {
    const odd = [filter("toy", 10, 0.05), reactor("drum", 4000, 350), cylinder("thimble", 1)]
    expect(matchesOf(usual, odd)).toEqual([])
  })

  test("does not depend on the order of the catalogue", () => {
    expect(matchesOf(usual, [...catalog].reverse())).toEqual(matchesOf())
  })

  test("is empty without a catalogue", () => {
    expect(systemPlan(usual).result.catalog_matches).toEqual([])
  })
})
