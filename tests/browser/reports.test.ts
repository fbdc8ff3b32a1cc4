import { afterAll, expect, it } from "vitest"
import { stack } from "../support/stack"
import { expectAccessible, ready, signInAs, visit } from "./portal"
import { closeBrowser } from "./shop"

afterAll(closeBrowser)

it("a report is opened, shared, read without a sign-in, saved as a PDF, and gone once sharing ends", async () => {
  const title = `Shared ${Date.now()}`
  const { page, complaints, close } = await signInAs("maren@fernhollow.test", "/portal/fernhollow/reports")
  await ready(page)
  const made = await page.request.post("/api/portal/fernhollow/reports", {
    headers: { origin: stack().appUrl },
    data: { kind: "carbonate_co2", input: { ph: 6.8, kh_dkh: 4 }, title, shopper: "The corner tank" },
  })
  expect(made.status(), await made.text()).toBe(200)
  await page.reload()
  await page.getByRole("link", { name: title }).click()
  await page.getByRole("heading", { name: title, level: 1 }).waitFor()
  await page.getByRole("button", { name: "Share by a link" }).click()
  const link = page.getByRole("link", { name: /\/r\// })
  const address = new URL((await link.getAttribute("href")) ?? "").pathname
  await expectAccessible(page)

  const stranger = await visit(address)
  await stranger.page.getByRole("heading", { name: title, level: 1 }).waitFor()
  await expectAccessible(stranger.page)
  expect(await stranger.page.content()).not.toContain("The corner tank")
  expect(await stranger.page.locator('meta[name="robots"]').getAttribute("content")).toContain("noindex")
  const pdf = await stranger.page.request.get(`${address}/pdf`)
  expect(pdf.headers()["content-type"]).toBe("application/pdf")
  expect((await pdf.body()).subarray(0, 5).toString()).toBe("%PDF-")
  expect(stranger.complaints).toEqual([])

  await page.getByRole("button", { name: "End sharing" }).click()
  await link.waitFor({ state: "detached" })
  expect((await stranger.page.goto(address))?.status()).toBe(404)
  await stranger.page.getByRole("heading", { name: "This report is not shared, or no longer" }).waitFor()
  expect((await stranger.page.request.get(`${address}/pdf`)).status()).toBe(404)
  await stranger.close()

  await page.getByRole("button", { name: "Delete" }).click()
  await page.getByRole("button", { name: "Delete the report" }).click()
  await page.waitForURL(/\/reports$/)
  await page.getByRole("link", { name: title }).waitFor({ state: "detached" })
  expect(complaints).toEqual([])
  await close()
})
