import { readFileSync } from "node:fs"
import { createRequire } from "node:module"
import type axe from "axe-core"
import type { Page } from "playwright-core"
import { afterAll, beforeAll, describe, expect, it } from "vitest"
import { takeSettings } from "../support/stack"
import { closeBrowser, type ShopPage, visitShop } from "./shop"

const axeSource = readFileSync(createRequire(import.meta.url).resolve("axe-core/axe.min.js"), "utf8")

beforeAll(() => takeSettings())
afterAll(() => closeBrowser())

/** What axe finds wrong with the widget, by the rules of WCAG 2.2 A and AA and of best practice. */
async function violations(page: Page): Promise<string[]> {
  await page.evaluate(axeSource)
  return page.evaluate(async () => {
    const { axe: run } = window as unknown as { axe: typeof axe }
    const { violations } = await run.run("tarnwright-widget", { resultTypes: ["violations"] })
    return violations.map(({ id, nodes }) => `${id}: ${nodes.map(({ html }) => html).join(" ")}`)
  })
}

async function ready(visit: Parameters<typeof visitShop>[0] = {}): Promise<ShopPage> {
  const shop = await visitShop(visit)
  await shop.widget.getByRole("slider").first().waitFor()
  return shop
}

function number(shop: ShopPage) {
  return shop.widget.locator("[type=text]").first()
}

describe("axe finds nothing wrong with the widget", () => {
  it.each([
    ["light", 1280],
    ["light", 390],
    ["dark", 1280],
    ["dark", 390],
  ] as const)("%s, %d px", async (colorScheme, width) => {
    const shop = await ready({ colorScheme, viewport: { width, height: 900 } })
    for (const summary of await shop.widget.locator("summary").all()) await summary.click()
    expect(await violations(shop.page)).toEqual([])
    await number(shop).fill("6.x")
    expect(await violations(shop.page)).toEqual([])
    await number(shop).fill("6.2")
    await shop.page.waitForTimeout(700)
    expect(await violations(shop.page)).toEqual([])
    await shop.close()
  })

  it("in its own colours, on a page that sets none", async () => {
    for (const theme of ["light", "dark"]) {
      const shop = await ready()
      await shop.widget.evaluate((element, theme) => {
        element.setAttribute("theme", theme)
        const sheet = new CSSStyleSheet()
        const names = ["paper", "field", "ink", "soft", "line", "edge", "action", "on-action"]
        sheet.replaceSync(
          `tarnwright-widget{${names.map((name) => `--tarn-${name}:initial !important`).join(";")}}`,
        )
        document.adoptedStyleSheets = [sheet]
      }, theme)
      await shop.widget.getByRole("slider").first().waitFor()
      expect(await violations(shop.page), theme).toEqual([])
      await shop.close()
    }
  })

  it("while it rests", async () => {
    const shop = await ready({ prepare: (page) => page.route("**/sessions", (route) => route.abort()) })
    await number(shop).fill("7")
    await shop.widget.getByRole("alert").waitFor({ timeout: 15_000 })
    expect(await violations(shop.page)).toEqual([])
    await shop.close()
  })
})

describe("the widget by keyboard", () => {
  it("is reached and left by Tab, each control once, with the slider moved by arrows", async () => {
    const shop = await ready()
    await shop.page.locator("button.buy").focus()
    const reached: string[] = []
    for (let step = 0; step < 16; step++) {
      await shop.page.keyboard.press("Tab")
      const at = await shop.page.evaluate(() => {
        const inner = document.activeElement?.shadowRoot?.activeElement
        return inner ? `${inner.tagName} ${(inner as HTMLInputElement).type ?? ""}`.trim() : null
      })
      if (at === null) break
      reached.push(at)
    }
    expect(reached).toEqual([
      "INPUT text",
      "INPUT range",
      "INPUT text",
      "SELECT select-one",
      "INPUT range",
      "INPUT text",
      "SELECT select-one",
      "INPUT range",
      "SUMMARY",
      "SUMMARY",
      "SUMMARY",
      "BUTTON button",
    ])
    await shop.widget.getByRole("slider").first().press("ArrowRight")
    expect(await number(shop).inputValue()).toBe("6.85")
    await shop.close()
  })

  it("takes no focus on load, and a click on its text gives none to a field", async () => {
    const shop = await ready()
    expect(await shop.page.evaluate(() => document.activeElement?.tagName)).toBe("BODY")
    await shop.widget.getByRole("heading").click()
    await shop.widget.getByRole("status").click()
    const focused = await shop.widget.evaluate((element) => element.shadowRoot?.activeElement?.tagName)
    expect(focused).not.toBe("INPUT")
    await shop.close()
  })
})

