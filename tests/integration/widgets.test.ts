import type { Agent } from "node:http"
import request from "supertest"
import { beforeAll, describe, expect, it } from "vitest"
import { withTenant } from "@/db"
import { createWidget, listWidgets, updateWidget, verifySessionToken, type WidgetRow } from "@/lib/widgets"
import { createTestAccount, type TestAccount } from "../support/account"
import { ownAddress } from "../support/address"
import { stack, takeSettings } from "../support/stack"

const shop = "https://shop.example"

beforeAll(() => takeSettings())

function makeWidget(
  { ctx }: TestAccount,
  more: { settings?: Record<string, unknown> } = {},
): Promise<WidgetRow> {
  return createWidget({ ctx, input: { calculator: "co2-level", name: "Reactors", origins: [shop], ...more } })
}

function openSession(widget_id: string, origin: string | null, body: object = {}) {
  const call = request(stack().appUrl)
    .post(`/api/v1/widgets/${widget_id}/sessions`)
    .agent(ownAddress())
    .send(body)
  return origin ? call.set("origin", origin) : call
}

function readSettings(widget_id: string, origin: string) {
  return request(stack().appUrl).get(`/api/v1/widgets/${widget_id}/settings`).set("origin", origin)
}

function ledgerOf({ ctx }: TestAccount) {
  return withTenant(ctx.account_id, (trx) =>
    trx.selectFrom("usage_event").select(["key_id", "operation", "units"]).orderBy("id").execute(),
  )
}

describe("200: a session of a widget", () => {
  it("costs two units, once, and names the widget, the account and the page", async () => {
    const account = await createTestAccount()
    const widget = await makeWidget(account)
    const { body, headers } = await openSession(widget.id, shop).expect(200)
    expect(body).toMatchObject({ expires_in_s: 600, calculator: "co2-level", credit_line: false })
    expect(headers["tarnwright-units"]).toBe("2")
    expect(headers["access-control-allow-origin"]).toBe(shop)
    expect(headers["access-control-allow-credentials"]).toBeUndefined()
    expect(headers["set-cookie"]).toBeUndefined()
    expect(await ledgerOf(account)).toEqual([{ key_id: widget.id, operation: "openWidgetSession", units: 2 }])
    expect(await verifySessionToken(body.token, shop, new Date())).toEqual({
      widget_id: widget.id,
      account_id: account.ctx.account_id,
      origin: shop,
      session_id: expect.any(String),
    })
  })

  it("may be opened by the framed form, whose page is ours", async () => {
    const account = await createTestAccount()
    const widget = await makeWidget(account)
    await openSession(widget.id, new URL(stack().appUrl).origin).expect(200)
  })
})

describe("200: the settings of a widget", () => {
  it("are free, and what the retailer chose with the rest filled in", async () => {
    const account = await createTestAccount({ plan: "nano" })
    const link = { label: "Ask us", url: `${shop}/advice` }
    const widget = await makeWidget(account, { settings: { kh_unit: "kh_meq_l", start: { ph: 7.2 }, link } })
    const { body, headers } = await readSettings(widget.id, shop).expect(200)
    expect(body).toEqual({
      calculator: "co2-level",
      settings: {
        language: "page",
        theme: "page",
        kh_unit: "kh_meq_l",
        temperature_unit: "c",
        start: { ph: 7.2 },
        link,
        enquiries: null,
        statistics: true,
      },
      credit_line: true,
    })
    expect(headers["access-control-allow-origin"]).toBe(shop)
    expect(await ledgerOf(account)).toEqual([])
  })

  it("follow a change at once", async () => {
    const account = await createTestAccount()
    const widget = await makeWidget(account)
    await readSettings(widget.id, shop).expect(200)
    await updateWidget({ ctx: account.ctx, input: { widget_id: widget.id, settings: { language: "de" } } })
    const { body } = await readSettings(widget.id, shop).expect(200)
    expect(body.settings.language).toBe("de")
  })
})

describe("429: a flood of sessions", () => {
  it("is refused to the address it comes from, after ten in a minute, and to no other", async () => {
    const account = await createTestAccount()
    const widget = await makeWidget(account)
    const address = ownAddress()
    const open = (from: Agent) =>
      request(stack().appUrl)
        .post(`/api/v1/widgets/${widget.id}/sessions`)
        .agent(from)
        .set("origin", shop)
        .send({})
    for (let count = 0; count < 10; count += 1) await open(address).expect(200)
    const { body, headers } = await open(address).expect(429)
    expect(body.code).toBe("rate_limited")
    expect(Number(headers["retry-after"])).toBeGreaterThan(0)
    expect(headers["access-control-allow-origin"]).toBe(shop)
    expect(await ledgerOf(account)).toHaveLength(10)
    await open(ownAddress()).expect(200)
  })
})

