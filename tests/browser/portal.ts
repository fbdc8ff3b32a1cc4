import axe from "axe-core"
import type { BrowserContextOptions, Page } from "playwright-core"
import { expect } from "vitest"
import { codeOf, nextCodeOf } from "../support/second-factor"
import { stack, takeSettings } from "../support/stack"
import { launched } from "./shop"

export interface Visit {
  readonly page: Page
  /** What the page's console and its scripts complained of. */
  readonly complaints: string[]
  close(): Promise<void>
}

/** A browser of its own on the application, that remembers nothing. */
export async function visit(path: string, options: BrowserContextOptions = {}): Promise<Visit> {
  const context = await (await launched()).newContext({
    viewport: { width: 1280, height: 900 },
    baseURL: stack().appUrl,
    ...options,
  })
  const page = await context.newPage()
  const complaints: string[] = []
  page.on("console", (message) => {
    if (message.type() === "error") complaints.push(message.text())
  })
  page.on("pageerror", (error) => complaints.push(error.message))
  await page.goto(path)
  return { page, complaints, close: () => context.close() }
}

/**
 * Signs a person of the demo world in, and waits until where it leads is there. Who has a second factor shows a code
 * of it; a platform admin without one sets it up first, as they must.
 */
export async function signInAs(
  email: string,
  path = "/portal",
  options: BrowserContextOptions = {},
): Promise<Visit> {
  const visited = await visit(`/signin?next=${encodeURIComponent(path)}`, options)
  await submitSignIn(visited.page, email, stack().demo.password)
  const asked = await passSecondFactor(visited.page, email, path)
  // The browser tells of the 401 by which the sign-in asks for a code; that is no complaint of a page.
  const kept = visited.complaints.filter((complaint) => !(asked && complaint.includes("401")))
  visited.complaints.splice(0, visited.complaints.length, ...kept)
  return visited
}

/** Returns whether a code was asked for. */
async function passSecondFactor(page: Page, email: string, path: string): Promise<boolean> {
  const inside = () => page.waitForURL((url) => !url.pathname.startsWith("/signin"))
  const code = page.getByLabel("Code", { exact: true })
  const asked = await Promise.race([inside().then(() => false), code.waitFor().then(() => true)])
  if (asked) {
    takeSettings()
    await code.fill(await nextCodeOf(email))
    await page.getByRole("button", { name: "Sign in" }).click()
    await inside()
  }
  const { pathname, searchParams } = new URL(page.url())
  const next = searchParams.get("next")
  if (pathname === "/person/second-factor" && next) {
    await enrol(page)
    await page.waitForURL((url) => url.pathname === next)
    await page.goto(path)
  }
  return asked
}

/** What a page shows this once: a secret, or recovery codes. */
export async function shownOnce(page: Page): Promise<string> {
  return (await page.locator("pre").textContent()) ?? ""
}

/** Sets a second factor up on its page, and says what its secret and its recovery codes are. */
export async function enrol(page: Page): Promise<{ secret: string; recoveryCodes: string[] }> {
  await ready(page)
  await page.getByRole("button", { name: "Set it up" }).click()
  await page.getByRole("img", { name: /QR code/ }).waitFor()
  const secret = (await shownOnce(page)).replace(/\s/g, "")
  await page.getByLabel("Code", { exact: true }).fill(codeOf(secret))
  await page.getByRole("button", { name: "Switch it on" }).click()
  await page.getByRole("heading", { name: "Your recovery codes" }).waitFor()
  const recoveryCodes = (await shownOnce(page)).split("\n")
  await page.getByRole("button", { name: "I have stored them" }).click()
  return { secret, recoveryCodes }
}

export async function submitSignIn(page: Page, email: string, password: string): Promise<void> {
  await ready(page)
  await page.getByLabel("E-mail").fill(email)
  await page.getByLabel("Password", { exact: true }).fill(password)
  await page.getByRole("button", { name: "Sign in" }).click()
}

/** Waits until the page's own script answers, so that what is typed is not lost. */
export async function ready(page: Page): Promise<void> {
  await page.waitForLoadState("load")
  await page.waitForFunction(() =>
    [...document.querySelectorAll("body *")].some((element) =>
      Object.keys(element).some((key) => key.startsWith("__reactProps")),
    ),
  )
}

/** Fails on anything that axe calls serious or critical, and on a page wider than its window. */
export async function expectAccessible(page: Page): Promise<void> {
  await page.evaluate(axe.source)
  const found = await page.evaluate(async () => {
    const { violations } = await (window as unknown as { axe: typeof axe }).axe.run(document, {
      runOnly: ["wcag2a", "wcag2aa", "wcag21a", "wcag21aa", "wcag22aa"],
    })
    return violations
      .filter(({ impact }) => impact === "serious" || impact === "critical")
      .map(
        ({ id, nodes }) =>
          `${id}: ${nodes.map(({ target, failureSummary }) => `${target} ${failureSummary}`).join("; ")}`,
      )
  })
  expect(found).toEqual([])
  const overflow = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth)
  expect(overflow).toBeLessThanOrEqual(0)
}
