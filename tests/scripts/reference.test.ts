import { spawnSync } from "node:child_process"
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from "node:fs"
import { tmpdir } from "node:os"
import { join } from "node:path"
import { afterAll, describe, expect, it } from "vitest"
import { BadRow, deviation, parseTolerance, passes, relativeTo, within } from "@/scripts/reference/format"
import { formats } from "@/scripts/reference/formats"
import { reportFile } from "@/scripts/reference/report"

const root = join(import.meta.dirname, "../..")
const folder = mkdtempSync(join(tmpdir(), "reference-"))
afterAll(() => rmSync(folder, { recursive: true }))

const shipped = readFileSync(join(root, "tests/reference/carbonate.csv"), "utf8")
const comments = shipped.split("\n").filter((line) => line.startsWith("#"))
const [header, ...rows] = shipped.split("\n").filter((line) => line !== "" && !line.startsWith("#"))
const row = (id: string) => rows.find((line) => line.startsWith(`${id},`))!

function run(...lines: (string | undefined)[]) {
  const file = join(folder, "some.csv")
  writeFileSync(file, lines.join("\n"))
  return reportFile(file, formats)
}

describe("npm run reference", () => {
  it("passes a handful of rows in any order, with a verdict for each kind", () => {
    const { failures, text } = run(...comments, header, row("P109"), row("P071"), row("P005"), row("P097"))
    expect(text).toMatch(/carbonate system by PHREEQC, 4 rows/)
    expect(text).toMatch(/forward_nahco3 +co2_mg_l +1 +0\.05[78]\d? % +0\.7 % +pass/)
    expect(text).toMatch(/degassed_ph +ph +1 .* 0\.003 +pass/)
    expect(failures).toBe(0)
  })

  it("fails when one value is off by a per cent, and shows which", () => {
    const { failures, text } = run(header, row("P005").replace("21.431", "21.65"), row("P004"))
    expect(text).toMatch(/forward_nahco3 +co2_mg_l +2 +0\.95\d % +0\.7 % +1 FAIL/)
    expect(failures).toBe(1)
  })

  it("fails on a row of a kind that it does not know, and names the row", () => {
    const { failures, text } = run(
      header,
      row("P005"),
      row("P004").replace("forward_nahco3", "forward_brine"),
    )
    expect(text).toMatch(/P004: unknown kind: forward_brine/)
    expect(failures).toBe(1)
  })

  it("fails on a row with a hole or words where a number belongs", () => {
    expect(run(header, row("P005").replace("21.431", "")).text).toMatch(/P005: co2_mg_l is missing/)
    const words = run(header, row("P005").replace("21.431", "about 21"))
    expect(words.text).toMatch(/P005: co2_mg_l is not a number: about 21/)
    expect(words.failures).toBe(1)
  })

  it.each([
    ["no rows", () => run(...comments, header), /has no rows/],
    ["columns of no format", () => run("a,b", "1,2"), /no format has the columns a, b/],
    ["a file that is not there", () => reportFile(join(folder, "absent.csv"), formats), /cannot be read/],
    ["a row with too many cells", () => run(header, `${row("P005")},1`), /cannot be read/],
  ] as const)("fails on %s", (_, go, message) => {
    const { failures, text } = go()
    expect(text).toMatch(message)
    expect(failures).toBe(1)
  })

  it("ends with 1 when any file fails and with 0 when all pass", () => {
    const command = (file: string) =>
      spawnSync(process.execPath, ["--import", "tsx", "scripts/reference.ts", file], { cwd: root }).status
    expect(command(join(folder, "absent.csv"))).toBe(1)
    expect(command("tests/reference/carbonate.csv")).toBe(0)
  })

  it("reads quoted fields with commas in the published file, and a unit of its own per row", () => {
    const { failures, text } = reportFile(join(root, "tests/reference/carbonate-published.csv"), formats)
    expect(text).toMatch(/published +pK1 +14 .*pass/)
    expect(failures).toBe(0)
  })
})

describe("a tolerance in words", () => {
  it.each([
    ["0.001", 25, within(0.001)],
    ["1e-6", 25, within(1e-6)],
    ["0.8% vs PB82 KH*rho", 25, relativeTo(0.008)],
    ["0.7 %", 25, relativeTo(0.007)],
    ["2% (rounded constant 2.0 vs 1.978, I=0)", 25, relativeTo(0.02)],
    ["0.15% vs Bradley & Pitzer 78.38", 25, relativeTo(0.0015)],
    ["1% at 5-25 C; 2.5% at 30-35 C", 25, relativeTo(0.01)],
    ["1% at 5-25 C; 2.5% at 30-35 C", 30, relativeTo(0.025)],
    ["1% at 5-25 C; 2.5% at 30-35 C", 29, relativeTo(0.025)],
    ["1% at 5-25 C; 2.5% at 30-35 C", 2, relativeTo(0.01)],
  ])("reads %s at %d °C", (text, temperature, expected) => {
    expect(parseTolerance(text, temperature)).toEqual(expected)
  })

  it("does not guess", () => {
    expect(() => parseTolerance("some", 25)).toThrow(BadRow)
    expect(() => parseTolerance("", 25)).toThrow(BadRow)
  })
})

describe("a deviation", () => {
  const of = (expected: number, actual: number, tolerance = relativeTo(0.01)) =>
    deviation({ kind: "k", quantity: "q", expected, actual }, tolerance)

  it("passes at the tolerance and fails beyond it, relative or absolute", () => {
    expect(passes(of(100, 101))).toBe(true)
    expect(passes(of(100, 101.1))).toBe(false)
    expect(passes(of(7, 7.003, within(0.0031)))).toBe(true)
    expect(passes(of(7, 7.004, within(0.0031)))).toBe(false)
  })

  it("fails a result that is no number, and lets infinity match infinity alone", () => {
    expect(passes(of(100, Number.NaN))).toBe(false)
    expect(passes(of(Number.POSITIVE_INFINITY, Number.POSITIVE_INFINITY))).toBe(true)
    expect(passes(of(Number.POSITIVE_INFINITY, 5))).toBe(false)
    expect(passes(of(5, Number.POSITIVE_INFINITY))).toBe(false)
    expect(passes(of(0, 1e-9))).toBe(false)
  })
})
