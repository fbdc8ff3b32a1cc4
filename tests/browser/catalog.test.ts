import { randomUUID } from "node:crypto"
import type { Page } from "playwright-core"
import { afterAll, expect, it } from "vitest"
import { expectAccessible, ready, signInAs } from "./portal"
import { closeBrowser } from "./shop"

afterAll(closeBrowser)

const header = "kind,name,sku,price,currency,max_flow_l_h,max_head_m"

async function catalogPage(who = "sunniva@fernhollow.test") {
  const visit = await signInAs(who, "/portal/fernhollow/catalog")
  await ready(visit.page)
  return visit
}

const search = (page: Page, text: string) => page.getByRole("searchbox").fill(text)

async function upload(page: Page, csv: string): Promise<void> {
  await page.getByRole("button", { name: "Upload CSV" }).click()
  const file = { name: "parts.csv", mimeType: "text/csv", buffer: Buffer.from(csv) }
  await page.locator("input[type=file]").setInputFiles(file)
}

it("takes the good rows of a file after naming the bad ones; a cell is edited, a bad price is kept as typed", async () => {
  const { page, complaints, close } = await catalogPage()
  const mark = randomUUID().slice(0, 8)
  await upload(
    page,
    [
      header,
      `filter,Alpha ${mark},A-${mark},99.00,USD,1000,1.6`,
      `filter,Beta ${mark},B-${mark},cheap,USD,1000,1.6`,
      `toaster,Gamma ${mark},C-${mark},10,USD,,`,
    ].join("\n"),
  )
  const bad = page.getByRole("region", { name: "Rows that cannot be taken" })
  await bad.getByText("Row 3, price").waitFor()
  expect(await bad.getByRole("listitem").count()).toBe(2)
  expect(await bad.textContent()).toContain("“toaster”")
  await expectAccessible(page)
  await page.getByRole("button", { name: "Take the 1 good row" }).click()
  await page.getByRole("button", { name: "Done" }).click()

  await search(page, mark)
  await page.getByRole("button", { name: `Name of Alpha ${mark}` }).waitFor()
  expect(await page.getByText(`Beta ${mark}`).count()).toBe(0)

  const price = page.getByRole("button", { name: `Price of Alpha ${mark}` })
  await price.focus()
  await page.keyboard.press("Enter")
  const field = page.getByRole("textbox", { name: `Price of Alpha ${mark}` })
  await field.fill("twelve")
  await page.keyboard.press("Enter")
  await page.getByText("“twelve” is no price.").waitFor()
  expect(await field.inputValue()).toBe("twelve")
  await field.fill("120.50")
  await page.keyboard.press("Enter")
  await page.getByRole("button", { name: `Price of Alpha ${mark}: 120.50 USD` }).waitFor()
  await page.keyboard.press("Enter")
  await field.fill("1")
  await page.keyboard.press("Escape")
  await page.getByRole("button", { name: `Price of Alpha ${mark}: 120.50 USD` }).waitFor()

  await page.getByRole("button", { name: `Delete Alpha ${mark}` }).click()
  await page.getByRole("button", { name: "Delete the part" }).click()
  await page.getByText("Nothing matches the filter.").waitFor()
  expect(complaints).toEqual([])
  await close()
})

it("moves a point of a pump's curve by keyboard, and says when the curve rises", async () => {
  const { page, complaints, close } = await catalogPage()
  const name = `Pump ${randomUUID().slice(0, 8)}`
  await page.getByRole("button", { name: "Add a part" }).click()
  await page.getByLabel("Name", { exact: true }).fill(name)
  await page.getByRole("radio", { name: /^A curve/ }).check()
  const point = page.getByRole("slider", { name: "Point 2" })
  const before = Number(await point.getAttribute("aria-valuenow"))
  await point.focus()
  await page.keyboard.press("ArrowRight")
  expect(Number(await point.getAttribute("aria-valuenow"))).toBe(before + 10)
  expect(await page.getByLabel("Flow of point 2").inputValue()).toBe(String(before + 10))
  const head = page.getByLabel("Head of point 2")
  const fell = await head.inputValue()
  await head.fill("1.9")
  await page.getByText("The head rises at point 2").waitFor()
  await head.fill(fell)
  await page.getByText("The head falls from point to point").waitFor()
  await expectAccessible(page)
  await page.getByRole("button", { name: "Add the part" }).click()
  await search(page, name)
  await page.getByText("Pump curve of 5 points").waitFor()
  await page.getByRole("button", { name: `Delete ${name}` }).click()
  await page.getByRole("button", { name: "Delete the part" }).click()
  await page.getByText("Nothing matches the filter.").waitFor()
  expect(complaints).toEqual([])
  await close()
})

it("only shows the parts to a viewer, who asks what fits a tank", async () => {
  const { page, complaints, close } = await catalogPage("tobin@fernhollow.test")
  expect(await page.getByRole("button", { name: /Add a part|Upload CSV|^Edit|^Delete/ }).count()).toBe(0)
  await page.getByRole("button", { name: "Show what fits" }).click()
  await page
    .getByText(/% above the need/)
    .first()
    .waitFor()
  await expectAccessible(page)
  expect(complaints).toEqual([])
  await close()
})
