import { describe, expect, it } from "vitest"
import { parseDecimal } from "@/widgets/shared/decimal"

describe("a number that a shopper typed", () => {
  it.each([
    ["6.8", 6.8],
    ["6,8", 6.8],
    [" 6.8 ", 6.8],
    [".5", 0.5],
    ["7.", 7],
    ["-3", -3],
    ["−3", -3],
    ["６．８", 6.8],
    ["６，８", 6.8],
  ])("%j is read as %d in every locale", (text, value) => {
    expect(parseDecimal(text)).toBe(value)
  })

  it.each(["", " ", ".", "6.8.1", "1.000,5", "6.x", "1e3", "Infinity", "NaN", "0x10", "6 8"])(
    "%j is refused",
    (text) => {
      expect(parseDecimal(text)).toBeNull()
    },
  )
})
