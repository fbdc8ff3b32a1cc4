import { describe, expect, it } from "vitest"
import { slugOf } from "@/lib/accounts/open-account"

// As migrations/2026_12_01_0900_first_tables.ts checks it.
const shape = /^[a-z0-9](-?[a-z0-9]){1,38}$/

describe("the short name of an account", () => {
  it.each([
    ["Fernhollow Aquatics", "fernhollow-aquatics"],
    ["  Tümpel & Söhne GmbH ", "tumpel-sohne-gmbh"],
    ["A", "account-a"],
    ["水族館", "account-1"],
    ["--- x ---", "account-x"],
    ["A shop with a name that goes on and on and on", "a-shop-with-a-name-that-goes-o"],
  ])("of “%s” is %s", (name, slug) => {
    expect(slugOf(name)).toBe(slug)
    expect(slug).toMatch(shape)
  })
})