describe("402, 403, 404, 422: a session that is refused costs nothing", () => {
  it.each([
    ["another origin", "https://other.example"],
    ["a name that begins like the shop's", "https://shop.example.evil.example"],
    ["another scheme", "http://shop.example"],
    ["a sandboxed frame", "null"],
    ["no origin at all", null],
  ])("from %s", async (_, origin) => {
    const account = await createTestAccount()
    const widget = await makeWidget(account)
    const { status, body, headers } = await openSession(widget.id, origin)
    expect([status, body.code]).toEqual([403, "origin_not_allowed"])
    expect(headers["access-control-allow-origin"]).toBeUndefined()
    expect(await ledgerOf(account)).toEqual([])
  })

  it("for a widget that was switched off, within 2 s, and that is not told from one that never was", async () => {
    const account = await createTestAccount()
    const widget = await makeWidget(account)
    await openSession(widget.id, shop).expect(200)
    await updateWidget({ ctx: account.ctx, input: { widget_id: widget.id, disabled: true } })
    const off = Date.now()
    for (;;) {
      const { status, body } = await openSession(widget.id, shop)
      if (status === 404) {
        const never = await openSession("wdgt_01kbc0x7qzf0ra2w6v8n4m3h5t", shop).expect(404)
        expect(body.detail).toBe(never.body.detail)
        break
      }
      expect(Date.now() - off).toBeLessThan(2_000)
    }
  })

  it("for an account whose units are used up, with the page allowed to read why", async () => {
    const account = await createTestAccount({ unit_cap: 3 })
    const widget = await makeWidget(account)
    await openSession(widget.id, shop).expect(200)
    const { body, headers } = await openSession(widget.id, shop).expect(402)
    expect(body.code).toBe("quota_reached")
    expect(headers["access-control-allow-origin"]).toBe(shop)
    expect(await ledgerOf(account)).toHaveLength(1)
  })

  it("for a body with a field that is not known", async () => {
    const account = await createTestAccount()
    const widget = await makeWidget(account)
    const { body } = await openSession(widget.id, shop, { units: 0 }).expect(422)
    expect(body.errors[0].pointer).toBe("/units")
    expect(await ledgerOf(account)).toEqual([])
  })
})

describe("the preflight of a session", () => {
  it("lets a page ask, without a cookie", async () => {
    const { headers } = await request(stack().appUrl)
      .options("/api/v1/widgets/wdgt_01kbc0x7qzf0ra2w6v8n4m3h5t/sessions")
      .set("origin", shop)
      .set("access-control-request-method", "POST")
      .set("access-control-request-headers", "content-type")
      .expect(204)
    expect(headers["access-control-allow-headers"]?.toLowerCase()).toContain("content-type")
    expect(headers["access-control-allow-credentials"]).toBeUndefined()
  })
})

