import { describe, expect, it } from "vitest"
import { emptyValues, fieldNames, problemsIn, problemsOf } from "@/widgets/ask/state"

const good = { name: "", email: "ebba@shopper.test", message: "Will it do?", agreed: true }

describe("a question to the shop", () => {
  it("needs an address, a question and consent, and no name", () => {
    expect(problemsOf(good)).toEqual({})
    expect(problemsOf(emptyValues)).toEqual({
      email: "email_empty",
      message: "message_empty",
      consent: "consent",
    })
  })

  it.each([
    ["a blank address", { email: "  " }, { email: "email_empty" }],
    ["an address without a place", { email: "ebba" }, { email: "email" }],
    ["an address without a domain", { email: "ebba@shop" }, { email: "email" }],
    ["an address with a space", { email: "ebba l@shop.test" }, { email: "email" }],
    ["an address that is too long", { email: `${"e".repeat(250)}@shop.test` }, { email: "email" }],
    ["a blank question", { message: " \n " }, { message: "message_empty" }],
    ["a question that is too long", { message: "w".repeat(4_001) }, { message: "message" }],
    ["a name that is too long", { name: "e".repeat(101) }, { name: "name" }],
    ["a box that is not ticked", { agreed: false }, { consent: "consent" }],
  ])("is not sent with %s", (_, wrong, problems) => {
    expect(problemsOf({ ...good, ...wrong })).toEqual(problems)
  })

  it("begins with nothing agreed to", () => {
    expect(emptyValues.agreed).toBe(false)
    expect(fieldNames.at(-1)).toBe("consent")
  })
})

describe("what the service found wrong", () => {
  it("stands at the field that it points to", () => {
    expect(problemsIn([{ pointer: "/email" }, { pointer: "/consent/version" }])).toEqual({
      email: "email",
      consent: "new_words",
    })
    expect(problemsIn([{ pointer: "/consent/given" }])).toEqual({ consent: "consent" })
  })

  it("is no field's where the shopper can mend nothing", () => {
    expect(problemsIn([])).toBeUndefined()
    expect(problemsIn([{ pointer: "/tank/ph" }, { pointer: "/email" }])).toBeUndefined()
  })
})
