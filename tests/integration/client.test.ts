import { beforeAll, describe, expect, it } from "vitest"
import { createTarnwrightClient } from "@/openapi/client"
import { createTestAccount } from "../support/account"
import { stack, takeSettings } from "../support/stack"

// What is written here is compiled against the document by `npm run check`: a name that is wrong fails there.

let tarnwright: ReturnType<typeof createTarnwrightClient>

beforeAll(async () => {
  takeSettings()
  const { secret } = await (await createTestAccount()).key({ scopes: ["calculate", "reports"] })
  tarnwright = createTarnwrightClient({ origin: stack().appUrl, key: secret })
})

describe("the typed client", () => {
  it("calculates", async () => {
    const { data, response } = await tarnwright.POST("/carbonate/co2", { body: { ph: 6.8, kh_dkh: 4 } })
    expect(data?.result.co2_mg_l).toBeCloseTo(21, 0)
    expect(data?.result.level).toBe("in_range")
    expect(response.headers.get("tarnwright-units")).toBe("1")
  })

  it("gives a problem in its own type", async () => {
    const { data, error } = await tarnwright.POST("/carbonate/co2", { body: { ph: 66, kh_dkh: 4 } })
    expect(data).toBeUndefined()
    expect(error?.code).toBe("validation_failed")
    expect(error?.errors?.[0]?.pointer).toBe("/ph")
  })

  it("stores, reads and lists", async () => {
    const { data: made } = await tarnwright.POST("/reports", {
      body: { kind: "carbonate_co2", input: { ph: 6.8, kh_dkh: 4 }, title: "By the client" },
    })
    const report_id = made?.id ?? ""
    const { data: read } = await tarnwright.GET("/reports/{report_id}", { params: { path: { report_id } } })
    expect(read?.title).toBe("By the client")
    const { data: list } = await tarnwright.GET("/reports", { params: { query: { limit: 1 } } })
    expect(list?.data.map(({ id }) => id)).toEqual([report_id])
  })

  it("refuses, when it is compiled, a field that the document does not have", () => {
    const wrong = () =>
      // @ts-expect-error: the unit belongs to the name
      tarnwright.POST("/carbonate/co2", { body: { ph: 6.8, kh: 4 } })
    expect(wrong).toBeTypeOf("function")
  })
})
