import { describe, expect, it } from "vitest"
import { nextPath } from "@/app/next-path"

describe("where signing in leads", () => {
  it.each(["/portal/fernhollow/keys", "/portal?x=1#y", "/"])("is %s when asked for", (path) => {
    expect(nextPath(path)).toBe(path)
  })

  it.each([
    "https://elsewhere.example/",
    "//elsewhere.example/",
    "/\\elsewhere.example",
    "/portal\\..\\x",
    "\\\\elsewhere.example",
    "javascript:alert(1)",
    "portal",
    "",
    "/portal\n//elsewhere.example",
    "/\t/elsewhere.example",
    undefined,
    ["/a", "/b"],
  ])("is never %j", (asked) => {
    expect(nextPath(asked)).toBe("/portal")
  })
})
