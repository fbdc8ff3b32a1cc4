import { readdirSync, readFileSync } from "node:fs"
import { join } from "node:path"
import { describe, expect, it } from "vitest"
import { sources } from "@/lib/chemistry/sources"

const root = join(import.meta.dirname, "../..")
const files = ["numeric", "units", "chemistry", "gas", "flow", "plan"].flatMap((room) =>
  readdirSync(join(root, "lib", room))
    .filter((name) => name.endsWith(".ts"))
    .map((name) => join("lib", room, name)),
)
const cited = files.flatMap((file) =>
  [...readFileSync(join(root, file), "utf8").matchAll(/@source\s+([A-Za-z]+\w*\d*)/g)].map((match) => ({
    file,
    id: match[1]!,
  })),
)

describe("sources", () => {
  it("has a row for every id that a comment of the engine cites", () => {
    expect(cited.length).toBeGreaterThan(20)
    expect(cited.filter(({ id }) => !(id in sources))).toEqual([])
  })

  it("gives each a title, a year and what it is used for", () => {
    for (const [id, { title, year, detail }] of Object.entries(sources)) {
      expect(title.length, id).toBeGreaterThan(5)
      expect(year, id).toBeGreaterThan(1800)
      expect(year, id).toBeLessThanOrEqual(2026)
      expect(detail.length, id).toBeGreaterThan(10)
    }
  })
})
