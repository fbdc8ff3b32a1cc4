import { describe, expect, it } from "vitest"
import { z } from "zod"
import { registry } from "@/app/api/v1/registry"
import { DatabaseUnavailable } from "@/db"
import { rounded } from "@/lib/api/define-calculation"
import { fieldErrors } from "@/lib/api/field-errors"
import { problems, refusalOf } from "@/lib/api/problem"
import { rateHeaders } from "@/lib/api/rate-headers"
import { createRouter } from "@/lib/api/router"
import { OutOfDomain } from "@/lib/units/out-of-domain"

describe("the router", () => {
  const router = createRouter(registry)

  it("finds every operation by its own path", () => {
    for (const operation of registry) {
      const path = operation.path.replace(/\{\w+\}/g, "some-id")
      expect(router.find(operation.method, path)).toMatchObject({ operation: { id: operation.id } })
    }
  })

  it("hands on the parameters of the path", () => {
    expect(router.find("POST", "/widgets/wdgt_1/sessions")).toMatchObject({ params: { widget_id: "wdgt_1" } })
  })

  it("names the methods of a path that has others, and knows nothing of the rest", () => {
    expect(router.find("GET", "/carbonate/co2")).toEqual({ allowed: ["POST"] })
    expect(router.find("GET", "/carbonate")).toBeUndefined()
    expect(router.find("GET", "/carbonate/co2/")).toBeUndefined()
  })
})

describe("the sentence for a field", () => {
  const schema = z.strictObject({
    ph: z.number().min(4).max(9.5),
    mode: z.enum(["live", "sandbox"]),
    list: z.array(z.number()).min(1),
  })
  const errorsOf = (input: unknown) =>
    (schema.safeParse(input, { reportInput: true }).error?.issues ?? []).flatMap(fieldErrors)
  const good = { ph: 7, mode: "live", list: [1] }

  it.each([
    [{ ...good, ph: "7" }, "/ph", 'Send a number, not the text "7".'],
    [{ ...good, ph: undefined }, "/ph", "This field is missing. Send a number."],
    [{ ...good, ph: null }, "/ph", "Send a number, not null."],
    [{ ...good, ph: Number.NaN }, "/ph", "Send a number, not a number too large to hold."],
    [{ ...good, ph: 3 }, "/ph", "The value must be at least 4."],
    [{ ...good, ph: 10 }, "/ph", "The value must be at most 9.5."],
    [{ ...good, mode: "dead" }, "/mode", 'Send one of "live", "sandbox".'],
    [{ ...good, list: [] }, "/list", "Its number of items must be at least 1."],
    [{ ...good, list: ["a"] }, "/list/0", 'Send a number, not the text "a".'],
    [{ ...good, "a/b~c": 1 }, "/a~1b~0c", "There is no such field. Check its spelling and its unit."],
    [7, "", "Send an object, not 7."],
  ])("for %j points to %s and says how to mend it", (input, pointer, detail) => {
    expect(errorsOf(input)).toEqual([{ pointer, detail }])
  })
})

describe("a refusal", () => {
  it("points to the field that an engine's domain error names", () => {
    const refusal = refusalOf(new OutOfDomain("pump.max_head_m", "Say more than 0.2 m."))
    expect(refusal.code).toBe("out_of_domain")
    expect(refusal.errors).toEqual([{ pointer: "/pump/max_head_m", detail: "Say more than 0.2 m." }])
  })

  it("asks to come back where the database cannot be reached, and tells nothing of any other fault", () => {
    expect(refusalOf(new DatabaseUnavailable(new Error("password in here")))).toMatchObject({
      code: "unavailable",
      retryAfterS: 2,
    })
    const fault = refusalOf(new Error("secret in here"))
    expect(fault.code).toBe("internal")
    expect(fault.detail).not.toContain("secret")
  })

  it("has a status in the range of its kind and a title for every code", () => {
    for (const { status, title } of Object.values(problems)) {
      expect(status).toBeGreaterThanOrEqual(400)
      expect(status).toBeLessThan(600)
      expect(title).not.toBe("")
    }
  })
})

describe("the rate headers", () => {
  it("read as the draft's own examples do", () => {
    // @source draft-ietf-httpapi-ratelimit-headers: `RateLimit-Policy: "burst";q=100;w=60` and `RateLimit: "default";r=50;t=30`.
    expect(rateHeaders([{ name: "burst", quota: 100, window_s: 60, remaining: 50, reset_s: 30 }])).toEqual({
      "ratelimit-policy": '"burst";q=100;w=60',
      ratelimit: '"burst";r=50;t=30',
    })
  })

  it("never show a negative number", () => {
    const { ratelimit } = rateHeaders([
      { name: "period", quota: 5, window_s: 60, remaining: -2, reset_s: -1 },
    ])
    expect(ratelimit).toBe('"period";r=0;t=0')
  })
})

describe("the numbers of an answer", () => {
  it("have 6 significant digits, wherever they stand", () => {
    expect(
      rounded({ a: 21.048712345, b: [0.00012345678, "7.123456789"], c: { d: -1234567.8 }, e: null, f: -0 }),
    ).toEqual({
      a: 21.0487,
      b: [0.000123457, "7.123456789"],
      c: { d: -1234570 },
      e: null,
      f: 0,
    })
  })
})
