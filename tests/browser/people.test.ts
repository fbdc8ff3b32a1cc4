import type { Page } from "playwright-core"
import { afterAll, beforeAll, describe, expect, it } from "vitest"
import { asWorker, closePools } from "@/db"
import { requestSignInLink } from "@/lib/accounts"
import { createTestAccount } from "../support/account"
import { linkIn, waitForMail } from "../support/mailbox"
import { createMember, newAddress, PASSWORD, visitor } from "../support/people"
import { codeOf } from "../support/second-factor"
import { takeSettings } from "../support/stack"
import { enrol, expectAccessible, ready, shownOnce, submitSignIn, type Visit, visit } from "./portal"
import { closeBrowser } from "./shop"

beforeAll(takeSettings)
afterAll(async () => {
  await closeBrowser()
  await closePools()
})

/** An account of its own, whose owner is signed in at one of its pages. */
async function asOwner(page = ""): Promise<Visit & { email: string; slug: string; account_id: string }> {
  const { ctx, slug } = await createTestAccount()
  const { person } = await createMember(ctx.account_id, "owner")
  const visited = await signInWith(person.email, `/portal/${slug}${page}`)
  return { ...visited, email: person.email, slug, account_id: ctx.account_id }
}

async function signInWith(email: string, path: string): Promise<Visit> {
  const visited = await visit(`/signin?next=${encodeURIComponent(path)}`)
  await submitSignIn(visited.page, email, PASSWORD)
  await visited.page.waitForURL((url) => !url.pathname.startsWith("/signin"))
  await ready(visited.page)
  return visited
}

/** As if the person had shown their password long ago. */
async function letTimePass(email: string): Promise<void> {
  await asWorker((trx) =>
    trx
      .updateTable("session")
      .set({ stepped_up_at: new Date(Date.now() - 11 * 60_000) })
      .where("user_id", "in", (query) => query.selectFrom("app_user").select("id").where("email", "=", email))
      .execute(),
  )
}

async function invite(page: Page, email: string, role: string): Promise<void> {
  await page.getByRole("button", { name: "Invite someone" }).click()
  await page.getByLabel("E-mail").fill(email)
  await page.getByRole("radio", { name: new RegExp(`^${role}`) }).check()
  await page.getByRole("button", { name: "Send the invitation" }).click()
}

describe("an invitation", () => {
  it("brings a new person into the account, who signs up by it alone", async () => {
    const owner = await asOwner("/team")
    const email = newAddress()
    await invite(owner.page, email, "Developer")
    await owner.page.getByRole("cell", { name: email }).first().waitFor()
    await expectAccessible(owner.page)
    const link = linkIn(await waitForMail(email, "Join"))

    const guest = await visit(link)
    await ready(guest.page)
    await guest.page.getByRole("heading", { name: /^Join / }).waitFor()
    await expectAccessible(guest.page)
    await guest.page.getByLabel("Your name").fill("Ronja Ashby")
    await guest.page.getByLabel("Password", { exact: true }).fill(PASSWORD)
    await guest.page.getByRole("button", { name: /^Join / }).click()
    await guest.page.waitForURL(({ pathname }) => pathname === `/portal/${owner.slug}`)
    await guest.page.goto(`/portal/${owner.slug}/team`)
    await guest.page.getByRole("cell", { name: /Ronja Ashby/ }).waitFor()
    expect(await guest.page.getByRole("button", { name: "Invite someone" }).count()).toBe(0)

    await guest.page.goto(link)
    await guest.page.getByRole("heading", { name: "This invitation is no longer good" }).waitFor()
    expect([...owner.complaints, ...guest.complaints]).toEqual([])
    await guest.close()
    await owner.close()
  })

  it("is not accepted by whoever else is signed in", async () => {
    const owner = await asOwner("/team")
    const email = newAddress()
    await invite(owner.page, email, "Viewer")
    await owner.page.goto(linkIn(await waitForMail(email, "Join")))
    await ready(owner.page)
    await owner.page.getByText("You are signed in as someone else").waitFor()
    await owner.page.getByRole("button", { name: "Sign out and go on" }).click()
    await owner.page.getByLabel("Your name").waitFor()
    await owner.close()
  })
})

describe("a second factor", () => {
  it("is set up, asked for at sign-in, and takes no code twice; a recovery code works once", async () => {
    const owner = await asOwner()
    await owner.page.goto("/person/second-factor")
    const { secret, recoveryCodes } = await enrol(owner.page)
    expect(recoveryCodes).toHaveLength(10)
    await owner.page.waitForURL(({ pathname }) => pathname === "/person")
    await owner.page.getByText("10 of your recovery codes are left").waitFor()
    await owner.close()

    const attempt = async () => {
      const { page, close } = await visit("/signin?next=/person")
      await submitSignIn(page, owner.email, PASSWORD)
      await page.getByLabel("Code", { exact: true }).waitFor()
      return { page, close }
    }
    const show = async (page: Page, code: string) => {
      await page.getByLabel("Code", { exact: true }).fill(code)
      await page.getByRole("button", { name: "Sign in" }).click()
    }

    const first = await attempt()
    await expectAccessible(first.page)
    expect((await first.page.context().cookies()).map(({ name }) => name)).not.toContain("tarn-session")
    const fresh = codeOf(secret, 1)
    await show(first.page, fresh)
    await first.page.waitForURL(({ pathname }) => pathname === "/person")
    await first.close()

    const second = await attempt()
    await show(second.page, fresh)
    await second.page.getByText("was used before").waitFor()
    const [recoveryCode] = recoveryCodes as [string]
    await show(second.page, recoveryCode)
    await second.page.waitForURL(({ pathname }) => pathname === "/person")
    await second.page.getByText("9 of your recovery codes are left").waitFor()
    await second.close()
    await waitForMail(owner.email, "recovery code")

    const third = await attempt()
    await show(third.page, recoveryCode)
    await third.page.getByText("was used before").waitFor()
    await third.close()
  })
})

