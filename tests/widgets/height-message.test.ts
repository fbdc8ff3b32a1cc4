import { describe, expect, it } from "vitest"
import { heightIn, heightMessage } from "@/widgets/shared/height-message"

describe("the message that tells a frame's height", () => {
  it("carries a whole number of pixels between 100 and 4000", () => {
    expect(heightIn(heightMessage(812.2))).toBe(813)
    expect(heightIn(heightMessage(3))).toBe(100)
    expect(heightIn(heightMessage(99_999))).toBe(4_000)
  })

  it.each([
    null,
    "tarnwright:height",
    {},
    { type: "tarnwright:height" },
    { type: "tarnwright:height", height: "600" },
    { type: "tarnwright:height", height: 600.5 },
    { type: "tarnwright:height", height: 99 },
    { type: "tarnwright:height", height: 4_001 },
    { type: "tarnwright:height", height: Number.NaN },
    { type: "other:height", height: 600 },
  ])("is not seen in %j", (data) => {
    expect(heightIn(data)).toBeNull()
  })
})
