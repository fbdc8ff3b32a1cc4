import { randomUUID } from "node:crypto"
import { afterAll, beforeAll, describe, expect, it } from "vitest"
import { closePools, withoutTenant } from "@/db"
import { enqueueMail } from "@/lib/mail"
import { linkIn, mailsTo, waitForMail } from "../support/mailbox"
import { stack, takeSettings } from "../support/stack"

beforeAll(takeSettings)
afterAll(closePools)

const newAddress = () => `${randomUUID()}@shop.test`
const letter = (to: string) =>
  ({ template: "verify_email", to, data: { name: "Ada", url: "http://127.0.0.1:1/verify?token=t" } }) as const

describe("a mail on the queue", () => {
  it("is sent by the worker once its transaction has committed", async () => {
    const to = newAddress()
    await withoutTenant((trx) => enqueueMail(trx, letter(to)))
    const mail = await waitForMail(to)
    expect(mail.subject).toBe("Confirm your address for Tarnwright")
    expect(linkIn(mail)).toBe("http://127.0.0.1:1/verify?token=t")
    expect(mail.html).toContain("Hello Ada")
  })

  it("is not sent when its transaction fails", async () => {
    const [refused, sent] = [newAddress(), newAddress()]
    const failing = withoutTenant(async (trx) => {
      await enqueueMail(trx, letter(refused))
      throw new Error("the verb refused after all")
    })
    await expect(failing).rejects.toThrow("the verb refused after all")
    await withoutTenant((trx) => enqueueMail(trx, letter(sent)))
    // Jobs are taken in order, so the first would have come by now.
    await waitForMail(sent)
    expect(await mailsTo(refused)).toEqual([])
  })
})

describe("the mail catcher", () => {
  it("shows what came as a page, with what a stranger wrote as text", async () => {
    const to = newAddress()
    const data = { name: "<script>alert(1)</script>", url: "http://127.0.0.1:1/verify" }
    await withoutTenant((trx) => enqueueMail(trx, { template: "verify_email", to, data }))
    const { id } = await waitForMail(to)
    const inbox = await (await fetch(stack().mailUrl)).text()
    expect(inbox).toContain(to)
    const response = await fetch(`${stack().mailUrl}/mails/${id}`)
    expect(response.headers.get("content-security-policy")).toContain("default-src 'none'")
    const page = await response.text()
    expect(page).toContain("Confirm your address for Tarnwright")
    expect(page).not.toContain("<script")
  })

  it("answers 404 for a mail that it does not have", async () => {
    expect((await fetch(`${stack().mailUrl}/messages/none`)).status).toBe(404)
    expect((await fetch(`${stack().mailUrl}/mails/none`)).status).toBe(404)
  })
})
