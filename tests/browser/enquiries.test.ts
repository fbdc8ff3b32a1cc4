import { randomUUID } from "node:crypto"
import axe from "axe-core"
import { afterAll, beforeAll, describe, expect, it } from "vitest"
import { withTenant } from "@/db"
import { listEnquiries } from "@/lib/enquiries"
import { createWidget } from "@/lib/widgets"
import { createTestAccount, type TestAccount } from "../support/account"
import { linkIn, waitForMail } from "../support/mailbox"
import { stack, takeSettings } from "../support/stack"
import { expectAccessible, ready, signInAs, visit } from "./portal"
import { closeBrowser, type ShopPage, visitShop } from "./shop"

beforeAll(() => takeSettings())
afterAll(() => closeBrowser())

const origin = () => new URL(stack().shopUrl).origin

/** The shop page with a widget of an account of the test's own, that takes questions. */
async function shopThatIsAsked(
  settings: Record<string, unknown> = { enquiries: { privacy_url: `${origin()}/privacy` } },
  options: Parameters<typeof visitShop>[0] = {},
): Promise<ShopPage & { account: TestAccount }> {
  const account = await createTestAccount()
  const input = { calculator: "co2-level", name: "Test", origins: [origin()], settings } as const
  const { id } = await createWidget({ ctx: account.ctx, input })
  const shop = await visitShop({
    ...options,
    async prepare(page) {
      await options.prepare?.(page)
      await page.route(`${stack().shopUrl}/`, async (route) => {
        const response = await route.fetch()
        const body = (await response.text()).replace(stack().demo.widgetId, id)
        await route.fulfill({ response, body })
      })
    },
  })
  return { ...shop, account }
}

const asked = ({ ctx }: TestAccount) => listEnquiries({ ctx, input: { limit: 10 } })
const opener = (shop: ShopPage, name = "Ask the shop") => shop.widget.getByRole("button", { name })
const box = (shop: ShopPage) => shop.widget.getByRole("checkbox")

async function fillIn(shop: ShopPage, email: string): Promise<void> {
  await shop.widget.getByLabel("Your e-mail address").fill(email)
  await shop.widget.getByLabel("Your question").fill("Will it do?\nThank you")
  await box(shop).check()
}

