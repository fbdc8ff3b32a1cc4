import { createServer, type Server } from "node:http"
import type { AddressInfo } from "node:net"
import { afterAll, beforeAll, describe, expect, it } from "vitest"
import { withTenant } from "@/db"
import { carbonateDefaults } from "@/lib/chemistry/carbonate-water"
import { co2FromPh } from "@/lib/chemistry/co2-from-ph"
import { createWidget } from "@/lib/widgets"
import { createTestAccount, type TestAccount } from "../support/account"
import { stack, takeSettings } from "../support/stack"
import { closeBrowser, type ShopPage, visitShop } from "./shop"

beforeAll(() => takeSettings())
afterAll(() => closeBrowser())

/** A widget of an account of the test's own, for the shop page's origin. */
async function ownWidget(options: Parameters<typeof createTestAccount>[0] = {}) {
  const account = await createTestAccount(options)
  const origins = [new URL(stack().shopUrl).origin]
  const { id } = await createWidget({
    ctx: account.ctx,
    input: { calculator: "co2-level", name: "Test", origins },
  })
  return { account, id }
}

/** The shop page with another widget in the place of the demo's. */
async function visitWith(widgetId: string, visit: Parameters<typeof visitShop>[0] = {}): Promise<ShopPage> {
  const shop = await visitShop({
    ...visit,
    async prepare(page) {
      await visit?.prepare?.(page)
      await page.route(`${stack().shopUrl}/`, async (route) => {
        const response = await route.fetch()
        const body = (await response.text()).replace(stack().demo.widgetId, widgetId)
        await route.fulfill({ response, body })
      })
    },
  })
  return shop
}

function sessionsOf({ ctx }: TestAccount) {
  return withTenant(ctx.account_id, (trx) =>
    trx
      .selectFrom("usage_event")
      .select(["operation", "units"])
      .where("account_id", "=", ctx.account_id)
      .execute(),
  )
}

function ph(shop: ShopPage) {
  return shop.widget.getByLabel("pH of the tank water").and(shop.widget.locator("[type=text]"))
}

describe("the CO2 level widget on a shop's page of another origin", () => {
  it("answers as the engine does, under a policy that allows our origin and nothing else", async () => {
    const shop = await visitShop()
    await ph(shop).fill("6.4")
    const { result } = co2FromPh({ ...carbonateDefaults, ph: 6.4, kh_dkh: 4 })
    const whole = Math.round(result.co2_mg_l)
    await expect
      .poll(() => shop.widget.getByRole("status").textContent())
      .toContain(`about ${whole} mg/L CO2`)
    expect(await shop.widget.getByRole("status").textContent()).toContain("dangerous")
    expect(shop.complaints).toEqual([])
    await shop.close()
  })

  it("opens one session when the shopper first changes something, and not before", async () => {
    const { account, id } = await ownWidget()
    const shop = await visitWith(id)
    await ph(shop).waitFor()
    await shop.page.mouse.click(900, 500)
    expect(await sessionsOf(account)).toEqual([])

    for (const value of ["6.9", "7", "7.1"]) await ph(shop).fill(value)
    await shop.widget.getByRole("slider").nth(1).press("ArrowRight")
    await shop.widget.getByRole("combobox").first().selectOption("kh_meq_l")
    await expect.poll(() => sessionsOf(account)).toEqual([{ operation: "openWidgetSession", units: 2 }])

    // Moved within the page, or made anew: still the same view of the page.
    await shop.page.evaluate(() => document.body.append(document.querySelector("tarnwright-widget")!))
    await ph(shop).fill("7.3")
    await shop.widget.evaluate((element) => element.setAttribute("theme", "dark"))
    await ph(shop).fill("7.4")
    await shop.page.waitForTimeout(500)
    expect(await sessionsOf(account)).toHaveLength(1)
    expect(shop.complaints).toEqual([])
    await shop.close()
  })

  it("leaves nothing behind: no cookie, nothing stored, no name of its own on the page", async () => {
    const shop = await visitShop({
      prepare: (page) =>
        page.addInitScript(() => Object.assign(window, { namesBefore: Object.keys(window) })),
    })
    await ph(shop).fill("7")
    expect(await shop.page.context().cookies()).toEqual([])
    const left = await shop.page.evaluate(() => {
      const before = new Set([...(window as unknown as { namesBefore: string[] }).namesBefore, "namesBefore"])
      const names = Object.keys(window).filter((name) => !before.has(name))
      return { names, stored: localStorage.length + sessionStorage.length }
    })
    expect(left).toEqual({ names: [], stored: 0 })
    await shop.close()
  })

  it.each([390, 1280])("moves nothing on the page when it appears, at %d px", async (width) => {
    const shop = await visitShop({
      viewport: { width, height: 900 },
      async prepare(page) {
        await page.addInitScript(() => {
          Object.assign(window, { shift: 0 })
          new PerformanceObserver((list) => {
            for (const entry of list.getEntries()) {
              ;(window as unknown as { shift: number }).shift += (entry as unknown as { value: number }).value
            }
          }).observe({ type: "layout-shift", buffered: true })
        })
      },
    })
    await ph(shop).waitFor()
    await shop.widget.scrollIntoViewIfNeeded()
    await shop.page.waitForTimeout(300)
    const [shift, height, kept] = await shop.page.evaluate(() => {
      const element = document.querySelector("tarnwright-widget")!
      const content = element.shadowRoot!.querySelector("section")!.offsetHeight
      return [(window as unknown as { shift: number }).shift, content, element.clientHeight]
    })
    expect(shift).toBe(0)
    expect(kept).toBeGreaterThanOrEqual(height!)
    await shop.close()
  })

  it("keeps the last answer while a number cannot be used, and says so in words", async () => {
    const shop = await visitShop()
    await ph(shop).fill("6,9")
    await expect.poll(() => shop.widget.getByRole("status").textContent()).toContain("At pH 6.9,")
    await ph(shop).fill("6.9.1")
    await expect.poll(() => ph(shop).getAttribute("aria-invalid")).toBe("true")
    const described = await ph(shop).getAttribute("aria-describedby")
    expect(await shop.widget.locator(`[id="${described}"]`).textContent()).toMatch(
      /use digits and one decimal mark/,
    )
    await shop.page.waitForTimeout(1_100)
    expect(await shop.widget.getByRole("status").textContent()).toContain("At pH 6.9,")
    expect(await shop.widget.getByText("This is the last result").isVisible()).toBe(true)
    await shop.close()
  })

  it("speaks the language of the element before that of the page", async () => {
    const shop = await visitShop()
    await ph(shop).waitFor()
    await shop.widget.evaluate((element) => element.setAttribute("lang", "de-CH"))
    const field = shop.widget.getByLabel("pH des Aquarienwassers").and(shop.widget.locator("[type=text]"))
    await field.fill("7,25")
    await expect.poll(() => shop.widget.getByRole("status").textContent()).toContain("Bei pH 7.25,")
    expect(await shop.widget.locator("section").getAttribute("lang")).toBe("de-CH")
    await shop.close()
  })
})

