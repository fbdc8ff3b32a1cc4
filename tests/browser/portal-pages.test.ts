import { afterAll, describe, expect, it } from "vitest"
import { expectAccessible, ready, signInAs, visit } from "./portal"
import { closeBrowser } from "./shop"

afterAll(closeBrowser)

const site = [
  "/",
  "/plans",
  "/docs",
  "/docs/errors",
  "/docs/errors/quota_reached",
  "/docs/science",
  "/status",
  "/changelog",
  "/signin",
  "/signin/link",
  "/signin/link/open",
  "/invite/none",
  "/signup",
  "/verify",
  "/reset",
  "/reset/set",
]
const account = [
  "",
  "/keys",
  "/explorer",
  "/bench",
  "/requests",
  "/usage",
  "/webhooks",
  "/reports",
  "/catalog",
  "/enquiries",
  "/insights",
  "/team",
  "/billing",
  "/audit",
  "/settings",
].map((page) => `/portal/fernhollow${page}`)
const areas = [
  { who: undefined, pages: site },
  { who: "maren@fernhollow.test", pages: [...account, "/person", "/person/second-factor"] },
  { who: "admin@tarnwright.test", pages: ["/admin", "/admin/keys"] },
]
const screens = [
  { colorScheme: "light", viewport: { width: 1280, height: 900 } },
  { colorScheme: "dark", viewport: { width: 390, height: 844 } },
  { colorScheme: "light", viewport: { width: 320, height: 640 } },
] as const

describe.each(screens)("in the $colorScheme theme, $viewport.width pixels wide", (screen) => {
  it.each(areas)(
    "every page for $who is accessible, fits and has no error",
    { timeout: 300_000 },
    async ({ who, pages }) => {
      const { page, complaints, close } = await (who ? signInAs(who, pages[0], screen) : visit("/", screen))
      for (const path of pages) {
        const answer = await page.goto(path)
        expect(answer?.status(), path).toBe(200)
        await ready(page)
        if (path.endsWith("/explorer")) await page.locator(".opblock-summary-control").first().waitFor()
        await expectAccessible(page)
        expect(complaints, path).toEqual([])
      }
      await close()
    },
  )
})