describe("an act that can do lasting harm", () => {
  it("asks for the password when none was shown for ten minutes, and then goes on by itself", async () => {
    const { page, email, close } = await asOwner("/keys")
    await letTimePass(email)
    await page.getByRole("button", { name: "New key" }).click()
    await page.getByLabel("Name", { exact: true }).fill("Till")
    await page.getByRole("radio", { name: /^Live/ }).check()
    await page.getByRole("button", { name: "Make the key" }).click()
    const dialog = page.getByRole("dialog", { name: "Is it you?" })
    await dialog.getByLabel("Your password").fill("not my password at all")
    await dialog.getByRole("button", { name: "Confirm" }).click()
    await dialog.getByText("This is not your password").waitFor()
    await expectAccessible(page)
    await dialog.getByLabel("Your password").fill(PASSWORD)
    await dialog.getByRole("button", { name: "Confirm" }).click()
    await page.getByRole("dialog", { name: "Store this key now" }).waitFor()
    expect(await shownOnce(page)).toMatch(/^tarn_server_live_/)
    await close()
  })

  it("does not happen when the question is left unanswered, and keeps what was typed", async () => {
    const { page, email, close } = await asOwner("/keys")
    await letTimePass(email)
    await page.getByRole("button", { name: "New key" }).click()
    await page.getByLabel("Name", { exact: true }).fill("Till")
    await page.getByRole("radio", { name: /^Live/ }).check()
    await page.getByRole("button", { name: "Make the key" }).click()
    await page.getByRole("dialog", { name: "Is it you?" }).getByRole("button", { name: "Cancel" }).click()
    await page.getByRole("alert").filter({ hasText: "Confirm first that it is you" }).first().waitFor()
    expect(await page.getByLabel("Name", { exact: true }).inputValue()).toBe("Till")
    await close()
  })
})

describe("a session", () => {
  it("that its person ends elsewhere is dead at once", async () => {
    const here = await asOwner()
    const there = await signInWith(here.email, `/portal/${here.slug}`)
    await here.page.goto("/person")
    await ready(here.page)
    await here.page.getByRole("button", { name: /^End the session/ }).click()
    await here.page.getByRole("button", { name: /^End the session/ }).waitFor({ state: "detached" })
    const refused = await there.page.request.get(`/api/portal/${here.slug}/team`)
    expect(refused.status()).toBe(401)
    await there.page.goto(`/portal/${here.slug}`)
    expect(new URL(there.page.url()).pathname).toBe("/signin")
    await there.close()
    await here.close()
  })

  it("ends with all others when the password changes, and this one goes on", async () => {
    const here = await asOwner()
    const there = await signInWith(here.email, `/portal/${here.slug}`)
    await here.page.goto("/person")
    await ready(here.page)
    await here.page.getByLabel("Present password").fill(PASSWORD)
    await here.page.getByLabel("New password").fill("lantern valve moss tarn")
    await here.page.getByRole("button", { name: "Change the password" }).click()
    await here.page.getByText("Your other sessions have ended").waitFor()
    expect((await there.page.request.get("/api/person/sessions")).status()).toBe(401)
    expect((await here.page.request.get("/api/person/sessions")).status()).toBe(200)
    await there.close()
    await here.close()
  })
})

describe("a link in place of the password", () => {
  it("signs in once, by a press and not by being opened, and is not fresh for dangerous acts", async () => {
    const owner = await asOwner()
    await owner.close()
    const { page, close } = await visit("/signin")
    await ready(page)
    await page.getByRole("link", { name: "Send me a link instead" }).click()
    await page.waitForURL(({ pathname }) => pathname === "/signin/link")
    await ready(page)
    await page.getByLabel("E-mail").fill(owner.email)
    await page.getByRole("button", { name: "Send the link" }).click()
    await page.getByRole("heading", { name: "Look into your mailbox" }).waitFor()
    const link = linkIn(await waitForMail(owner.email, "link to sign in"))
    for (let scanned = 0; scanned < 2; scanned++) await page.goto(link)
    await ready(page)
    await expectAccessible(page)
    await page.getByRole("button", { name: "Sign in" }).click()
    await page.waitForURL(({ pathname }) => pathname === `/portal/${owner.slug}`)
    const refused = await page.request.post(`/api/portal/${owner.slug}/team/invitations`, {
      headers: { origin: new URL(page.url()).origin, "sec-fetch-site": "same-origin" },
      data: { email: newAddress(), role: "viewer" },
    })
    expect(await refused.json()).toMatchObject({ status: 403, code: "step_up_required" })
    await page.goto(link)
    await page.getByRole("heading", { name: "This link is no longer good" }).waitFor()
    await close()
  })

  it("does not get around the second factor", async () => {
    const owner = await asOwner()
    await owner.page.goto("/person/second-factor")
    const { secret } = await enrol(owner.page)
    await owner.close()
    await requestSignInLink({ visitor: visitor(), input: { email: owner.email } })
    const { page, close } = await visit(linkIn(await waitForMail(owner.email, "link to sign in")))
    await ready(page)
    await page.getByRole("button", { name: "Sign in" }).click()
    await page.getByLabel("Code", { exact: true }).fill("000000")
    await page.getByRole("button", { name: "Sign in" }).click()
    await page.getByText("This code is wrong").waitFor()
    await page.getByLabel("Code", { exact: true }).fill(codeOf(secret, 1))
    await page.getByRole("button", { name: "Sign in" }).click()
    await page.waitForURL(({ pathname }) => pathname === `/portal/${owner.slug}`)
    await close()
  })
})
