import { readFile } from "node:fs/promises"
import { strFromU8, unzipSync } from "fflate"
import { afterAll, beforeAll, describe, expect, it } from "vitest"
import { closePools } from "@/db"
import { createTestAccount } from "../support/account"
import { waitForMail } from "../support/mailbox"
import { createMember, PASSWORD } from "../support/people"
import { takeSettings } from "../support/stack"
import { expectAccessible, ready, submitSignIn, type Visit, visit } from "./portal"
import { closeBrowser } from "./shop"

beforeAll(takeSettings)
afterAll(async () => {
  await closeBrowser()
  await closePools()
})

async function asOwner(page: string): Promise<Visit & { email: string; slug: string }> {
  const { ctx, slug } = await createTestAccount()
  const { person } = await createMember(ctx.account_id, "owner")
  const visited = await visit(`/signin?next=${encodeURIComponent(`/portal/${slug}${page}`)}`)
  await submitSignIn(visited.page, person.email, PASSWORD)
  await visited.page.waitForURL(({ pathname }) => pathname.startsWith(`/portal/${slug}`))
  await ready(visited.page)
  return { ...visited, email: person.email, slug }
}

describe("an owner", () => {
  it("takes the account's data along as a zip, and finds in the audit trail that it was taken", async () => {
    const { page, slug, email, complaints, close } = await asOwner("/settings")
    await page.getByRole("button", { name: "Make an archive" }).click()
    const fetch = page.getByRole("link", { name: /^Fetch/ })
    await fetch.waitFor()
    await expectAccessible(page)
    const [download] = await Promise.all([page.waitForEvent("download"), fetch.click()])
    expect(download.suggestedFilename()).toMatch(/^tarnwright-\d{4}-\d{2}-\d{2}\.zip$/)
    const files = unzipSync(new Uint8Array(await readFile(await download.path())))
    expect(JSON.parse(strFromU8(files["json/account.json"]!))).toMatchObject([{ slug }])
    await waitForMail(email, "is ready")

    await page.goto(`/portal/${slug}/audit`)
    await page.getByRole("cell", { name: /Archive of the data fetched/ }).waitFor()
    await ready(page)
    await page.getByRole("searchbox").fill("asked for")
    await page.getByRole("cell", { name: /Archive of the data fetched/ }).waitFor({ state: "detached" })
    expect(await page.getByRole("cell", { name: /Archive of the data asked for/ }).count()).toBe(1)
    await expectAccessible(page)
    expect(complaints).toEqual([])
    await close()
  })

  it("deletes the account by writing its name, is told so on every page, and takes it back", async () => {
    const { page, slug, close } = await asOwner("/settings")
    await page.getByRole("button", { name: "Delete the account" }).click()
    const dialog = page.getByRole("dialog")
    await dialog.getByLabel("Name of the account").fill("Another")
    await dialog.getByRole("button", { name: "Stop everything" }).click()
    await dialog.getByText("Write the name of the account as it stands here").waitFor()
    await dialog.getByLabel("Name of the account").fill("A test's account")
    await dialog.getByRole("button", { name: "Stop everything" }).click()
    await page.getByText(/Everything is deleted on/).waitFor()
    await expectAccessible(page)
    await page.goto(`/portal/${slug}`)
    await page.getByText("This account is being deleted").waitFor()
    await page.goto(`/portal/${slug}/settings`)
    await ready(page)
    await page.getByRole("button", { name: "Keep the account" }).click()
    await page.getByRole("button", { name: "Delete the account" }).waitFor()
    expect(await page.getByText("This account is being deleted").count()).toBe(0)
    await close()
  })
})
