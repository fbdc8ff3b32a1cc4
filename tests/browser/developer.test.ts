import { randomUUID } from "node:crypto"
import { afterAll, describe, expect, it } from "vitest"
import { startReceiver } from "../support/receiver"
import { stack } from "../support/stack"
import { ready, signInAs } from "./portal"
import { closeBrowser } from "./shop"

afterAll(closeBrowser)

describe("a developer", () => {
  it("makes an endpoint, sees a test event arrive, sends it again, and deletes the endpoint", async () => {
    const receiver = await startReceiver()
    const url = `${receiver.url}/${randomUUID().slice(0, 8)}`
    const { page, complaints, close } = await signInAs("ilya@fernhollow.test", "/portal/fernhollow/webhooks")
    await ready(page)
    await page.getByRole("button", { name: "New endpoint" }).click()
    await page.getByLabel("Address", { exact: true }).fill("ftp://shop.example")
    await page.getByLabel(/^key\.revoked/).check()
    await page.getByRole("button", { name: "Make the endpoint" }).click()
    await page.getByRole("alert").filter({ hasText: "https" }).first().waitFor()
    await page.getByLabel("Address", { exact: true }).fill(url)
    await page.getByRole("button", { name: "Make the endpoint" }).click()
    await page.getByRole("link", { name: url }).click()

    await page.getByRole("button", { name: "Show the secret" }).click()
    await page.getByText(/^whsec_/).waitFor()
    await page.getByRole("button", { name: "Send a test event" }).click()
    await page.getByRole("cell", { name: "delivered" }).waitFor()
    expect(receiver.received).toHaveLength(1)
    await page.getByRole("button", { name: "webhook.test" }).click()
    await page.getByText("This is a test").waitFor()
    await page.getByRole("button", { name: "Send it again" }).click()
    await expect.poll(() => receiver.received.length, { timeout: 20_000 }).toBe(2)

    await page.getByRole("button", { name: "Delete", exact: true }).click()
    await page.getByRole("button", { name: "Delete the endpoint" }).click()
    await page.waitForURL(/\/webhooks$/)
    await page.getByRole("link", { name: url }).waitFor({ state: "detached" })
    // The browser tells of the 422 that the first address was answered with.
    expect(complaints.filter((complaint) => !complaint.includes("422"))).toEqual([])
    await close()
    await receiver.close()
  })

  it("finds a call that was refused, with the field to mend and the page of its error", async () => {
    const { sandboxKey } = stack().demo
    const requestId = `refused-${randomUUID().slice(0, 8)}`
    const refused = await fetch(`${stack().appUrl}/api/v1/carbonate/co2`, {
      method: "POST",
      headers: {
        authorization: `Bearer ${sandboxKey}`,
        "content-type": "application/json",
        "x-request-id": requestId,
      },
      body: JSON.stringify({ ph: 66, kh_dkh: 4 }),
    })
    expect(refused.status).toBe(422)
    // The log is written beside the answer, not before it.
    await new Promise((resolve) => setTimeout(resolve, 1_000))
    const { page, complaints, close } = await signInAs("ilya@fernhollow.test", "/portal/fernhollow/requests")
    await ready(page)
    await page.getByLabel("Outcome").selectOption("refused")
    const row = page.getByRole("button", { name: "POST /carbonate/co2" }).first()
    await row.click()
    const dialog = page.getByRole("dialog")
    await dialog.getByText(requestId).waitFor()
    await dialog.getByText("/ph", { exact: true }).waitFor()
    await dialog.getByRole("listitem").getByText("The value must be at most").waitFor()
    await dialog.getByRole("link", { name: "More on validation_failed" }).click()
    await page.waitForURL(/\/docs\/errors\/validation_failed$/)
    expect(complaints).toEqual([])
    await close()
  })
})
