import { describe, expect, it } from "vitest"
import { isAllowedOrigin, originMatches } from "@/lib/keys/origin"

describe("an allow-list", () => {
  it.each([
    "https://shop.example",
    "https://shop.example:8443",
    "https://*.shop.example",
    "http://localhost:3000",
    "http://127.0.0.1:4100",
  ])("takes %s", (origin) => expect(isAllowedOrigin(origin)).toBe(true))

  it.each([
    "shop.example",
    "https://shop.example/",
    "https://shop.example/path",
    "http://shop.example",
    "https://*",
    "https://*.example",
    "https://shop.*.example",
    "https://user@shop.example",
    "null",
    "*",
    "",
    "javascript:alert(1)",
    "file:///etc",
  ])("refuses %s", (origin) => expect(isAllowedOrigin(origin)).toBe(false))
})

describe("a page's origin", () => {
  const list = ["https://shop.example", "https://*.brand.example", "http://127.0.0.1:4100"]

  it.each(["https://shop.example", "https://www.brand.example", "http://127.0.0.1:4100"])(
    "%s is on it",
    (origin) => expect(originMatches(origin, list)).toBe(true),
  )

  it.each([
    "https://shop.example.evil.example",
    "https://evilshop.example",
    "http://shop.example",
    "https://shop.example:444",
    "https://brand.example",
    "https://a.b.brand.example",
    "https://evilbrand.example",
    "http://127.0.0.1:4101",
    "https://SHOP.example",
    "null",
    "",
  ])("%s is not", (origin) => expect(originMatches(origin, list)).toBe(false))
})
