import { describe, expect, it } from "vitest"
import { chooseLocale, fixed, significant } from "@/widgets/shared/locale"

describe("the language of a widget", () => {
  it("is the first that it speaks of those wanted, with the region for its numbers", () => {
    expect(chooseLocale([null, "fr", "de-AT", "en"])).toEqual({ language: "de", tag: "de-AT" })
    expect(chooseLocale(["ES-mx"])).toEqual({ language: "es", tag: "ES-mx" })
    expect(chooseLocale(["ja"])).toEqual({ language: "ja", tag: "ja" })
  })

  it("is English where none is, or a tag is malformed", () => {
    expect(chooseLocale([])).toEqual({ language: "en", tag: "en" })
    expect(chooseLocale(["fr", ""])).toEqual({ language: "en", tag: "en" })
    expect(chooseLocale(["de-"])).toEqual({ language: "en", tag: "en" })
  })

  it("writes no digit more than it was asked for", () => {
    const german = { language: "de", tag: "de" } as const
    expect(significant(21.0487, 2, german)).toBe("21")
    expect(significant(0.6154, 2, german)).toBe("0,62")
    expect(significant(1234, 2, german)).toBe("1200")
    expect(fixed(6.5, 2, german)).toBe("6,50")
  })
})