describe("what goes wrong around the widget", () => {
  let foreign: Server
  let foreignUrl: string

  beforeAll(async () => {
    foreign = createServer((request, response) => {
      response.setHeader("content-type", "text/html")
      response.end(`<!doctype html><title>Elsewhere</title>
        <script async type="module" src="${stack().appUrl}/w/v1/loader.js"></script>
        <tarnwright-widget widget-id="${request.url?.slice(1)}"><a href="/">Ask us</a></tarnwright-widget>`)
    })
    await new Promise<void>((done) => foreign.listen(0, "127.0.0.1", done))
    foreignUrl = `http://127.0.0.1:${(foreign.address() as AddressInfo).port}`
  })
  afterAll(() => void foreign.close())

  it("on a page that is not on its list the fallback stays, and nothing is counted", async () => {
    const { account, id } = await ownWidget()
    let refused = 0
    const shop = await visitShop({
      url: `${foreignUrl}/${id}`,
      async prepare(page) {
        page.on("requestfailed", (asked) => {
          if (asked.url().includes(`${id}/settings`)) refused++
        })
      },
    })
    await expect.poll(() => refused, { timeout: 15_000 }).toBe(3)
    await shop.page.waitForTimeout(300)
    expect(await shop.page.getByText("Ask us").isVisible()).toBe(true)
    expect(await shop.widget.evaluate((element) => element.shadowRoot)).toBeNull()
    expect(await sessionsOf(account)).toEqual([])
    expect(shop.complaints.filter((text) => !isNetworkNote(text))).toEqual([])
    await shop.close()
  })

  it.each([
    ["the loader is blocked", "**/w/v1/loader.js"],
    ["the calculator is blocked", "**/co2-level.js"],
    ["its catalogue is blocked", "**/co2-level.en.js"],
  ])("the fallback stays when %s, and the page sees no error", async (_, blocked) => {
    const shop = await visitShop({ prepare: (page) => page.route(blocked, (route) => route.abort()) })
    await shop.page.waitForTimeout(1_000)
    expect(await shop.page.getByText("Bring a water sample").isVisible()).toBe(true)
    expect(shop.complaints.filter((text) => !isNetworkNote(text))).toEqual([])
    await shop.close()
  })

  it("a calculator that was tampered with does not run", async () => {
    const shop = await visitShop({
      prepare: (page) =>
        page.route("**/co2-level.js", async (route) => {
          const response = await route.fetch()
          await route.fulfill({ response, body: `document.title = "taken";${await response.text()}` })
        }),
    })
    await shop.page.waitForTimeout(1_000)
    expect(await shop.page.title()).not.toBe("taken")
    expect(await shop.page.getByText("Bring a water sample").isVisible()).toBe(true)
    expect(shop.complaints.some((text) => text.includes("integrity"))).toBe(true)
    await shop.close()
  })

  it("a service out of reach makes it rest with its last answer, and it can be tried again", async () => {
    const { account, id } = await ownWidget()
    const shop = await visitWith(id, {
      prepare: (page) => page.route("**/sessions", (route) => route.abort()),
    })
    await ph(shop).fill("7")
    await expect
      .poll(() => shop.widget.getByRole("alert").textContent(), { timeout: 15_000 })
      .toContain("resting")
    expect(await shop.page.getByText("Bring a water sample").isVisible()).toBe(true)
    await ph(shop).fill("7.4")
    await shop.page.waitForTimeout(1_100)
    expect(await shop.widget.getByRole("status").textContent()).toContain("At pH 7,")
    expect(shop.complaints.filter((text) => !isNetworkNote(text))).toEqual([])

    await shop.page.unroute("**/sessions")
    await shop.widget.getByRole("button", { name: "Try again" }).click()
    await expect.poll(() => shop.widget.getByRole("status").textContent()).toContain("At pH 7.4,")
    expect(await shop.widget.getByRole("alert").count()).toBe(0)
    expect(await sessionsOf(account)).toHaveLength(1)
    await shop.close()
  })

  it("an account without units closes it without a word of money", async () => {
    const { account, id } = await ownWidget({ unit_cap: 1 })
    const shop = await visitWith(id)
    await ph(shop).fill("7")
    await expect.poll(() => shop.widget.getByRole("alert").textContent()).toContain("not available right now")
    expect(await shop.widget.evaluate((element) => element.shadowRoot!.textContent)).not.toMatch(
      /unit|paid|quota|plan /i,
    )
    expect(await sessionsOf(account)).toEqual([])
    await shop.close()
  })
})

