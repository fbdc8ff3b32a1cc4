import request from "supertest"
import { afterAll, beforeAll, expect, it } from "vitest"
import { closePools } from "@/db"
import { type LoggedCall, listCalls } from "@/lib/usage"
import { createTestAccount } from "../support/account"
import { stack, takeSettings } from "../support/stack"

beforeAll(takeSettings)
afterAll(closePools)

it("the request log gives each call once, page by page, also where a client sends one id on all of them", async () => {
  const account = await createTestAccount()
  const { secret } = await account.key()
  const water = { ph: 6.8, kh_dkh: 4 }
  const post = (path: string, body: object) =>
    request(stack().appUrl)
      .post(`/api/v1${path}`)
      .set("authorization", `Bearer ${secret}`)
      .set("x-request-id", "always-the-same")
      .send(body)
  await Promise.all(Array.from({ length: 6 }, () => post("/carbonate/co2", water).expect(200)))
  const calls = ["/carbonate/co2", "/carbonate/ph", "/carbonate/co2"].map((path, index) => ({
    id: `${index}`,
    path,
    body: path.endsWith("ph") ? { co2_mg_l: 30, kh_dkh: 4 } : water,
  }))
  await post("/batch", { calls }).expect(200)

  const seen: LoggedCall[] = []
  let before: LoggedCall | undefined
  for (let page = 0; page < 20; page++) {
    const found: LoggedCall[] = await listCalls({ ctx: account.ctx, input: { limit: 2, before } })
    seen.push(...found)
    before = found.at(-1)
    if (!before) break
  }
  expect(seen.reduce((sum, { calls }) => sum + calls, 0)).toBe(9)
  expect(new Set(seen.map(({ id }) => id)).size).toBe(seen.length)
  const instants = seen.map(({ exact_at }) => exact_at)
  expect(instants).toEqual([...instants].sort().reverse())
})

it("refusals under one client id at the same time do not keep each other, or anybody else's, out of the log", async () => {
  const [one, other] = [await createTestAccount(), await createTestAccount()]
  const refuse = async (account: typeof one, id: string) => {
    const { secret } = await account.key()
    return request(stack().appUrl)
      .post("/api/v1/carbonate/co2")
      .set("authorization", `Bearer ${secret}`)
      .set("x-request-id", id)
      .send({ ph: 66, kh_dkh: 4 })
      .expect(422)
  }
  await Promise.all([...Array.from({ length: 8 }, () => refuse(one, "the-same")), refuse(other, "another")])
  const loggedOf = ({ ctx }: typeof one) => listCalls({ ctx, input: { limit: 20, outcome: "refused" } })
  await expect.poll(async () => (await loggedOf(other)).length, { timeout: 5_000 }).toBe(1)
  expect((await loggedOf(one)).length).toBeGreaterThan(0)
})
