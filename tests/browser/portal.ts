import axe from "axe-core"
import type { BrowserContextOptions, Page } from "playwright-core"
import { expect } from "vitest"
import { stack } from "../support/stack"
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

/** Signs a person of the demo world in, and waits until where it leads is there. */
export async function signInAs(
  email: string,
  path = "/portal",
  options: BrowserContextOptions = {},
): Promise<Visit> {
  const visited = await visit(`/signin?next=${encodeURIComponent(path)}`, options)
  await submitSignIn(visited.page, email, stack().demo.password)
  await visited.page.waitForURL((url) => !url.pathname.startsWith("/signin"))
  return visited
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