describe("the widget for everybody", () => {
  it("reads out a moving slider at most once a second, and where it stops", async () => {
    const shop = await ready()
    await shop.widget.evaluate((element) => {
      Object.assign(window, { said: [] })
      const output = element.shadowRoot!.querySelector("output")!
      new MutationObserver(() =>
        (window as unknown as { said: number[] }).said.push(performance.now()),
      ).observe(output, { childList: true, characterData: true, subtree: true })
    })
    const slider = shop.widget.getByRole("slider").first()
    for (let step = 0; step < 30; step++) {
      await slider.press("ArrowRight")
      await shop.page.waitForTimeout(step % 10 === 9 ? 600 : 60)
    }
    await shop.page.waitForTimeout(1_200)
    const said = await shop.page.evaluate(() => (window as unknown as { said: number[] }).said)
    expect(said.length).toBeGreaterThan(0)
    for (const [index, at] of said.entries()) {
      if (index > 0) expect(at - said[index - 1]!).toBeGreaterThanOrEqual(990)
    }
    expect(await shop.widget.getByRole("status").textContent()).toContain("At pH 8.3,")
    await shop.close()
  })

  it("fits 320 px without scrolling sideways, in each language", async () => {
    const shop = await ready({ viewport: { width: 320, height: 800 } })
    for (const summary of await shop.widget.locator("summary").all()) await summary.click()
    for (const lang of ["en", "de", "es", "ja"]) {
      await shop.widget.evaluate((element, lang) => element.setAttribute("lang", lang), lang)
      await expect.poll(() => shop.widget.locator("section").getAttribute("lang")).toBe(lang)
      const [needed, given] = await shop.page.evaluate(() => {
        const section = document.querySelector("tarnwright-widget")!.shadowRoot!.querySelector("section")!
        return [Math.max(document.documentElement.scrollWidth, section.scrollWidth), 320]
      })
      expect(needed, lang).toBeLessThanOrEqual(given!)
    }
    await shop.close()
  })

  it("has no target smaller than 24 by 24 px", async () => {
    const shop = await ready({ viewport: { width: 390, height: 900 } })
    const small = await shop.widget.evaluate((element) =>
      [...element.shadowRoot!.querySelectorAll("input, select, button, summary, a")]
        .map((control) => ({ html: control.outerHTML, box: control.getBoundingClientRect() }))
        .filter(({ box }) => box.width < 24 || box.height < 24)
        .map(({ html }) => html),
    )
    expect(small).toEqual([])
    await shop.close()
  })

  it("follows the page's colour scheme, not the system's, on a page that has only a light one", async () => {
    const shop = await ready({ colorScheme: "dark" })
    const paper = () =>
      shop.widget.evaluate((element) => {
        const sheet = new CSSStyleSheet()
        sheet.replaceSync("tarnwright-widget{--tarn-paper:initial}:root{color-scheme:light}")
        document.adoptedStyleSheets = [sheet]
        return getComputedStyle(element.shadowRoot!.querySelector("section")!).backgroundColor
      })
    expect(await paper()).toBe("rgb(246, 244, 236)")
    await shop.close()
  })
})
