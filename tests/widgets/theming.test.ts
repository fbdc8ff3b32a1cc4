import { readdirSync, readFileSync } from "node:fs"
import path from "node:path"
import { describe, expect, it } from "vitest"
import { parts, themeProperties } from "@/widgets/theming"

const widgets = path.resolve(import.meta.dirname, "../../widgets")
const css = readFileSync(path.join(widgets, "shared/widget.css"), "utf8")
const views = readdirSync(widgets, { recursive: true, encoding: "utf8" })
  .filter((file) => file.endsWith(".tsx"))
  .map((file) => readFileSync(path.join(widgets, file), "utf8"))
  .join("\n")

describe("what a page may style", () => {
  it("is named as the style sheet uses it, with the same defaults, and is at most 30 properties", () => {
    const used = new Set(css.match(/--tarn-[a-z-]+/g))
    expect(themeProperties.map(({ name }) => name).sort()).toEqual([...used].sort())
    expect(themeProperties.length).toBeLessThanOrEqual(30)
    for (const { name, light, dark } of themeProperties) {
      const standing = new RegExp(`var\\(${name}, (light-dark\\(([^,]+), ([^)]+)\\)|[^)]+\\)?)\\)`).exec(css)
      const [, whole, first, second] = standing ?? []
      const [given, givenDark] = first ? [first, second] : [whole, whole]
      if (light.startsWith("--")) expect(given).toContain(light.replace("--tarn-", "--_"))
      else expect([name, given, givenDark]).toEqual([name, light, dark])
    }
  })

  it("are parts that the views have, each of them", () => {
    const used = [...views.matchAll(/ part="([a-z -]+)"/g)].flatMap(([, names]) => names!.split(" "))
    expect([...parts].sort()).toEqual([...new Set(used)].sort())
  })
})
