import { spawn } from "node:child_process"
import { mkdtempSync, readFileSync, rmSync, statSync } from "node:fs"
import { tmpdir } from "node:os"
import path from "node:path"
import { afterAll, describe, expect, test } from "vitest"
import { startFake } from "@/fakes/stripe/start"
import { clientOf } from "./subject"

const folder = mkdtempSync(path.join(tmpdir(), "stand-in-"))
afterAll(() => rmSync(folder, { recursive: true }))

const options = { port: 0, secretKey: "sk_test_practice", webhookSecret: "whsec_practice" }

describe("the stand-in", () => {
  test.each(["0.0.0.0", "::", "192.0.2.1", "localhost"])("does not start on %s", async (host) => {
    await expect(startFake({ ...options, host })).rejects.toThrow("loopback only")
  })

  test("takes up after a restart what it knew, with its pages at the new address", async () => {
    const stateFile = path.join(folder, "state.json")
    const first = await startFake({ ...options, stateFile })
    const before = clientOf(first.url, options.secretKey)
    const customer = await before.customers.create({ name: "Kept" }, { idempotencyKey: "kept" })
    const portal = await before.billingPortal.sessions.create({ customer: customer.id })
    await first.close()
    expect(statSync(stateFile).mode & 0o777).toBe(0o600)

    const second = await startFake({ ...options, stateFile })
    const after = clientOf(second.url, options.secretKey)
    expect(await after.customers.retrieve(customer.id)).toMatchObject({ name: "Kept" })
    const replayed = await after.customers.create({ name: "Kept" }, { idempotencyKey: "kept" })
    expect(replayed.id).toBe(customer.id)
    const moved = portal.url.replace(first.url, second.url)
    expect(readFileSync(stateFile, "utf8")).toContain(portal.id)
    expect((await fetch(moved)).status).toBe(200)
    await second.close()
  })

  test("says on one line that it is ready, as a process, and ends when it is asked to", async () => {
    const child = spawn(process.execPath, ["--import", "tsx", "fakes/stripe/server.ts"], {
      env: {
        ...process.env,
        PORT: "0",
        STRIPE_SECRET_KEY: options.secretKey,
        STRIPE_WEBHOOK_SECRET: "whsec_practice",
      },
    })
    let output = ""
    child.stdout.on("data", (chunk) => {
      output += chunk
    })
    const ended = new Promise((resolve) => child.once("exit", resolve))
    while (!output.includes("\n")) await new Promise((resolve) => setTimeout(resolve, 50))
    expect(output).toMatch(/^ready http:\/\/127\.0\.0\.1:\d+\n$/)
    child.kill("SIGTERM")
    expect(await ended).toBe(0)
  })

  test("does nothing that a page of another site asks for", async () => {
    const fake = await startFake(options)
    const headers = { origin: "https://elsewhere.test" }
    const answer = await fetch(`${fake.url}/_fake/faults`, { method: "POST", headers, body: "{}" })
    expect(answer.status).toBe(403)
    await fake.close()
  })

  test("shows what strangers wrote as text", async () => {
    const fake = await startFake(options)
    const stripe = clientOf(fake.url, options.secretKey)
    const product = await stripe.products.create({ name: '<img src=x onerror="alert(1)">' })
    const price = await stripe.prices.create({
      currency: "usd",
      unit_amount: 100,
      product: product.id,
      recurring: { interval: "month" },
    })
    const { url } = await stripe.checkout.sessions.create({
      mode: "subscription",
      line_items: [{ price: price.id, quantity: 1 }],
      success_url: "https://tarnwright.test/done",
    })
    const page = await (await fetch(url!)).text()
    expect(page).not.toContain("<img")
    expect(page).toContain("&#60;img")
    await fake.close()
  })
})
