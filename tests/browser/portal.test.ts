import { randomUUID } from "node:crypto"
import { afterAll, describe, expect, it } from "vitest"
import { linkIn, mailsTo, waitForMail } from "../support/mailbox"
import { stack } from "../support/stack"
import { ready, signInAs, visit } from "./portal"
import { closeBrowser } from "./shop"

afterAll(closeBrowser)

/** Drawing what the server answered takes long on a busy machine, and is no promise of ours. */
const patient = { timeout: 20_000 }

function call(secret: string): Promise<Response> {
  return fetch(`${stack().appUrl}/api/v1/carbonate/co2`, {
    method: "POST",
    headers: { authorization: `Bearer ${secret}`, "content-type": "application/json" },
    body: JSON.stringify({ ph: 6.8, kh_dkh: 4 }),
  })
}

describe("point 5 of the skeleton: a stranger becomes a developer with answers", () => {
  it("signs up, confirms by mail, executes in the explorer, makes a key, and sees both in the usage", async () => {
    const email = `wren-${randomUUID().slice(0, 8)}@fernhollow.test`
    const { page, complaints, close } = await visit("/signup")
    await ready(page)
    await page.getByLabel("Your name").fill("Wren Tarrant")
    await page.getByLabel("Shop, brand or project").fill(`Wren ${randomUUID().slice(0, 6)}`)
    await page.getByLabel("E-mail").fill(email)
    await page.getByLabel("Password", { exact: true }).fill("tarn moss valve lantern")
    await page.getByRole("button", { name: "Open the account" }).click()
    await page.getByRole("heading", { name: "Look into your mailbox" }).waitFor()

    await page.goto(linkIn(await waitForMail(email, "Confirm")))
    await ready(page)
    await page.getByRole("button", { name: "Confirm and open the portal" }).click()
    await page.getByRole("heading", { name: "Hello Wren" }).waitFor()

    await page.getByRole("link", { name: "Open the explorer" }).click()
    const operation = page.locator("#operations-Carbonate-carbonateCo2")
    await operation.locator(".opblock-summary-control").click()
    await operation.getByRole("button", { name: "Execute" }).click()
    const answer = operation.locator(".live-responses-table")
    await expect
      .poll(() => answer.locator(".response-col_status").last().textContent(), patient)
      .toContain("200")
    expect(await answer.locator(".microlight").first().textContent()).toContain('"co2_mg_l": 21.0')

    await page.getByRole("link", { name: "Keys", exact: true }).click()
    await page.getByRole("button", { name: "New key" }).click()
    await page.getByLabel("Name", { exact: true }).fill("Web shop")
    await page.getByLabel(/^Live/).check()
    await page.getByRole("button", { name: "Make the key" }).click()
    const secret = (await page.getByRole("dialog").locator("pre").textContent()) ?? ""
    expect(secret).toMatch(/^tarn_server_live_\w{49}$/)
    await page.getByRole("button", { name: "I have stored it" }).click()
    await page
      .getByRole("row", { name: /Web shop/ })
      .first()
      .waitFor()
    expect(await page.content()).not.toContain(secret)

    expect((await call(secret)).status).toBe(200)
    await page.getByRole("link", { name: "Usage", exact: true }).click()
    await page.getByRole("heading", { name: "Usage" }).waitFor()
    await expect.poll(() => page.locator("dd").first().textContent(), patient).toMatch(/^1/)
    await page.getByLabel("Mode").selectOption("sandbox")
    await expect.poll(() => page.locator("dd").first().textContent(), patient).toMatch(/^1/)
    expect(complaints).toEqual([])
    await close()
  })
})

describe("a key", () => {
  it("is rotated with an overlap: old and new both answer", async () => {
    const { page, close } = await signInAs("pell@quillback.test", "/portal/quillback/keys")
    const name = unique("Till")
    const old = await newKey(page, name)
    const row = page.getByRole("row", { name: new RegExp(name) })
    await row.getByRole("button", { name: "Rotate" }).click()
    await page.getByLabel("The old key works for another").selectOption("24")
    await page.getByRole("button", { name: "Make the successor" }).click()
    const successor = (await page.getByRole("dialog").locator("pre").textContent()) ?? ""
    expect(successor).not.toBe(old)
    expect((await call(old)).status).toBe(200)
    expect((await call(successor)).status).toBe(200)
    await page.getByRole("button", { name: "I have stored it" }).click()
    await row.getByText("It has a successor.").waitFor()
    await close()
  })

  it("is revoked after a question that names what stops, and refused within two seconds", async () => {
    const { page, close } = await signInAs("odile@quillback.test", "/portal/quillback/keys")
    const name = unique("Old app")
    const secret = await newKey(page, name)
    const row = page.getByRole("row", { name: new RegExp(name) })
    expect((await call(secret)).status).toBe(200)
    await row.getByRole("button", { name: "Revoke" }).click()
    const dialog = page.getByRole("dialog")
    await dialog.getByText("Sandbox calls of every server and script that holds it").waitFor()
    await dialog.getByRole("button", { name: "Keep it" }).click()
    expect((await call(secret)).status).toBe(200)

    await row.getByRole("button", { name: "Revoke" }).click()
    await dialog.getByRole("button", { name: "Revoke the key" }).click()
    await dialog.waitFor({ state: "detached" })
    await expect.poll(async () => (await call(secret)).status, { timeout: 2_000 }).toBe(401)
    await page.getByLabel("Show revoked and expired ones").check()
    await row.getByText("Revoked").waitFor()
    await close()
  })

  it("for browsers names its origins, and a wrong one is refused at its field with what was typed kept", async () => {
    const { page, close } = await signInAs("odile@quillback.test", "/portal/quillback/keys")
    await openNewKey(page)
    await page.getByLabel("Name", { exact: true }).fill("Product pages")
    await page.getByLabel(/^Browser key/).check()
    await page.getByRole("textbox", { name: "Origins" }).fill("shop.example/path")
    await page.getByRole("button", { name: "Make the key" }).click()
    await page.getByRole("alert").filter({ hasText: "https://shop.example" }).first().waitFor()
    expect(await page.getByRole("textbox", { name: "Origins" }).inputValue()).toBe("shop.example/path")
    await page.getByRole("textbox", { name: "Origins" }).fill("https://shop.example\nhttps://*.shop.example")
    await page.getByRole("button", { name: "Make the key" }).click()
    expect(await page.getByRole("dialog").locator("pre").textContent()).toMatch(/^tarn_browser_sandbox_/)
    await close()
  })
})

