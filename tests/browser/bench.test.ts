import type { Page } from "playwright-core"
import { afterAll, beforeAll, describe, expect, it } from "vitest"
import { stack } from "../support/stack"
import { expectAccessible, signInAs, type Visit } from "./portal"
import { closeBrowser } from "./shop"

const path = "/portal/fernhollow/bench"
const patience = { timeout: 15_000 }
let signedIn: Visit
let secret: string

beforeAll(async () => {
  signedIn = await signInAs("maren@fernhollow.test", path)
  await inSight(signedIn.page)
  secret = await signedIn.page.evaluate(async () => {
    const answer = await fetch("/api/portal/fernhollow/explorer", { method: "POST" })
    return (await answer.json()).secret
  })
}, 120_000)
afterAll(closeBrowser)

async function inSight(page: Page): Promise<void> {
  await page.getByTestId("set-point").waitFor({ timeout: 60_000 })
}

/** The Bench in a tab of its own, with nothing kept from another one. */
async function openBench(): Promise<{ page: Page; complaints: string[] }> {
  const page = await signedIn.page.context().newPage()
  const complaints: string[] = []
  page.on("console", (message) => {
    if (message.type() === "error") complaints.push(message.text())
  })
  page.on("pageerror", (error) => complaints.push(error.message))
  await page.goto(path)
  await inSight(page)
  return { page, complaints }
}

/** What the API answers to the account's sandbox key of this visit. */
async function askApi(operation: string, body: unknown, method = "POST"): Promise<unknown> {
  const answer = await fetch(`${stack().appUrl}/api/v1${operation}`, {
    method,
    headers: { authorization: `Bearer ${secret}`, "content-type": "application/json" },
    body: body === undefined ? undefined : JSON.stringify(body),
  })
  const text = await answer.text()
  expect(answer.ok, text).toBe(true)
  return text === "" ? undefined : JSON.parse(text)
}

/** The plan of a tank of this length, as the page asks the server to match it once the typing has paused. */
const askedFor = (page: Page, length_cm: number) =>
  page.waitForRequest(
    (request) => request.url().endsWith("/bench/matches") && request.postDataJSON().length_cm === length_cm,
  )

