import { type Browser, type BrowserContextOptions, chromium, type Locator, type Page } from "playwright-core"
import { stack } from "../support/stack"
import { ownWay } from "./own-address"

let browser: Browser | undefined

/** The one browser of a test file. */
export async function launched(): Promise<Browser> {
  browser ??= await chromium.launch({
    executablePath: process.env.CHROMIUM_PATH ?? "/usr/bin/chromium",
    // A page that a test rewrites on its way counts as of no network, and may not call loopback otherwise.
    args: ["--no-sandbox", "--disable-features=LocalNetworkAccessChecks"],
  })
  return browser
}

export async function closeBrowser(): Promise<void> {
  await browser?.close()
  browser = undefined
}

export interface ShopPage {
  readonly page: Page
  readonly widget: Locator
  /** What the page's console and its scripts complained of. */
  readonly complaints: string[]
  close(): Promise<void>
}

interface Visit extends BrowserContextOptions {
  /** Path on the shop page's own origin. */
  readonly path?: string
  /** Another page altogether. */
  readonly url?: string
  /** Runs before the page is opened. */
  readonly prepare?: (page: Page) => Promise<unknown>
}

/** Opens the shop's product page as a shopper whose browser has never seen it. */
export async function visitShop({ path = "/", url, prepare, ...options }: Visit = {}): Promise<ShopPage> {
  const way = await ownWay()
  const context = await (await launched()).newContext({
    viewport: { width: 1280, height: 900 },
    proxy: { server: way.server, bypass: "<-loopback>" },
    ...options,
  })
  const page = await context.newPage()
  const complaints: string[] = []
  page.on("console", (message) => {
    if (["error", "warning"].includes(message.type())) complaints.push(message.text())
  })
  page.on("pageerror", (error) => complaints.push(error.message))
  await prepare?.(page)
  await page.goto(url ?? `${stack().shopUrl}${path}`)
  async function close(): Promise<void> {
    await context.close()
    way.close()
  }
  return { page, widget: page.locator("tarnwright-widget"), complaints, close }
}