describe("the platform's admin", () => {
  it("finds a key by its last four, revokes it with a reason; it dies, and the owner gets a mail", async () => {
    const owner = await signInAs("pell@quillback.test", "/portal/quillback/keys")
    const name = unique("Leaked")
    const secret = await newKey(owner.page, name)
    await owner.close()
    expect((await call(secret)).status).toBe(200)

    const { page, close } = await signInAs("admin@tarnwright.test", "/admin/keys")
    await ready(page)
    await page.getByLabel("Id or last four characters").fill(secret.slice(-4))
    await page.getByRole("button", { name: "Find" }).click()
    await page.getByRole("button", { name: `Revoke ${name}` }).click()
    await page.getByLabel("Reason").fill("Why")
    await page.getByRole("dialog").getByRole("button", { name: "Revoke the key" }).click()
    await page.getByText("Say why in a sentence").waitFor()
    const reason = "It stood in a public repository."
    await page.getByLabel("Reason").fill(reason)
    await page.getByRole("dialog").getByRole("button", { name: "Revoke the key" }).click()
    await page.getByRole("dialog").waitFor({ state: "detached" })
    await expect.poll(async () => (await call(secret)).status, { timeout: 2_000 }).toBe(401)
    await page.getByText(reason).waitFor()
    // The owner gets a mail for every key revoked, so the newest may be about another test's key.
    await expect
      .poll(
        async () => (await mailsTo("pell@quillback.test")).find(({ text }) => text.includes(name))?.text,
        patient,
      )
      .toContain(reason)
    await close()
  })

  it("is nobody else: the admin area does not exist for an owner", async () => {
    const { page, close } = await signInAs("maren@fernhollow.test", "/portal/fernhollow")
    const answer = await page.goto("/admin/keys")
    expect(answer?.status()).toBe(404)
    const route = await page.request.get(`${stack().appUrl}/api/admin/keys?text=abcd`)
    expect(route.status()).toBe(404)
    await close()
  })
})

describe("a role", () => {
  it("shows a viewer usage and invoices, no keys, and refuses the page of keys with 403", async () => {
    const { page, close } = await signInAs("tobin@fernhollow.test", "/portal/fernhollow")
    const menu = page.getByRole("navigation", { name: "Pages of this account" })
    await expect
      .poll(() => menu.getByRole("link").allTextContents(), patient)
      .toEqual(["Overview", "Usage", "Bench", "Reports", "Catalogue", "Insights", "Team", "Billing"])
    const answer = await page.goto("/portal/fernhollow/keys")
    expect(answer?.status()).toBe(403)
    await page.getByRole("heading", { name: "Not for your role" }).waitFor()
    const route = await page.request.get(`${stack().appUrl}/api/portal/fernhollow/keys`)
    expect(route.status()).toBe(403)
    await close()
  })

  it("in one account shows nothing of another: the same 404 as for one that never was", async () => {
    const { page, close } = await signInAs("odile@quillback.test", "/portal/quillback")
    const foreign = await page.request.get(`${stack().appUrl}/api/portal/fernhollow/keys`)
    const absent = await page.request.get(`${stack().appUrl}/api/portal/no-such-account/keys`)
    expect(foreign.status()).toBe(404)
    const body = async (response: typeof foreign) => ({ ...(await response.json()), instance: undefined })
    expect(await body(foreign)).toEqual(await body(absent))
    expect((await page.goto("/portal/fernhollow"))?.status()).toBe(404)
    await close()
  })
})

type Page = Awaited<ReturnType<typeof visit>>["page"]

/** A name that no other test and no earlier run has given a key. */
function unique(name: string): string {
  return `${name} ${randomUUID().slice(0, 6)}`
}

async function openNewKey(page: Page): Promise<void> {
  await ready(page)
  await page.getByRole("button", { name: "New key" }).click()
}

async function newKey(page: Page, name: string): Promise<string> {
  await openNewKey(page)
  await page.getByLabel("Name", { exact: true }).fill(name)
  await page.getByRole("button", { name: "Make the key" }).click()
  const secret = (await page.getByRole("dialog").locator("pre").textContent()) ?? ""
  await page.getByRole("button", { name: "I have stored it" }).click()
  await page
    .getByRole("row", { name: new RegExp(name) })
    .first()
    .waitFor()
  return secret
}