describe("the Bench", { timeout: 120_000 }, () => {
  it("follows what is typed, and says what POST /api/v1/plan says", async () => {
    const { page, complaints } = await openBench()
    const before = await page.getByTestId("set-point").textContent()
    const request = askedFor(page, 120)
    await page.getByLabel("Carbonate hardness, KH").fill("7.5")
    await page.getByLabel("Length", { exact: true }).fill("120")
    await expect.poll(() => page.getByTestId("set-point").textContent(), patience).not.toBe(before)
    const input = (await request).postDataJSON()
    expect(input).toMatchObject({ length_cm: 120, kh_dkh: 7.5 })

    const { result } = (await askApi("/plan", input)) as { result: PlanNumbers }
    const results = page.locator("#results")
    expect(await page.getByTestId("set-point").textContent()).toBe(result.ph.ph.toFixed(2))
    const figure = (label: string) =>
      results
        .locator("dl > div", { has: page.getByText(label, { exact: true }) })
        .first()
        .locator("dd")
        .first()
    expect(await figure("Hold the pH at").textContent()).toBe(result.ph.ph.toFixed(2))
    expect(await figure("A fill lasts").textContent()).toBe(
      `${Number(result.cylinder.days.toPrecision(2))}days`,
    )
    expect(await figure("Real flow").textContent()).toBe(`${result.flow.flow_l_h.toFixed(0)}L/h`)
    expect(complaints).toEqual([])
    await page.close()
  })

  it("keeps the last good result while a field is wrong, and says how to mend it", async () => {
    const { page } = await openBench()
    const answer = page.locator("#results dl").first()
    const good = await answer.textContent()
    await page.getByLabel("Temperature").fill("95")
    const status = page.getByRole("status").filter({ hasText: "The last good result is shown." })
    await status.waitFor()
    expect(await answer.textContent()).toBe(good)
    expect(await page.getByLabel("Temperature").getAttribute("aria-invalid")).toBe("true")
    await page.getByText("Enter 0 to 50 °C; you gave 95.").first().waitFor()
    await page.getByLabel("Length", { exact: true }).focus()
    await status.getByRole("button", { name: "Mend it" }).click()
    expect(await page.evaluate(() => document.activeElement?.getAttribute("name"))).toBe("temperature_c")
    await page.keyboard.type("24")
    await page.getByTestId("set-point").waitFor()
    await page.close()
  })

  it("keeps the tank when the units change, and remembers both over a reload", async () => {
    const { page } = await openBench()
    await page.getByLabel("Length", { exact: true }).fill("101.3")
    await page.getByLabel("Carbonate hardness, KH").fill("5.3")
    await expect.poll(() => page.getByTestId("set-point").textContent(), patience).not.toBe("6.65")
    const setPoint = await page.getByTestId("set-point").textContent()
    await page.getByLabel("Units", { exact: true }).selectOption("us")
    await page.getByLabel("Hardness", { exact: true }).selectOption("kh_ppm_caco3")
    expect(await page.getByLabel("Length", { exact: true }).inputValue()).toBe("39.88")
    expect(await page.getByLabel("Carbonate hardness, KH").inputValue()).toBe("94.6")
    expect(await page.getByTestId("set-point").textContent()).toBe(setPoint)
    await page.reload()
    await page.getByTestId("set-point").waitFor()
    expect(await page.getByLabel("Length", { exact: true }).inputValue()).toBe("39.88")
    expect(await page.getByTestId("set-point").textContent()).toBe(setPoint)
    await page.getByLabel("Units", { exact: true }).selectOption("metric")
    await page.getByLabel("Hardness", { exact: true }).selectOption("dkh")
    expect(await page.getByLabel("Length", { exact: true }).inputValue()).toBe("101.3")
    await page.close()
  })

  it("clears the bench for a new customer once that is confirmed", async () => {
    const { page } = await openBench()
    await page.getByLabel("Length", { exact: true }).fill("150")
    await page.getByRole("button", { name: "New customer" }).click()
    await page.getByRole("button", { name: "Keep this tank" }).click()
    expect(await page.getByLabel("Length", { exact: true }).inputValue()).toBe("150")
    await page.getByRole("button", { name: "New customer" }).click()
    await page.getByRole("button", { name: "Clear the bench" }).click()
    expect(await page.getByLabel("Length", { exact: true }).inputValue()).toBe("90")
    await page.close()
  })

  it("ranks the shop's own parts, and plans with the one that is chosen", async () => {
    const { page } = await openBench()
    const name = `Fernhollow Current ${Date.now()}`
    const item = (await askApi("/catalog/items", {
      kind: "filter",
      name,
      attributes: { max_flow_l_h: 1337, max_head_m: 2.1, hose_inner_diameter_mm: 16 },
    })) as { id: string }
    await page.reload()
    const row = page.getByRole("listitem").filter({ hasText: name })
    await row.getByText("It moves").waitFor()
    await row.getByRole("button", { name: "Plan with it" }).click()
    await row.getByText("in this plan").waitFor()
    expect(await page.getByLabel("Flow on the box").inputValue()).toBe("1337")
    await askApi(`/catalog/items/${item.id}`, undefined, "DELETE")
    await page.close()
  })

  it("saves the plan as a report under its title, and leads to it", async () => {
    const { page, complaints } = await openBench()
    const title = `Tank of ${Date.now()}`
    await page.getByLabel("Water height").fill("48")
    await page.getByRole("button", { name: "Save as a report (10 units)" }).click()
    await page.getByLabel("Title").fill(title)
    await page.getByRole("button", { name: "Save for 10 units" }).click()
    await page.getByRole("heading", { name: "The report is saved" }).waitFor()
    await page.getByRole("link", { name: "Open the report" }).click()
    await page.getByRole("heading", { name: title }).waitFor()
    expect(complaints).toEqual([])
    await page.close()
  })

  it("is worked by keyboard: arrows step a number, the plots and folded parts can be reached", async () => {
    const { page } = await openBench()
    await page.getByLabel("Water height").focus()
    await page.keyboard.press("ArrowUp")
    expect(await page.getByLabel("Water height").inputValue()).toBe("50")
    const table = page
      .locator("figure", { has: page.locator("svg") })
      .getByText("As a table", { exact: true })
      .first()
    await table.focus()
    await page.keyboard.press("Enter")
    expect(
      await page.getByRole("table", { name: "pH and hardness with lines of equal CO2" }).isVisible(),
    ).toBe(true)
    await page.close()
  })

  it.each([
    { colorScheme: "light", viewport: { width: 390, height: 844 } },
    { colorScheme: "dark", viewport: { width: 1600, height: 900 } },
  ] as const)("is accessible with every part open, $viewport.width pixels wide", async (screen) => {
    const { page, complaints, close } = await signInAs("maren@fernhollow.test", path, screen)
    await inSight(page)
    await page.evaluate(() => {
      for (const details of document.querySelectorAll("main details")) details.setAttribute("open", "")
    })
    await expectAccessible(page)
    expect(complaints).toEqual([])
    await close()
  })

  it("prints the sheet and nothing else", async () => {
    const { page } = await openBench()
    await page.emulateMedia({ media: "print" })
    await page.getByRole("heading", { name: "CO2 plan" }).waitFor()
    expect(await page.getByRole("button", { name: "Print" }).isVisible()).toBe(false)
    expect(await page.getByRole("link", { name: "Overview" }).isVisible()).toBe(false)
    await page.close()
  })
})

interface PlanNumbers {
  readonly ph: { readonly ph: number }
  readonly cylinder: { readonly days: number }
  readonly flow: { readonly flow_l_h: number }
}