describe("the widgets of an account", () => {
  it("are seen by no other account", async () => {
    const [mine, theirs] = [await createTestAccount(), await createTestAccount()]
    const widget = await makeWidget(mine)
    expect(await listWidgets(theirs)).toEqual([])
    const change = updateWidget({ ctx: theirs.ctx, input: { widget_id: widget.id, name: "Taken" } })
    await expect(change).rejects.toMatchObject({ code: "not_found" })
    expect(await listWidgets(mine)).toMatchObject([{ id: widget.id, name: "Reactors" }])
  })

  it("are as many as the plan includes, also when two are made at once", async () => {
    const account = await createTestAccount({ plan: "nano" })
    const outcomes = await Promise.allSettled([makeWidget(account), makeWidget(account)])
    expect(outcomes.map(({ status }) => status).sort()).toEqual(["fulfilled", "rejected"])
    expect(outcomes.find(({ status }) => status === "rejected")).toMatchObject({
      reason: { code: "plan_limit_reached" },
    })
    const [widget] = await listWidgets(account)
    await updateWidget({ ctx: account.ctx, input: { widget_id: widget!.id, disabled: true } })
    await makeWidget(account)
    const again = updateWidget({ ctx: account.ctx, input: { widget_id: widget!.id, disabled: false } })
    await expect(again).rejects.toMatchObject({ code: "plan_limit_reached" })
  })

  it.each([
    ["an origin with a path", { origins: [`${shop}/page`] }, "/origins/0"],
    ["no origin", { origins: [] }, "/origins"],
    ["an empty name", { name: " " }, "/name"],
    ["a start beyond the quantity's bounds", { settings: { start: { ph: 19 } } }, "/settings/start/ph"],
    ["a start of no quantity", { settings: { start: { colour: 1 } } }, "/settings/start/colour"],
    [
      "a link that leads away from the shop",
      { settings: { link: { label: "x", url: "https://other.example/" } } },
      "/settings/link/url",
    ],
    [
      "a privacy page that is not the shop's",
      { settings: { enquiries: { privacy_url: "https://other.example/privacy" } } },
      "/settings/enquiries/privacy_url",
    ],
    [
      "a link that is a script",
      { settings: { link: { label: "x", url: "javascript:alert(1)" } } },
      "/settings/link/url",
    ],
    ["a setting that is not known", { settings: { html: "<b>" } }, "/settings"],
  ])("refuse %s", async (_, wrong, pointer) => {
    const { ctx } = await createTestAccount()
    const input = { calculator: "co2-level", name: "Reactors", origins: [shop], ...wrong } as const
    await expect(createWidget({ ctx, input })).rejects.toMatchObject({
      code: "validation_failed",
      errors: [{ pointer }],
    })
  })

  it("write each change into the audit trail", async () => {
    const account = await createTestAccount()
    const widget = await makeWidget(account)
    await updateWidget({ ctx: account.ctx, input: { widget_id: widget.id, name: "Diffusers" } })
    const acts = await withTenant(account.ctx.account_id, (trx) =>
      trx.selectFrom("audit_log").select(["action", "target"]).orderBy("id").execute(),
    )
    expect(acts).toEqual([
      { action: "widget.created", target: widget.id },
      { action: "widget.changed", target: widget.id },
    ])
  })
})

describe("the framed form", () => {
  const page = (widget_id: string, query = "") => request(stack().appUrl).get(`/embed/${widget_id}${query}`)

  it("may be framed by the widget's origins and our own, and by nobody else", async () => {
    const account = await createTestAccount()
    const widget = await makeWidget(account)
    const { headers, text } = await page(widget.id, `?parent=${encodeURIComponent(shop)}`).expect(200)
    const policies = headers["content-security-policy"]!.split("; ")
    expect(policies).toContain(`frame-ancestors 'self' ${shop}`)
    expect(policies).toContain("script-src 'self'")
    expect(headers["x-frame-options"]).toBeUndefined()
    expect(text).toContain(`data-parent="${shop}"`)
  })

  it("tells its height to no page that is not on the list", async () => {
    const account = await createTestAccount()
    const widget = await makeWidget(account)
    const { text } = await page(widget.id, "?parent=https://other.example").expect(200)
    expect(text).not.toContain("data-parent")
    expect(text).not.toContain("other.example")
  })

  it("writes what it is given as text", async () => {
    const account = await createTestAccount()
    const label = `"><img src=x onerror=alert(1)>`
    const widget = await makeWidget(account, { settings: { link: { label, url: `${shop}/` } } })
    const { text } = await page(widget.id, `?lang=${encodeURIComponent(`en"><script>alert(1)</script>`)}`)
    expect(text).not.toContain("<img")
    expect(text).not.toContain("<script>alert")
  })

  it("cannot be framed where there is no widget", async () => {
    const { headers } = await page("wdgt_01kbc0x7qzf0ra2w6v8n4m3h5t").expect(404)
    expect(headers["content-security-policy"]).toContain("frame-ancestors 'none'")
  })
})

describe("the bundles", () => {
  const get = (path: string) => request(stack().appUrl).get(path)

  it("may be loaded by every page; what has its hash in its address never changes", async () => {
    const loader = await get("/w/v1/loader.js").expect(200)
    expect(loader.headers["access-control-allow-origin"]).toBe("*")
    expect(loader.headers["cache-control"]).toBe("public, max-age=300")
    expect(loader.headers["content-type"]).toContain("javascript")
    const { body: manifest } = await get("/w/manifest.json").expect(200)
    for (const part of [manifest.loader, ...manifest.parts, ...manifest.catalogues]) {
      const { headers } = await get(part.path).expect(200)
      expect(headers["access-control-allow-origin"]).toBe("*")
      expect(headers["cache-control"]).toBe("public, max-age=31536000, immutable")
    }
  })
})
