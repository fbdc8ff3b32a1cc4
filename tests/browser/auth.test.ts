import { randomUUID } from "node:crypto"
import { afterAll, describe, expect, it } from "vitest"
import { linkIn, waitForMail } from "../support/mailbox"
import { stack } from "../support/stack"
import { ready, signInAs, submitSignIn, visit } from "./portal"
import { closeBrowser } from "./shop"

afterAll(closeBrowser)

const owner = "maren@fernhollow.test"

describe("signing in", () => {
  it("says in words that the pair is wrong, keeps what was typed, and never which of the two it was", async () => {
    const { page, close } = await visit("/signin")
    await submitSignIn(page, owner, "wrong wrong wrong wrong")
    await page.getByRole("alert").filter({ hasText: "do not belong together" }).first().waitFor()
    expect(await page.getByLabel("E-mail").inputValue()).toBe(owner)
    await submitSignIn(page, `nobody-${randomUUID()}@fernhollow.test`, "wrong wrong wrong wrong")
    await page.getByRole("alert").filter({ hasText: "do not belong together" }).first().waitFor()
    await close()
  })

  it("leads to the page that was asked for, and never to another site", async () => {
    const asked = await visit("/portal/fernhollow/usage")
    expect(new URL(asked.page.url()).pathname).toBe("/signin")
    await submitSignIn(asked.page, owner, stack().demo.password)
    await asked.page.waitForURL("**/portal/fernhollow*")
    await asked.close()

    const lured = await signInAs(owner, "//elsewhere.example/portal")
    expect(lured.page.url()).toMatch(`${stack().appUrl}/portal`)
    await lured.close()
  })

  it("keeps in the cookie 256 random bits that no script reads and no other site sends", async () => {
    const { page, close } = await signInAs(owner)
    const cookie = (await page.context().cookies()).find(({ name }) => name === "tarn-session")
    expect(cookie).toMatchObject({ httpOnly: true, sameSite: "Lax", path: "/", secure: false })
    expect(Buffer.from(cookie!.value, "base64url")).toHaveLength(32)
    expect(await page.evaluate(() => document.cookie)).not.toContain("tarn-session")
    await close()
  })

  it("ends on the server: a copy of the cookie is worth nothing after signing out", async () => {
    const { page, close } = await signInAs(owner, "/portal/fernhollow")
    const stolen = await page.context().storageState()
    await page.getByRole("button", { name: /Maren/ }).click()
    await page.getByRole("menuitem", { name: "Sign out" }).click()
    await page.waitForURL(`${stack().appUrl}/`)
    await close()

    const thief = await visit("/portal/fernhollow", { storageState: stolen })
    expect(new URL(thief.page.url()).pathname).toBe("/signin")
    const answer = await thief.page.request.get(`${stack().appUrl}/api/portal/fernhollow/keys`)
    expect(answer.status()).toBe(401)
    expect(await answer.json()).toMatchObject({ code: "session_missing" })
    await thief.close()
  })
})

describe("a forgotten password", () => {
  it("is set anew by the letter's link and signs in afterwards", async () => {
    const email = `ronja-${randomUUID().slice(0, 8)}@quillback.test`
    const signUp = await visit("/signup")
    await ready(signUp.page)
    await signUp.page.getByLabel("Your name").fill("Ronja")
    await signUp.page.getByLabel("Shop, brand or project").fill("Ronja's shop")
    await signUp.page.getByLabel("E-mail").fill(email)
    await signUp.page.getByLabel("Password", { exact: true }).fill("tarn moss valve lantern")
    await signUp.page.getByRole("button", { name: "Open the account" }).click()
    await signUp.page.goto(linkIn(await waitForMail(email, "Confirm")))
    await ready(signUp.page)
    await signUp.page.getByRole("button", { name: "Confirm" }).click()
    await signUp.page.waitForURL("**/portal/**")
    await signUp.close()

    const { page, close } = await visit("/signin")
    await page.getByRole("link", { name: "Forgot your password?" }).click()
    await page.waitForURL("**/reset")
    await ready(page)
    await page.getByLabel("E-mail").fill(email)
    await page.getByRole("button", { name: "Send the link" }).click()
    await page.getByRole("heading", { name: "Look into your mailbox" }).waitFor()
    const link = linkIn(await waitForMail(email, "new password"))
    await page.goto(link)
    await ready(page)
    await page.getByLabel("New password").fill("too short")
    await page.getByRole("button", { name: "Set the password" }).click()
    await page.getByRole("alert").filter({ hasText: "15 characters" }).first().waitFor()
    await page.getByLabel("New password").fill("lantern valve moss tarn")
    await page.getByRole("button", { name: "Set the password" }).click()
    await page.waitForURL("**/signin?done=reset*")
    await submitSignIn(page, email, "lantern valve moss tarn")
    await page.waitForURL("**/portal/**")

    await page.goto(link)
    await page.getByRole("heading", { name: "This link is no longer good" }).waitFor()
    await close()
  })
})

describe("a page of another site", () => {
  it("cannot make the portal change anything with a visitor's cookie", async () => {
    const { page, close } = await signInAs("ilya@fernhollow.test", "/portal/fernhollow")
    const forged = await page.request.post(`${stack().appUrl}/api/portal/fernhollow/explorer`, {
      headers: { origin: "https://elsewhere.example", "sec-fetch-site": "cross-site" },
      data: {},
    })
    expect(forged.status()).toBe(403)
    const withoutOrigin = await page.request.post(`${stack().appUrl}/api/portal/fernhollow/explorer`, {
      data: {},
    })
    expect(withoutOrigin.status()).toBe(403)
    await close()
  })

  it("cannot frame a page or run a script in it", async () => {
    const { page, close } = await visit("/signin")
    const response = await page.request.get(`${stack().appUrl}/signin`)
    const policy = response.headers()["content-security-policy"] ?? ""
    expect(policy).toContain("frame-ancestors 'none'")
    expect(policy).toMatch(/script-src 'nonce-[^']+' 'strict-dynamic'/)
    expect(policy).not.toMatch(/script-src[^;]*unsafe-inline/)
    expect(response.headers()).toMatchObject({
      "x-content-type-options": "nosniff",
      "cross-origin-opener-policy": "same-origin",
    })
    const again = await page.request.get(`${stack().appUrl}/signin`)
    expect(again.headers()["content-security-policy"]).not.toBe(policy)
    await close()
  })
})