describe("asking the shop, on its page of another origin", () => {
  it("works by keyboard alone, says what is missing at the field, and reaches the shop and the shopper", async () => {
    const shop = await shopThatIsAsked()
    const email = `${randomUUID()}@shopper.test`
    await shop.widget.getByRole("slider").first().press("ArrowRight")
    await opener(shop).focus()
    await shop.page.keyboard.press("Enter")
    await shop.widget.getByRole("heading", { name: "Ask A test's account" }).waitFor()
    expect(await box(shop).isChecked()).toBe(false)
    const privacy = shop.widget.getByRole("link", { name: /treats personal data/ })
    expect(await privacy.getAttribute("href")).toBe(`${origin()}/privacy`)

    // Name, address, question, consent, link, button: in that order by Tab.
    for (let count = 0; count < 6; count += 1) await shop.page.keyboard.press("Tab")
    await shop.page.keyboard.press("Enter")
    const address = shop.widget.getByLabel("Your e-mail address")
    await expect.poll(() => address.getAttribute("aria-invalid")).toBe("true")
    const described = await address.getAttribute("aria-describedby")
    expect(await shop.widget.locator(`[id="${described}"]`).textContent()).toContain("Write the address")
    expect(await shop.widget.getByText("Tick this box").isVisible()).toBe(true)
    expect(await address.evaluate((field) => field.matches(":focus"))).toBe(true)

    await shop.page.keyboard.type(email)
    await shop.page.keyboard.press("Tab")
    await shop.page.keyboard.type("Will it do?")
    await shop.page.keyboard.press("Tab")
    await shop.page.keyboard.press("Space")
    await shop.page.keyboard.press("Tab")
    await shop.page.keyboard.press("Tab")
    await shop.page.keyboard.press("Enter")
    await shop.widget.getByText(`A copy is on its way to ${email}`).waitFor()

    const [enquiry] = await asked(shop.account)
    expect(enquiry).toMatchObject({ email, name: null, message: "Will it do?", page_origin: origin() })
    expect(enquiry?.tank).toMatchObject({ ph: 6.85, kh_dkh: 4, level: "in_range" })
    expect((await waitForMail(email)).text).toContain("Will it do?")
    expect(shop.complaints).toEqual([])
    await shop.close()
  })

  it("loses nothing when the service is out of reach, and sends it once it is back", async () => {
    const shop = await shopThatIsAsked()
    const email = `${randomUUID()}@shopper.test`
    await opener(shop).click()
    await fillIn(shop, email)
    await shop.page.route("**/enquiries", (route) => route.abort())
    await shop.widget.getByRole("button", { name: "Send the question" }).click()
    await expect
      .poll(() => shop.widget.getByRole("alert").textContent(), { timeout: 15_000 })
      .toContain("Everything you wrote is still here")
    expect(await shop.widget.getByLabel("Your question").inputValue()).toBe("Will it do?\nThank you")
    await opener(shop).click()
    await opener(shop).click()
    expect(await box(shop).isChecked()).toBe(true)

    await shop.page.unroute("**/enquiries")
    await shop.widget.getByRole("button", { name: "Send the question" }).click()
    await shop.widget.getByText("A copy is on its way").waitFor()
    expect(await asked(shop.account)).toHaveLength(1)
    await shop.close()
  })

  it.each([
    ["de", "Den Laden fragen", "Frage absenden", "Bitte ankreuzen"],
    ["es", "Preguntar a la tienda", "Enviar la pregunta", "Marque esta casilla"],
    ["ja", "お店に質問する", "質問を送る", "チェックを入れてください"],
  ])("speaks %s, and axe finds nothing serious", async (lang, open, send, missing) => {
    const shop = await shopThatIsAsked(undefined, { viewport: { width: 390, height: 844 } })
    await shop.widget.evaluate((element, lang) => element.setAttribute("lang", lang), lang)
    await opener(shop, open).click()
    await shop.widget.getByRole("button", { name: send }).click()
    await shop.widget.getByText(missing).waitFor()
    await shop.page.evaluate(axe.source)
    const found = await shop.page.evaluate(async () => {
      const { violations } = await (window as unknown as { axe: typeof axe }).axe.run("tarnwright-widget")
      return violations.filter(({ impact }) => impact === "serious" || impact === "critical")
    })
    expect(found).toEqual([])
    expect(await shop.page.evaluate(() => document.documentElement.scrollWidth - innerWidth)).toBe(0)
    await shop.close()
  })

  it("is offered only where the widget's settings say so, and fetched only when it is wanted", async () => {
    const without = await shopThatIsAsked({})
    await without.widget.getByRole("slider").first().waitFor()
    expect(await without.widget.locator("[part=ask]").count()).toBe(0)
    await without.close()

    const fetched: string[] = []
    const shop = await shopThatIsAsked(undefined, {
      async prepare(page) {
        page.on("request", (request) => fetched.push(request.url()))
      },
    })
    await opener(shop).waitFor()
    expect(fetched.filter((url) => /\/ask(\.\w+)?\.js|\/consent/.test(url))).toEqual([])
    await opener(shop).click()
    await box(shop).waitFor()
    expect(fetched.filter((url) => /\/ask(\.\w+)?\.js|\/consent/.test(url))).toHaveLength(3)
    await shop.close()
  })
})

describe("the tank that a widget tells", () => {
  const events = ({ ctx }: TestAccount) =>
    withTenant(ctx.account_id, (trx) =>
      trx.selectFrom("tank_event").select(["ph", "kh_dkh", "level", "volume_l"]).execute(),
    )

  it("is the one at which the shopper came to rest, once", async () => {
    const shop = await shopThatIsAsked({})
    const ph = shop.widget.getByLabel("pH of the tank water").and(shop.widget.locator("[type=text]"))
    for (const value of ["6.9", "7", "7.4"]) await ph.fill(value)
    await expect
      .poll(() => events(shop.account), { timeout: 10_000 })
      .toEqual([{ ph: 7.4, kh_dkh: 4, level: "low", volume_l: null }])
    expect(shop.complaints).toEqual([])
    await shop.close()
  })

  it("is told by nobody who changed nothing, and by no widget whose setting is off", async () => {
    const untouched = await shopThatIsAsked({})
    await untouched.widget.getByRole("slider").first().waitFor()
    const off = await shopThatIsAsked({ statistics: false })
    await off.widget.getByRole("slider").first().press("ArrowRight")
    await off.page.waitForTimeout(4_500)
    expect([await events(untouched.account), await events(off.account)]).toEqual([[], []])
    await Promise.all([untouched.close(), off.close()])
  })
})