describe("the framed widget", () => {
  it("is as tall as what it holds, and settles in at most three messages", async () => {
    const shop = await visitShop({
      path: "/framed",
      prepare: (page) =>
        page.addInitScript(() => {
          Object.assign(window, { told: [] })
          addEventListener("message", ({ data }) =>
            (window as unknown as { told: unknown[] }).told.push(data),
          )
        }),
    })
    const inner = shop.page.frameLocator("iframe").locator("tarnwright-widget")
    await inner.getByRole("slider").first().waitFor()
    const heights = async () => [
      await shop.widget.locator("iframe").evaluate((frame) => frame.clientHeight),
      await inner.evaluate((element) => Math.ceil(element.getBoundingClientRect().height)),
    ]
    await expect.poll(async () => new Set(await heights()).size).toBe(1)

    const before = await shop.page.evaluate(() => (window as unknown as { told: unknown[] }).told.length)
    await inner.getByText("How this is worked out").click()
    const [, grown] = await heights()
    await expect.poll(async () => (await heights())[0]).toBe(grown)
    await shop.page.waitForTimeout(500)
    const told = await shop.page.evaluate(() => (window as unknown as { told: unknown[] }).told.length)
    expect(told - before).toBeLessThanOrEqual(3)
    expect(shop.complaints).toEqual([])
    await shop.close()
  })

  it("takes a height from its own frame alone", async () => {
    const shop = await visitShop({ path: "/framed" })
    await shop.page.frameLocator("iframe").locator("tarnwright-widget").getByRole("slider").first().waitFor()
    await shop.page.waitForTimeout(500)
    const height = () => shop.widget.locator("iframe").evaluate((frame) => frame.clientHeight)
    const before = await height()
    await shop.page.evaluate(() => window.postMessage({ type: "tarnwright:height", height: 333 }, "*"))
    await shop.page.waitForTimeout(200)
    expect(await height()).toBe(before)
    await shop.close()
  })

  it("needs no script of ours on the page, and opens its session from the frame", async () => {
    const shop = await visitShop({ path: "/plain-frame" })
    const inner = shop.page.frameLocator("iframe").locator("tarnwright-widget")
    const opened = shop.page.waitForResponse((response) => response.url().endsWith("/sessions"))
    await inner.getByRole("slider").first().press("ArrowLeft")
    expect((await opened).status()).toBe(200)
    expect(shop.complaints).toEqual([])
    await shop.close()
  })
})

/** The browser itself notes a request that failed; no script can keep it from that. */
function isNetworkNote(text: string): boolean {
  return /^Failed to load resource|net::ERR_|blocked by CORS policy/.test(text)
}
