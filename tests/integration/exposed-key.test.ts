import request from "supertest"
import { afterAll, beforeAll, expect, it } from "vitest"
import { closePools } from "@/db"
import { mailsTo, waitForMail } from "../support/mailbox"
import { stack, takeSettings } from "../support/stack"
import { createSubscriber } from "../support/subscriber"

beforeAll(takeSettings)
afterAll(closePools)

function fromBrowser(secret: string) {
  return request(stack().appUrl)
    .post("/api/v1/carbonate/co2")
    .set("authorization", `Bearer ${secret}`)
    .set("origin", "https://shop.example")
    .send({ ph: 6.8, kh_dkh: 4 })
}

it("an owner whose server key a browser sends is warned once a day for each key", async () => {
  const account = await createSubscriber({ plan: "brand" })
  const first = await account.key({ name: "Shop back end" })
  for (let call = 0; call < 5; call++) await fromBrowser(first.secret).expect(403)
  const mail = await waitForMail(account.email, "stands in a web page")
  expect(mail.text).toContain(`“Shop back end”, ending in ${first.key.last4}`)
  expect(mail.text).not.toContain(first.secret)

  await fromBrowser(first.secret).expect(403)
  const second = await account.key({ name: "Till" })
  await fromBrowser(second.secret).expect(403)
  await expect
    .poll(async () => (await mailsTo(account.email)).some(({ text }) => text.includes("“Till”")), {
      timeout: 15_000,
    })
    .toBe(true)
  expect(await mailsTo(account.email)).toHaveLength(2)
})