describe("the portal's pages", () => {
  it("show an enquiry with its consent, and erase it after asking", async () => {
    const shop = await visitShop()
    const email = `${randomUUID()}@shopper.test`
    await opener(shop).click()
    await fillIn(shop, email)
    await shop.widget.getByRole("button", { name: "Send the question" }).click()
    await shop.widget.getByText("A copy is on its way").waitFor()
    await shop.close()

    const { page, complaints, close } = await signInAs(
      "sunniva@fernhollow.test",
      "/portal/fernhollow/enquiries",
    )
    await ready(page)
    expect(await page.getByRole("button", { name: "Export all as CSV" }).count()).toBe(0)
    await page.getByRole("button", { name: email }).click()
    const dialog = page.getByRole("dialog")
    expect(await dialog.getByText("Will it do?").isVisible()).toBe(true)
    await dialog.getByText("Record of the consent").click()
    expect(await dialog.getByText("Fernhollow Aquatics may keep my e-mail address").isVisible()).toBe(true)
    await expectAccessible(page)
    await dialog.getByRole("button", { name: "Erase …" }).click()
    expect(await page.getByText("the e-mail address, the question, and the tank’s figures").isVisible()).toBe(
      true,
    )
    await page.getByRole("button", { name: "Erase the enquiry" }).click()
    await expect.poll(() => page.getByRole("button", { name: email }).count()).toBe(0)
    expect(complaints).toEqual([])
    await close()
  })

  it("let an owner take all enquiries along as a file", async () => {
    const { page, close } = await signInAs("maren@fernhollow.test", "/portal/fernhollow/enquiries")
    await ready(page)
    await page.getByRole("button", { name: "Export all as CSV" }).click()
    const file = page.waitForEvent("download")
    const confirm = page.getByRole("dialog").getByLabel("Password", { exact: true })
    await Promise.race([file, confirm.waitFor()])
    if (await confirm.isVisible()) {
      await confirm.fill(stack().demo.password)
      await page.keyboard.press("Enter")
    }
    expect((await file).suggestedFilename()).toBe("fernhollow-enquiries.csv")
    await close()
  })

  it("draw the tanks of a period, with a table behind each plot", async () => {
    const { page, complaints, close } = await signInAs("tobin@fernhollow.test", "/portal/fernhollow/insights")
    await ready(page)
    await page.getByLabel("Period").selectOption("365")
    await page.getByRole("img", { name: /Tanks by volume/ }).waitFor()
    await page.getByText("As a table").first().click()
    const row = page.getByRole("row", { name: /^100–150/ })
    expect(Number((await row.getByRole("cell").textContent())?.replace(",", "")) % 5).toBe(0)
    expect(await page.getByRole("link", { name: "Enquiries" }).count()).toBe(0)
    await expectAccessible(page)
    expect(complaints).toEqual([])
    await close()
  })

  it("take a shopper's consent back by the link in their mail, after asking", async () => {
    const shop = await shopThatIsAsked()
    const email = `${randomUUID()}@shopper.test`
    await opener(shop).click()
    await fillIn(shop, email)
    await shop.widget.getByRole("button", { name: "Send the question" }).click()
    await shop.widget.getByText("A copy is on its way").waitFor()
    const { page, complaints, close } = await visit(new URL(linkIn(await waitForMail(email))).pathname)
    await ready(page)
    await expectAccessible(page)
    expect((await asked(shop.account))[0]?.email).toBe(email)
    await page.getByRole("button", { name: "Withdraw and erase" }).click()
    await page.getByText("It is erased.").waitFor()
    expect((await asked(shop.account))[0]).toMatchObject({ email: null, erased_by: "shopper" })
    expect(complaints).toEqual([])
    await close()
    await shop.close()
  })
})
